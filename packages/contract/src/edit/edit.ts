import { z } from 'zod';
import { JOB_TABLE_NAMES, line, rowId } from '../rows/index.ts';

/**
 * Every change of a job is one edit. An operation inserts (`was` null), deletes (`set` null) or updates the
 * fields named in both; it is accepted where the current values equal `was`. An edit applies whole or not at all,
 * and the same `editId` twice is applied once.
 */

export const OPS_MAX = 20_000;
const fields = z.record(z.string().max(40), z.unknown());
export const editOp = z.strictObject({
  table: z.enum(JOB_TABLE_NAMES),
  row: rowId,
  was: fields.nullable(),
  set: fields.nullable(),
});
export type EditOp = z.output<typeof editOp>;

export const edit = z.strictObject({
  editId: rowId,
  /** What it did, in words that complete "Undo: …", as `length of LP1-7`. */
  label: line(200, 1),
  ops: z.array(editOp).min(1).max(OPS_MAX),
});
export type Edit = z.output<typeof edit>;

/** A field whose current value is not what the edit took it for; `field` null is the whole row. */
export const editConflict = z.strictObject({
  op: z.int().nonnegative(),
  table: z.enum(JOB_TABLE_NAMES),
  row: rowId,
  field: z.string().nullable(),
  was: z.unknown(),
  is: z.unknown(),
  set: z.unknown(),
});
export type EditConflict = z.output<typeof editConflict>;

/** A value that its table does not take, as `ops[3].set.length`. */
export interface EditProblem {
  path: string;
  message: string;
}
