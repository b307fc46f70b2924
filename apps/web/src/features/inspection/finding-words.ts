import type { ReportDigest, RevisionInput } from '@farlug/contract/routes';
import { formatPercentAgainst, formatSize } from '@farlug/solver/units';
import { formatCount, formatPercent } from '../../lib/format.ts';

export type Finding = ReportDigest['findings'][number];

/** `26 of 142 exceed.`: the verdict of the whole report, and what else is to be known at once. */
export function verdictOf({ counts }: ReportDigest): { exceed: number; lead: string; rest: string } {
  const { over, rise, near, within, unjudged, unserved } = counts;
  const exceed = over + rise + unserved;
  const judged = exceed + near + within;
  const rest = [
    near > 0 && `${near} near a limit`,
    unjudged > 0 && `${unjudged} without a limit`,
    unserved > 0 && `${formatCount(unserved, 'circuit')} without supply`,
  ].filter(Boolean);
  return {
    exceed,
    lead: exceed > 0 ? `${exceed} of ${judged} exceed.` : `None of ${judged} exceeds a limit.`,
    rest: rest.length > 0 ? `${rest.join(', ')}.` : '',
  };
}

/** What exceeds, each against its limit; of what is near, how near. */
export function reasonsOf({ reasons, totalPercent, limitPercent }: Finding): string[] {
  if (reasons.length > 0) return reasons.map((reason) => reason.replace(/ [<>] /, ' against '));
  if (totalPercent === null || limitPercent === null) return [];
  return [`total ${formatPercentAgainst(totalPercent, limitPercent)} of ${formatPercent(limitPercent, 0)}`];
}

const METAL = { copper: 'Cu', aluminum: 'Al' } as const;

/** Conductor and length of the run that the finding is about; a length that nobody stated says so. */
export function runOf({ place }: Finding, { job, assumed }: RevisionInput): string | null {
  const run = job.runs.find(({ id }) => id === place);
  if (!run?.size) return null;
  const sets = run.sets > 1 ? `${run.sets} × ` : '';
  const guess = assumed.some(({ kind, id, field }) => kind === 'run' && id === place && field === 'length');
  return `${sets}${formatSize(run.size)} ${METAL[run.material]}, ${run.length} ${job.lengthUnit}${guess ? ' assumed' : ''}`;
}
