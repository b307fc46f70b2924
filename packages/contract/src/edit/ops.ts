import type { JobRows, JobTable, Row } from '../rows/index.ts';
import type { Edit, EditOp } from './edit.ts';
import { newId } from './new-id.ts';
import { sameValue } from './same-value.ts';

export function insertOp<T extends JobTable>(table: T, row: Row<T>): EditOp {
  return { table, row: row.id, was: null, set: { ...row } };
}

export function deleteOp<T extends JobTable>(table: T, row: Row<T>): EditOp {
  return { table, row: row.id, was: { ...row }, set: null };
}

/** The fields of `changes` that differ from the row; null where none does. */
export function updateOp<T extends JobTable>(
  table: T,
  row: Row<T>,
  changes: Partial<Omit<Row<T>, 'id'>>,
): EditOp | null {
  const was: Record<string, unknown> = {};
  const set: Record<string, unknown> = {};
  for (const [field, value] of Object.entries(changes)) {
    const current = (row as Record<string, unknown>)[field];
    if (value === undefined || sameValue(current, value)) continue;
    was[field] = current;
    set[field] = value;
  }
  return Object.keys(set).length === 0 ? null : { table, row: row.id, was, set };
}

/** An edit of the operations that change something; null where none does. */
export function editOf(
  label: string,
  ops: readonly (EditOp | null)[],
  editId: string = newId(),
): Edit | null {
  const some = ops.filter((op) => op !== null);
  return some.length === 0 ? null : { editId, label: label.slice(0, 200), ops: some };
}

/** Undo: the same operations the other way round. */
export function invertEdit(edit: Edit, label: string, editId: string = newId()): Edit {
  const ops = edit.ops.map((op) => ({ table: op.table, row: op.row, was: op.set, set: op.was })).reverse();
  return { editId, label: label.slice(0, 200), ops };
}

/** Several edits, made one upon the other, as one. */
export function composeEdits(edits: readonly Edit[], label: string, editId: string = newId()): Edit {
  return { editId, label: label.slice(0, 200), ops: edits.flatMap((edit) => edit.ops) };
}

/** Every row of a table that holds `id` in `field`. */
export function rowsWhere<T extends JobTable>(
  rows: JobRows,
  table: T,
  field: keyof Row<T>,
  id: unknown,
): Row<T>[] {
  const found: Row<T>[] = [];
  for (const row of rows[table].values() as Iterable<Row<T>>) if (row[field] === id) found.push(row);
  return found;
}
