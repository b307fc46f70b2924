import { JOB_TABLE_NAMES, type JobRowLists, type JobTable } from '@farlug/contract/rows';
import { and, count, eq, sql } from 'drizzle-orm';
import type { FirmTransaction } from '../database.ts';
import { STORED_TABLES } from '../job-tables.ts';
import { job, jobVerdict, revision } from '../schema/index.ts';
import { lockJob } from './edits.ts';
import { insertRows, loadRowLists } from './job-rows.ts';

export interface OpenedJob {
  headSeq: number;
  archivedAt: Date | null;
  hasRevisions: boolean;
  rows: JobRowLists;
}

const thisJob = (tx: FirmTransaction, jobId: string) => and(eq(job.firmId, tx.firmId), eq(job.id, jobId));

/** The job with all its rows, of one moment; null where there is none. */
export async function openJob(tx: FirmTransaction, jobId: string): Promise<OpenedJob | null> {
  const [head] = await tx.sql
    .select({ headSeq: job.headSeq, archivedAt: job.archivedAt })
    .from(job)
    .where(thisJob(tx, jobId))
    // An edit takes the row for update: between here and the end of the transaction none is applied.
    .for('share');
  if (head === undefined) return null;
  const rows = await loadRowLists(tx, jobId);
  return { ...head, rows, hasRevisions: (await countRevisions(tx, jobId)) > 0 };
}

export type CreateResult = { kind: 'created'; headSeq: number } | { kind: 'exists' };

/** A new job of these rows, which the contract has found whole; `rows.job` holds its one row, whose id is the job's. */
export async function createJob(tx: FirmTransaction, rows: JobRowLists): Promise<CreateResult> {
  const row = rows.job[0];
  if (row === undefined || rows.job.length > 1) throw new Error('a job is created from exactly one job row');
  const [taken] = await tx.sql.select({ id: job.id }).from(job).where(thisJob(tx, row.id));
  if (taken) return { kind: 'exists' };
  for (const table of JOB_TABLE_NAMES) await insertRows(tx, row.id, table, rows[table]);
  await tx.sql.update(job).set({ createdBy: tx.personId, changedBy: tx.personId }).where(thisJob(tx, row.id));
  return { kind: 'created', headSeq: 0 };
}

/** A copy of a job's rows, ids and all, under a new id and name; history, revisions and verdict stay behind. */
export async function duplicateJob(
  tx: FirmTransaction,
  jobId: string,
  copyId: string,
  copyName: string,
): Promise<CreateResult | { kind: 'missing' }> {
  const source = await openJob(tx, jobId);
  const row = source?.rows.job[0];
  if (!source || !row) return { kind: 'missing' };
  return createJob(tx, { ...source.rows, job: [{ ...row, id: copyId, name: copyName }] });
}

/** False where there is no such job. */
export async function setArchived(tx: FirmTransaction, jobId: string, archived: boolean): Promise<boolean> {
  const done = await tx.sql
    .update(job)
    .set({ archivedAt: archived ? sql`coalesce(${job.archivedAt}, now())` : null })
    .where(thisJob(tx, jobId))
    .returning({ id: job.id });
  return done.length > 0;
}

export type DeleteResult = { kind: 'deleted' } | { kind: 'has-revisions' } | { kind: 'missing' };

/** Deletes a job with all its rows and edits; one with revisions stays, whatever else is tried. */
export async function deleteJob(tx: FirmTransaction, jobId: string): Promise<DeleteResult> {
  if ((await lockJob(tx, jobId)) === null) return { kind: 'missing' };
  if ((await countRevisions(tx, jobId)) > 0) return { kind: 'has-revisions' };
  const parts = JOB_TABLE_NAMES.filter((table): table is Exclude<JobTable, 'job'> => table !== 'job');
  for (const table of parts.reverse())
    await tx.sql.execute(
      sql`delete from ${sql.identifier(STORED_TABLES[table].name)} where firm_id = ${tx.firmId} and job_id = ${jobId}`,
    );
  await tx.sql.delete(job).where(thisJob(tx, jobId));
  return { kind: 'deleted' };
}

export interface Verdict {
  atSeq: number;
  solverVersion: string;
  worstPercent: number | null;
  over: number;
  near: number;
  within: number;
  leftOut: number;
}

/** Keeps the newest verdict for the job list; an older one than is there is let go. False where there is no job. */
export async function saveVerdict(tx: FirmTransaction, jobId: string, verdict: Verdict): Promise<boolean> {
  const [head] = await tx.sql.select({ headSeq: job.headSeq }).from(job).where(thisJob(tx, jobId));
  if (head === undefined) return false;
  if (verdict.atSeq > head.headSeq) return true;
  await tx.sql
    .insert(jobVerdict)
    .values({ firmId: tx.firmId, jobId, ...verdict })
    .onConflictDoUpdate({
      target: [jobVerdict.firmId, jobVerdict.jobId],
      set: verdict,
      setWhere: sql`${jobVerdict.atSeq} <= ${verdict.atSeq}`,
    });
  return true;
}

async function countRevisions(tx: FirmTransaction, jobId: string): Promise<number> {
  const [counted] = await tx.sql
    .select({ revisions: count() })
    .from(revision)
    .where(and(eq(revision.firmId, tx.firmId), eq(revision.jobId, jobId)));
  return counted?.revisions ?? 0;
}
