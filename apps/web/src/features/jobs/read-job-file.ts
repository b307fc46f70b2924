import { type Job, type Problem, parseJob, type Warning } from '@farlug/solver/job';
import { formatBytes } from '../../lib/format.ts';

export const JOB_FILE_BYTES_MAX = 16 * 1024 * 1024;

export type ReadJobFile =
  | { ok: true; job: Job; warnings: Warning[] }
  /** What is wrong with the file as a whole, or each wrong place in it. */
  | { ok: false; reason: string; problems: Problem[] };

const refused = (reason: string, problems: Problem[] = []): ReadJobFile => ({ ok: false, reason, problems });

/** Reads and judges a job file; nothing is stored. */
export function readJobFile(text: string, bytes: number): ReadJobFile {
  if (bytes > JOB_FILE_BYTES_MAX)
    return refused(
      `The file has ${formatBytes(bytes)}; a job file has at most ${formatBytes(JOB_FILE_BYTES_MAX)}.`,
    );
  let json: unknown;
  try {
    json = JSON.parse(text);
  } catch (error) {
    return refused(
      `This is not a job file: it is not JSON (${error instanceof Error ? error.message : 'unreadable'}). A schedule as CSV or XLSX is uploaded from the Schedule of a job.`,
    );
  }
  const outcome = parseJob(json);
  if (outcome.ok) return { ok: true, job: outcome.job, warnings: outcome.warnings };
  const count = outcome.problems.length;
  return refused(
    `${count === 1 ? 'One place' : `${count} places`} in the file must be put right first.`,
    outcome.problems,
  );
}
