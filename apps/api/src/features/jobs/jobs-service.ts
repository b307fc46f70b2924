import { sameValue } from '@farlug/contract/edit';
import { jobFromRows } from '@farlug/contract/job';
import type { JobSummary, OpenJob } from '@farlug/contract/routes';
import { JOB_TABLE_NAMES, type JobRowLists, rowsFromLists } from '@farlug/contract/rows';
import {
  createJob as createJobRows,
  deleteJob as deleteJobRows,
  duplicateJob as duplicateJobRows,
  type FirmTransaction,
  listJobs as listJobRows,
  openJob as openJobRows,
  saveVerdict as saveJobVerdict,
  setArchived,
  type Verdict,
} from '@farlug/db';
import type { Deps } from '../../deps.ts';
import type { Member } from '../../platform/caller.ts';
import { DONE, type Done } from '../../platform/done.ts';
import { type Refusal, refuse } from '../../platform/refusal.ts';
import { wrongRows } from './job-rows-check.ts';
import { jobFileName, jobSummaryOf, openJobOf } from './jobs-presenter.ts';

type Created = { id: string; headSeq: number };

const noJob = () => refuse('not_found', 'There is no such job in this firm.');
const asMember = <T>(deps: Deps, { firmId, person }: Member, run: (tx: FirmTransaction) => Promise<T>) =>
  deps.db.withFirm(firmId, person.id, run);

export async function listJobs(
  deps: Deps,
  member: Member,
  filter: { search?: string; archived: boolean },
): Promise<{ jobs: JobSummary[] }> {
  return asMember(deps, member, async (tx) => ({ jobs: (await listJobRows(tx, filter)).map(jobSummaryOf) }));
}

export async function getJob(deps: Deps, member: Member, jobId: string): Promise<OpenJob | Refusal> {
  const job = await asMember(deps, member, (tx) => openJobRows(tx, jobId));
  return job === null ? noJob() : openJobOf(job);
}

/** Made once: the same rows again find the job made, other rows under its id are a conflict. */
export async function createJob(deps: Deps, member: Member, rows: JobRowLists): Promise<Created | Refusal> {
  const wrong = wrongRows(rows);
  if (wrong.length > 0) return refuse('invalid', 'The rows do not make a job.', wrong.slice(0, 100));
  const id = rows.job[0]!.id;
  return againIfOvertaken(() =>
    asMember(deps, member, async (tx) => {
      const result = await createJobRows(tx, rows);
      if (result.kind === 'created') return { id, headSeq: result.headSeq };
      const there = await openJobRows(tx, id);
      return there?.headSeq === 0 && sameRows(there.rows, rows) ? { id, headSeq: 0 } : idTaken();
    }),
  );
}

/** Two calls with the same id at once: the one that comes second finds what the first has made. */
async function againIfOvertaken<T>(work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    if (!isTakenKey(error)) throw error;
    return work();
  }
}

/** PostgreSQL's unique_violation, as the database layer hands it on. */
function isTakenKey(error: unknown): boolean {
  const cause: unknown = error instanceof Error ? (error.cause ?? error) : error;
  return typeof cause === 'object' && cause !== null && 'code' in cause && cause.code === '23505';
}

const idTaken = () => refuse('conflict', 'There is a job with this id already. Send the job under a new id.');

function sameRows(a: JobRowLists, b: JobRowLists): boolean {
  const [one, other] = [rowsFromLists(a), rowsFromLists(b)];
  return JOB_TABLE_NAMES.every((table) => {
    if (one[table].size !== other[table].size) return false;
    for (const [id, row] of one[table]) if (!sameValue(row, other[table].get(id))) return false;
    return true;
  });
}

export async function duplicateJob(
  deps: Deps,
  member: Member,
  jobId: string,
  copy: { id: string; name: string },
): Promise<Created | Refusal> {
  return againIfOvertaken(() =>
    asMember(deps, member, async (tx) => {
      const result = await duplicateJobRows(tx, jobId, copy.id, copy.name);
      if (result.kind === 'missing') return noJob();
      if (result.kind === 'created') return { id: copy.id, headSeq: result.headSeq };
      const there = await openJobRows(tx, copy.id);
      const source = await openJobRows(tx, jobId);
      const wanted = source && { ...source.rows, job: source.rows.job.map((row) => ({ ...row, ...copy })) };
      return there?.headSeq === 0 && wanted && sameRows(there.rows, wanted)
        ? { id: copy.id, headSeq: 0 }
        : idTaken();
    }),
  );
}

export async function archiveJob(
  deps: Deps,
  member: Member,
  jobId: string,
  archived: boolean,
): Promise<Done | Refusal> {
  return (await asMember(deps, member, (tx) => setArchived(tx, jobId, archived))) ? DONE : noJob();
}

export async function deleteJob(deps: Deps, member: Member, jobId: string): Promise<Done | Refusal> {
  const { kind } = await asMember(deps, member, (tx) => deleteJobRows(tx, jobId));
  if (kind === 'missing') return noJob();
  if (kind === 'has-revisions')
    return refuse(
      'conflict',
      'Reports were issued for this job, so it cannot be deleted. Archive it instead.',
    );
  return DONE;
}

export async function saveVerdict(
  deps: Deps,
  member: Member,
  jobId: string,
  verdict: Verdict,
): Promise<Done | Refusal> {
  return (await asMember(deps, member, (tx) => saveJobVerdict(tx, jobId, verdict))) ? DONE : noJob();
}

export interface JobFile {
  name: string;
  text: string;
  leftOut: number;
}

export async function jobFile(deps: Deps, member: Member, jobId: string): Promise<JobFile | Refusal> {
  const open = await asMember(deps, member, (tx) => openJobRows(tx, jobId));
  if (open === null) return noJob();
  const { job, leftOutCount } = jobFromRows(rowsFromLists(open.rows));
  return { name: jobFileName(job.name), text: `${JSON.stringify(job, null, 2)}\n`, leftOut: leftOutCount };
}
