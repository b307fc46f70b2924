import { applyEdit, composeEdits, type Edit } from '@farlug/contract/edit';
import type { JobRows } from '@farlug/contract/rows';
import { changeCircuitFieldEdit, type ScheduleChange } from '@farlug/contract/schedule';
import { formatCount } from '../../lib/format.ts';
import type { TypedCell } from './grid-block.ts';

/** Cells typed or pasted together: one edit, so that one undo takes all of it back. */
export function typeCellsEdit(rows: JobRows, cells: readonly TypedCell[]): ScheduleChange {
  const edits: Edit[] = [];
  const problems: string[] = [];
  let now = rows;
  for (const { circuitId, field, text } of cells) {
    const change = changeCircuitFieldEdit(now, circuitId, field, text);
    if (change.problem !== null) problems.push(change.problem);
    if (!change.edit) continue;
    const outcome = applyEdit(now, change.edit);
    if (!outcome.ok) continue;
    now = outcome.rows;
    edits.push(change.edit);
  }
  const [first] = edits;
  return { edit: first ? whole(first, edits) : null, problem: inWords(problems, cells.length) };
}

const whole = (first: Edit, edits: readonly Edit[]): Edit =>
  edits.length === 1 ? first : composeEdits(edits, `Paste into ${formatCount(edits.length, 'cell')}`);

function inWords(problems: readonly string[], cells: number): string | null {
  const [first] = problems;
  if (first === undefined || cells === 1) return first ?? null;
  return `${formatCount(problems.length, 'cell')} not understood, kept as typed. The first: ${first}`;
}
