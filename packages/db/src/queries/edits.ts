import {
  applyEdit as applyToRows,
  CODE_FIELD,
  type Edit,
  type EditConflict,
  type EditOp,
  type EditProblem,
  REFERENCES,
  sameValue,
} from '@farlug/contract/edit';
import { JOB_TABLE_NAMES, type JobRows, type JobTable } from '@farlug/contract/rows';
import { and, asc, eq, gt, sql } from 'drizzle-orm';
import type { FirmTransaction } from '../database.ts';
import { job, jobEdit, person } from '../schema/index.ts';
import {
  deleteRows,
  insertRows,
  loadSomeRows,
  referrersOf,
  updateRows,
  type WantedRows,
} from './job-rows.ts';

export type EditResult =
  | { kind: 'applied'; seq: number; headSeq: number }
  /** The same edit came before: the `seq` that it got then. */
  | { kind: 'already'; seq: number; headSeq: number }
  | { kind: 'conflict'; conflicts: EditConflict[] }
  | { kind: 'invalid'; problems: EditProblem[] }
  | { kind: 'archived' }
  | { kind: 'missing' };

/**
 * Applies one edit, whole or not at all, under the lock of its job. What it comes to is decided by the contract's
 * reducer on the rows that the edit can depend on: those it names, those it refers to, those that refer to what it
 * deletes, and those that have a code which it sets. Rows are written in an order in which references hold throughout.
 */
export async function applyEdit(
  tx: FirmTransaction,
  jobId: string,
  edit: Edit,
  undoes: string | null = null,
): Promise<EditResult> {
  const head = await lockJob(tx, jobId);
  if (head === null) return { kind: 'missing' };
  const already = await seqOfEdit(tx, jobId, edit.editId);
  if (already !== null) return { kind: 'already', seq: already, headSeq: head.headSeq };
  if (head.archivedAt !== null) return { kind: 'archived' };

  const before = await loadSomeRows(tx, jobId, rowsNeeded(edit), CODE_FIELD);
  const outcome = applyToRows(before, edit);
  if (!outcome.ok)
    return 'problems' in outcome
      ? { kind: 'invalid', problems: outcome.problems }
      : { kind: 'conflict', conflicts: outcome.conflicts };
  await writeChanges(tx, jobId, edit.ops, before, outcome.rows);
  const seq = head.headSeq + 1;
  await recordEdit(tx, jobId, seq, edit, undoes);
  return { kind: 'applied', seq, headSeq: seq };
}

/** Holds the job against other edits until the transaction ends. */
export async function lockJob(
  tx: FirmTransaction,
  jobId: string,
): Promise<{ headSeq: number; archivedAt: Date | null } | null> {
  const [head] = await tx.sql
    .select({ headSeq: job.headSeq, archivedAt: job.archivedAt })
    .from(job)
    .where(and(eq(job.firmId, tx.firmId), eq(job.id, jobId)))
    .for('update');
  return head ?? null;
}

async function seqOfEdit(tx: FirmTransaction, jobId: string, editId: string): Promise<number | null> {
  const [found] = await tx.sql
    .select({ seq: jobEdit.seq })
    .from(jobEdit)
    .where(and(eq(jobEdit.firmId, tx.firmId), eq(jobEdit.jobId, jobId), eq(jobEdit.editId, editId)));
  return found?.seq ?? null;
}

function rowsNeeded(edit: Edit): Map<JobTable, WantedRows> {
  const needed = new Map<JobTable, WantedRows>();
  const of = (table: JobTable) => {
    const wanted = needed.get(table) ?? { ids: new Set(), codes: new Set(), referring: new Map() };
    needed.set(table, wanted);
    return wanted;
  };
  for (const { table, row, set } of edit.ops) {
    of(table).ids.add(row);
    if (set === null) {
      for (const referrer of referrersOf(table)) {
        const { referring } = of(referrer.table);
        referring.set(referrer.field, (referring.get(referrer.field) ?? new Set()).add(row));
      }
      continue;
    }
    for (const [field, target] of Object.entries(REFERENCES[table] ?? {})) {
      const id = set[field];
      if (isUuid(id)) of(target).ids.add(id);
    }
    const code = set[CODE_FIELD[table] ?? ''];
    if (typeof code === 'string' && !code.includes('\0')) of(table).codes.add(code);
  }
  return needed;
}

const UUID = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/;
const isUuid = (value: unknown): value is string => typeof value === 'string' && UUID.test(value);

async function writeChanges(
  tx: FirmTransaction,
  jobId: string,
  ops: readonly EditOp[],
  before: JobRows,
  after: JobRows,
): Promise<void> {
  const changes = JOB_TABLE_NAMES.map((table) => changesOf(table, ops, before, after));
  for (const { table, inserted } of changes) await insertRows(tx, jobId, table, inserted);
  for (const { table, updated } of changes) await updateRows(tx, jobId, table, updated);
  for (const { table, deleted } of changes.reverse()) await deleteRows(tx, jobId, table, deleted);
}

function changesOf(table: JobTable, ops: readonly EditOp[], before: JobRows, after: JobRows) {
  const inserted: { id: string }[] = [];
  const updated: { id: string }[] = [];
  const deleted: string[] = [];
  const touched = new Set(ops.filter((op) => op.table === table).map((op) => op.row));
  for (const id of touched) {
    const was = before[table].get(id);
    const is = after[table].get(id);
    if (is === undefined) {
      if (was !== undefined) deleted.push(id);
    } else if (was === undefined) inserted.push(is);
    else if (!sameValue(was, is)) updated.push(is);
  }
  return { table, inserted, updated, deleted };
}

async function recordEdit(
  tx: FirmTransaction,
  jobId: string,
  seq: number,
  edit: Edit,
  undoes: string | null,
): Promise<void> {
  const { editId, label, ops } = edit;
  await tx.sql
    .insert(jobEdit)
    .values({ firmId: tx.firmId, jobId, seq, editId, personId: tx.personId, label, ops, undoes });
  await tx.sql
    .update(job)
    .set({ headSeq: seq, changedAt: sql`now()`, changedBy: tx.personId })
    .where(and(eq(job.firmId, tx.firmId), eq(job.id, jobId)));
}

export interface RecordedEdit {
  seq: number;
  editId: string;
  person: string;
  label: string;
  at: Date;
  ops: EditOp[];
}

/** The edits after `since`, in their order, and the head; null where there is no such job. */
export async function editsSince(
  tx: FirmTransaction,
  jobId: string,
  since: number,
  limit = 500,
): Promise<{ headSeq: number; edits: RecordedEdit[] } | null> {
  const [head] = await tx.sql
    .select({ headSeq: job.headSeq })
    .from(job)
    .where(and(eq(job.firmId, tx.firmId), eq(job.id, jobId)));
  if (head === undefined) return null;
  const edits = await tx.sql
    .select({
      seq: jobEdit.seq,
      editId: jobEdit.editId,
      person: sql<string>`coalesce(${person.name}, '')`,
      label: jobEdit.label,
      at: jobEdit.at,
      ops: jobEdit.ops,
    })
    .from(jobEdit)
    .leftJoin(person, eq(person.id, jobEdit.personId))
    .where(and(eq(jobEdit.firmId, tx.firmId), eq(jobEdit.jobId, jobId), gt(jobEdit.seq, since)))
    .orderBy(asc(jobEdit.seq))
    .limit(limit);
  return { headSeq: head.headSeq, edits };
}
