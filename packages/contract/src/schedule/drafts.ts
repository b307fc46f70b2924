import { newId } from '../edit/index.ts';
import type { JobRows, JobTable, Row } from '../rows/index.ts';
import type { RowChanges } from './row-changes.ts';

const DRAFT_MAX = 400;

export function draftAt(rows: JobRows, table: JobTable, rowId: string, field: string): Row<'draft'> | null {
  for (const draft of rows.draft.values())
    if (draft.table === table && draft.rowId === rowId && draft.field === field) return draft;
  return null;
}

/** Keeps text that was not understood as it was typed, in place of what was kept before. */
export function keepDraft(
  changes: RowChanges,
  table: JobTable,
  rowId: string,
  field: string,
  text: string,
): void {
  const kept = draftAt(changes.rows, table, rowId, field);
  const short = text.slice(0, DRAFT_MAX);
  if (kept) changes.update('draft', kept.id, { text: short });
  else changes.insert('draft', { id: newId(), table, rowId, field, text: short });
}

export function dropDraft(changes: RowChanges, table: JobTable, rowId: string, field: string): void {
  const kept = draftAt(changes.rows, table, rowId, field);
  if (kept) changes.remove('draft', kept.id);
}

/** Removes a row with the drafts that were typed into it. */
export function removeWithDrafts(changes: RowChanges, table: JobTable, rowId: string): void {
  for (const draft of changes.rows.draft.values())
    if (draft.table === table && draft.rowId === rowId) changes.remove('draft', draft.id);
  changes.remove(table, rowId);
}
