import type { JobRows, JobTable, Row } from '../rows/index.ts';
import type { ScheduleChange } from './circuit-edits.ts';
import { dropDraft, keepDraft } from './drafts.ts';
import { relineCircuit } from './reline.ts';
import { RowChanges } from './row-changes.ts';
import { type RowField, readRowField, type TypedTable } from './row-fields.ts';

/**
 * One field of a panel, feeder, transformer, load or point as it was typed. Text that is not understood is kept as a
 * draft of that row. A panel that gets other lines or another layout takes its circuits along.
 */
export function changeRowFieldEdit<T extends TypedTable>(
  rows: JobRows,
  table: T,
  rowId: string,
  field: RowField<T>,
  typed: string,
): ScheduleChange {
  const row = (rows[table] as ReadonlyMap<string, Row<T>>).get(rowId);
  if (!row) return { edit: null, problem: 'The row is gone.' };
  const text = typed.trim();
  const label = `${field} of ${nameOf(rows, table, row)}`;
  const read = readRowField(rows, table, row, field, text);
  const changes = new RowChanges(rows);
  if (!read.ok) {
    if (text.length > 400) return { edit: null, problem: read.message };
    keepDraft(changes, table, rowId, field, text);
    return { edit: changes.edit(label), problem: read.message };
  }
  dropDraft(changes, table, rowId, field);
  changes.update(table, rowId, read.set);
  if (table === 'panel' && (field === 'lines' || field === 'layout'))
    for (const circuit of rows.circuit.values())
      if (circuit.panelId === rowId) relineCircuit(changes, circuit.id);
  return { edit: changes.edit(label), problem: null };
}

/** Another name for a panel or point; the names of its circuits' runs stay as they are. */
export function renamePointEdit(rows: JobRows, busId: string, typed: string): ScheduleChange {
  const bus = rows.bus.get(busId);
  if (!bus) return { edit: null, problem: 'The point is gone.' };
  const code = typed.trim();
  if (code === '') return { edit: null, problem: 'Give it a name, such as LP-1.' };
  if (code.length > 80) return { edit: null, problem: 'Use at most 80 characters.' };
  for (const other of rows.bus.values())
    if (other.code === code && other.id !== busId)
      return { edit: null, problem: `${code} is already the name of a point of this job.` };
  const changes = new RowChanges(rows);
  changes.update('bus', busId, { code });
  return { edit: changes.edit(`Rename ${bus.code} to ${code}`), problem: null };
}

function nameOf(rows: JobRows, table: JobTable, row: { id: string }): string {
  if (table === 'panel') return rows.bus.get((row as Row<'panel'>).busId)!.code;
  return (row as { code?: string }).code ?? table;
}
