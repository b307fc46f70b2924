import { plainWords } from '../schedule/words.ts';
import { type Cells, cellAt, type ImportProblem, isEmptyRow } from './cells.ts';
import type { ImportField } from './headings.ts';
import type { ColumnMapping } from './recognise-columns.ts';

/** A row of the sheet, or one half of it, as fields with the column that each came from (counted from 1). */
export interface SheetRecord {
  /** Counted from 1, as the sheet shows it. */
  row: number;
  fields: Partial<Record<ImportField, { text: string; column: number }>>;
}

const TOTALS =
  /^(sub ?)?(grand )?(total|totals|sum|summe|gesamt|somme|totale|totales|suma)\b|^(connected|demand|diversified|estimated|calculated)\s+(load|va|kva|total|amps|demand)|^(load|phase) (total|balance|summary)|^(amps|va|kva) (per|by) phase|total (connected|demand|load|va|kva|amps)/;

/** The records of a sheet, with remarks on the rows that are passed over: totals and repeated headings. */
export function recordsOf(
  cells: Cells,
  mapping: ColumnMapping,
): { records: SheetRecord[]; problems: ImportProblem[] } {
  const records: SheetRecord[] = [];
  const problems: ImportProblem[] = [];
  const start = mapping.headingRow === null ? 0 : mapping.headingRow + 1;
  const remark = (row: number, message: string) =>
    problems.push({ row: row + 1, column: 0, severity: 'remark', message, wouldBeRight: null });
  for (let row = start; row < cells.length; row++) {
    if (isEmptyRow(cells[row]!)) continue;
    if (repeatsHeadings(cells, row, mapping)) {
      remark(row, 'Repeats the headings: passed over.');
      continue;
    }
    if (isTotals(cells[row]!)) {
      remark(row, 'A row of totals: passed over.');
      continue;
    }
    for (const right of [false, true]) {
      const record: SheetRecord = { row: row + 1, fields: {} };
      mapping.columns.forEach(({ field, right: side }, column) => {
        const text = cellAt(cells, row, column);
        if (field !== null && side === right && text !== '')
          record.fields[field] = { text, column: column + 1 };
      });
      if (Object.keys(record.fields).length > 0) records.push(record);
    }
  }
  return { records, problems };
}

function isTotals(row: readonly string[]): boolean {
  const words = row.map((text) => plainWords(text)).filter((text) => /[a-z]/.test(text));
  return words.length > 0 && TOTALS.test(words[0]!.replace(/[:.]/g, ' ').trim());
}

function repeatsHeadings(cells: Cells, row: number, { headingRow }: ColumnMapping): boolean {
  if (headingRow === null) return false;
  const own = cells[row]!.map((text) => text.trim().toLowerCase());
  const headings = cells[headingRow]!.map((text) => text.trim().toLowerCase());
  return headings.filter((text, i) => text !== '' && own[i] === text).length >= 2;
}

const DITTO = /^(["”“'`]+|''|do\.?|ditto|-+|–+|—+|\||↓|v|\.{2,}|id\.?|idem|dito)$/i;
export const isDitto = (text: string | undefined): boolean =>
  text === undefined || text === '' || DITTO.test(text.trim());

const SPARE = /^(spare|spares|future|reserve|reserva|riserva|frei|libre|unused|not used|libero)\b/;
const RESERVED =
  /^(space|open space|prov(ision)? space|blank|blank space|bussed space|bus space|empty|leer|vide|vacio|vuoto|reserved)\b/;
/** A space that no circuit uses yet, by its description. */
export function idleKind(description: string): 'spare' | 'reserved' | null {
  const words = plainWords(description).replace(/[()]/g, '');
  return SPARE.test(words) ? 'spare' : RESERVED.test(words) ? 'reserved' : null;
}
