import type { PlaceLink } from '../../ui/rail.tsx';
import { paths } from '../paths.ts';

/** The places that exist here; those of a job only while one is open. */
export function placesOf(firm: string, job: string | null): PlaceLink[] {
  const ofJob: PlaceLink[] = job
    ? [
        { to: paths.schedule(firm, job), label: 'Schedule' },
        { to: paths.sizes(firm, job), label: 'Sizes' },
        { to: paths.equations(firm, job), label: 'Equations' },
        { to: paths.reports(firm, job), label: 'Reports' },
        { to: paths.settings(firm, job), label: 'Job settings' },
      ]
    : [];
  return [
    { to: paths.jobs(firm), label: 'Jobs', end: true },
    ...ofJob,
    { to: `/firms/${firm}/firm`, label: 'Firm' },
  ];
}
