import type { JobSummary } from '@farlug/contract/routes';
import type { JobResult } from '../../workers/results.ts';

/** What the job list shows; null for other scenarios than the one that jobs are listed by. */
export function verdictOf(result: JobResult, atSeq: number): NonNullable<JobSummary['verdict']> | null {
  if (result.scenario !== 'each-circuit' || result.state !== 'solved') return null;
  const { counts } = result;
  return {
    atSeq,
    solverVersion: result.solverVersion,
    worstPercent: result.worst?.worst.totalPercent ?? null,
    over: counts.over + counts.rise + counts.unserved,
    near: counts.near,
    within: counts.within,
    leftOut: result.leftOutCount,
  };
}
