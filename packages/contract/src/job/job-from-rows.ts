import { type Job, type Problem, parseJob, type Warning } from '@farlug/solver/job';
import type { JobRows } from '../rows/index.ts';
import { type Assembled, assembleJob } from './assemble-job.ts';
import { assumedValues } from './assumed.ts';
import { incompleteRows } from './incomplete.ts';
import { type JobIndex, rowAtPath } from './job-index.ts';
import { type Assumed, countLeftOut, type LeftOut } from './left-out.ts';
import { Selection } from './selection.ts';

export interface JobFromRows {
  /** Exactly what is solved, printed and hashed. */
  job: Job;
  leftOut: LeftOut[];
  /** `countLeftOut(leftOut)`: the number beside every verdict; a report is refused while it is not 0. */
  leftOutCount: number;
  assumed: Assumed[];
  index: JobIndex;
  /** What is wrong with the job as a whole, and no row can be left out for; the job cannot be solved then. */
  problems: Problem[];
  /** Remarks of the job file's checks; `rowAtPath(index, warning.at)` says which row each is about. */
  warnings: Warning[];
}

/** Rows that the checks of a job file refuse are left out one round after the other; more rounds than this do not happen. */
const ROUNDS_MAX = 30;

/**
 * The job of the rows, and what it leaves out: incomplete rows, text that was not understood, rows that the job
 * file refuses, and rows that only such rows feed. What is left is a job file without a fault.
 */
export function jobFromRows(rows: JobRows): JobFromRows {
  const selection = new Selection(rows);
  for (const missing of incompleteRows(rows)) selection.leaveOut(missing);
  for (let round = 0; ; round++) {
    selection.leaveOutUnfed();
    const { job, index } = assembleJob(rows, selection);
    const parsed = parseJob(job);
    if (parsed.ok) return outcome(rows, selection, { job: parsed.job, index }, [], parsed.warnings);
    const fresh = parsed.problems.filter(({ path, message }) => {
      const at = rowAtPath(index, path);
      return at !== null && selection.leaveOut({ ...at, reason: sentence(message) });
    });
    if (fresh.length === 0 || round === ROUNDS_MAX)
      return outcome(rows, selection, { job, index }, parsed.problems, []);
  }
}

function outcome(
  rows: JobRows,
  selection: Selection,
  { job, index }: Assembled,
  problems: Problem[],
  warnings: Warning[],
): JobFromRows {
  const leftOut = selection.leftOut();
  return {
    job,
    leftOut,
    leftOutCount: countLeftOut(leftOut),
    assumed: assumedValues(rows, index, job),
    index,
    problems,
    warnings,
  };
}

const sentence = (message: string): string =>
  `${message.charAt(0).toUpperCase()}${message.slice(1)}${/[.!?]$/.test(message) ? '' : '.'}`;
