import { parseLength, parsePower } from '@farlug/solver/units';
import type { ImportProblem } from './cells.ts';
import type { ColumnMapping } from './recognise-columns.ts';
import { isDitto, type SheetRecord } from './records.ts';

/** Cells whose unit is not that of most of their column: kept as typed, and pointed out one by one. */
export function mixedUnits(records: readonly SheetRecord[], mapping: ColumnMapping): ImportProblem[] {
  const problems: ImportProblem[] = [];
  for (const field of ['length', 'load'] as const) {
    const cells = records.flatMap((record) => {
      const cell = record.fields[field];
      if (cell === undefined || isDitto(cell.text)) return [];
      const usual = mapping.columns[cell.column - 1]?.unit ?? null;
      const unit = /[a-z'"]/i.test(cell.text) ? unitOf(field, cell.text) : usual;
      return unit === null ? [] : [{ row: record.row, column: cell.column, text: cell.text, unit }];
    });
    const counts = new Map<string, number>();
    for (const { unit } of cells) counts.set(unit, (counts.get(unit) ?? 0) + 1);
    const [most] = [...counts].sort((a, b) => b[1] - a[1]);
    if (!most || counts.size < 2) continue;
    for (const { row, column, text, unit } of cells)
      if (unit !== most[0])
        problems.push({
          row,
          column,
          severity: 'warning',
          message: `“${text}” is in ${unit}, most of this column in ${most[0]}: each is taken in its own unit.`,
          wouldBeRight: null,
        });
  }
  return problems;
}

function unitOf(field: 'length' | 'load', text: string): string | null {
  const read = field === 'length' ? parseLength(text, 'ft') : parsePower(text);
  return read.ok ? read.unit : null;
}
