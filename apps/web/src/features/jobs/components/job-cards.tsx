import { Link } from 'react-router-dom';
import { paths } from '../../../app/paths.ts';
import { formatRecent } from '../../../lib/format.ts';
import { Menu } from '../../../ui/menu.tsx';
import { JobCounts, WorstDrop } from './job-verdict.tsx';
import type { JobListProps } from './jobs-table.tsx';
import { RevisionState } from './revision-state.tsx';

/** The list on a phone. */
export function JobCards({ firm, jobs, actionsOf }: JobListProps) {
  return (
    <ul>
      {jobs.map((job) => (
        <li key={job.id} className="border-b border-hair px-4 py-3">
          <div className="flex items-baseline gap-3">
            <Link
              to={paths.schedule(firm, job.id)}
              className="inline-flex min-h-11 min-w-0 items-center font-bold text-ink"
            >
              {job.name}
            </Link>
            <span className="ml-auto">
              <WorstDrop job={job} />
            </span>
          </div>
          {job.address && <p className="text-grid text-ink-soft">{job.address}</p>}
          <div className="mt-1 text-grid">
            <JobCounts job={job} />
          </div>
          <div className="mt-2 flex items-end justify-between gap-3 text-grid">
            <div>
              <RevisionState revision={job.revision} />
              <span className="block text-label text-ink-soft">Changed {formatRecent(job.changedAt)}</span>
            </div>
            <Menu label="Actions" name={`Actions for ${job.name}`} items={actionsOf(job)} />
          </div>
        </li>
      ))}
    </ul>
  );
}
