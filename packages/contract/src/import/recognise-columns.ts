import { type Cells, COLUMNS_MAX, cellAt } from './cells.ts';
import { type HeadingReading, IMPORT_FIELDS, type ImportField, readHeading } from './headings.ts';
import { likeness } from './judge-cells.ts';

export interface ColumnUse {
  /** Null: the column is not read. */
  field: ImportField | null;
  /** The unit of bare numbers in it. */
  unit: string | null;
  /** True where no heading says the unit and the numbers suggested it. */
  unitGuessed: boolean;
  /** The right half of a panel drawn with odd spaces left and even spaces right. */
  right: boolean;
  heading: string;
}
/** Which column holds what; a person may change any of it before the preview. */
export interface ColumnMapping {
  /** The row of the headings, counted from 0; null where the sheet has none. */
  headingRow: number | null;
  columns: ColumnUse[];
}

const ROWS_SEARCHED = 60;
const CELLS_JUDGED = 200;

/**
 * Reads headings wherever they stand, or in the row that the person named (from 0; null for a sheet without any), and
 * judges each column by its cells as well.
 */
export function recogniseColumns(cells: Cells, named?: number | null): ColumnMapping {
  const width = cells.reduce((most, row) => Math.max(most, Math.min(COLUMNS_MAX, row.length)), 0);
  const headingRow = named === undefined ? findHeadings(cells, width) : named;
  const start = headingRow === null ? 0 : headingRow + 1;
  const columns = Array.from({ length: width }, (_, column) => {
    const heading = headingRow === null ? '' : headingText(cells, headingRow, column);
    const below = cells.slice(start, start + CELLS_JUDGED).map((row) => (row[column] ?? '').trim());
    return { column, heading, reading: readHeading(heading), below };
  });
  const right = rightHalf(columns);
  const uses = columns.map(
    ({ heading, reading, column }): ColumnUse => ({
      field: null,
      unit: reading.unit,
      unitGuessed: false,
      right: right !== null && column >= right,
      heading,
    }),
  );
  for (const half of [false, true]) {
    const own = columns.filter(({ column }) => uses[column]!.right === half);
    for (const { column, field } of assign(own, headingRow !== null)) uses[column]!.field = field;
  }
  for (const { column, below } of columns) guessUnit(uses[column]!, below);
  return { headingRow, columns: uses };
}

interface Column {
  column: number;
  heading: string;
  reading: HeadingReading;
  below: string[];
}

/** The first row with the most recognised headings; two at least. */
function findHeadings(cells: Cells, width: number): number | null {
  let best: { row: number; score: number } | null = null;
  for (let row = 0; row < Math.min(cells.length, ROWS_SEARCHED); row++) {
    let score = 0;
    const named = new Set<ImportField>();
    for (let column = 0; column < width; column++) {
      const text = cellAt(cells, row, column);
      if (text === '' || text.length > 40 || /^[-\d.,/ ]+$/.test(text)) continue;
      const { fields, exact } = readHeading(text);
      if (fields.length === 0) continue;
      if (!named.has(fields[0]!)) score += exact ? 2 : 1;
      named.add(fields[0]!);
    }
    if (named.size >= 2 && score >= 4 && (best === null || score > best.score)) best = { row, score };
  }
  if (best === null) return null;
  return headsPhases(cells[best.row + 1] ?? []) ? best.row + 1 : best.row;
}

/** A second row of headings under the first: `A`, `B`, `C` under one `Load (VA)`. */
const headsPhases = (row: readonly string[]): boolean => {
  const filled = row.map((text) => text.trim()).filter((text) => text !== '');
  return (
    filled.length >= 2 &&
    filled.filter((text) => PHASE.test(text)).length >= 2 &&
    !filled.some((text) => /\d{2}/.test(text))
  );
};
const PHASE = /^([abc]|l[123]|(phase|ph\.?) ?([abc]|l[123]))$/i;

/** A heading with the one above it, where the row above heads several columns: `Load (VA)` over `A`, `B`, `C`. */
function headingText(cells: Cells, row: number, column: number): string {
  const own = cellAt(cells, row, column);
  const above = row > 0 ? cellAt(cells, row - 1, column) : '';
  if (own === '') return above.length <= 40 ? above : '';
  if (PHASE.test(own)) {
    for (let left = column; left > column - 3 && left >= 0 && row > 0; left--) {
      const over = cellAt(cells, row - 1, left);
      const unit = readHeading(over).unit;
      if (over !== '' && unit) return `${own} (${unit})`;
    }
  }
  return own;
}

/** Where the right half of a two-sided panel begins; null for a plain list. */
function rightHalf(columns: readonly Column[]): number | null {
  const spaces = columns.filter(
    ({ reading, below }) => reading.fields.includes('space') && likeness('space', below) > 0.6,
  );
  const descriptions = columns.filter(
    ({ reading }) => reading.fields.includes('description') && reading.exact,
  );
  if (spaces.length < 2 || descriptions.length < 2) return null;
  const [first, last] = [spaces[0]!.column, spaces.at(-1)!.column];
  const mirrored =
    descriptions.some(({ column }) => column > first && column < last) && descriptions.length === 2;
  if (mirrored && descriptions[1]!.column < last)
    return Math.floor((descriptions[0]!.column + descriptions[1]!.column) / 2) + 1;
  return last;
}

/** Each field to the column that fits it best; no field twice. */
function assign(columns: readonly Column[], headed: boolean): { column: number; field: ImportField }[] {
  const offers = columns.flatMap(({ column, reading, below }) => {
    const fields = headed ? reading.fields : IMPORT_FIELDS.filter((field) => UNHEADED.has(field));
    return fields.map((field, rank) => {
      const like = headed ? likeness(field, below) : likeness(field, below.map(onlyTelling(field)));
      const filled = below.some((text) => text !== '');
      const named = headed ? (reading.exact ? 2 : 1) - rank * 0.2 : 0;
      const score = like < 0.5 && filled ? 0 : named + like + (headed ? 0 : (UNHEADED.get(field) ?? 0));
      return { column, field, score };
    });
  });
  offers.sort((a, b) => b.score - a.score || a.column - b.column);
  const taken = new Set<ImportField>();
  const given = new Map<number, ImportField>();
  for (const { column, field, score } of offers) {
    if (score <= (headed ? 0.5 : 0.9) || taken.has(field) || given.has(column)) continue;
    taken.add(field);
    given.set(column, field);
  }
  return [...given].map(([column, field]) => ({ column, field }));
}

/** Fields that cells alone can show, and how telling they are. */
const UNHEADED = new Map<ImportField, number>([
  ['material', 0.5],
  ['size', 0.15],
  ['length', -0.05],
  ['space', 0.3],
  ['breaker', 0.1],
  ['description', 0.2],
]);

/** Without a heading a bare number tells nothing of a size or a length. */
const onlyTelling =
  (field: ImportField) =>
  (text: string): string =>
    (field === 'size' || field === 'length') && text !== '' && !/[a-z#"'²]/i.test(text) ? '?' : text;

function guessUnit(use: ColumnUse, below: readonly string[]): void {
  if (use.unit !== null || use.field === null) return;
  if (!['load', 'vaL1', 'vaL2', 'vaL3'].includes(use.field)) return;
  const numbers = below
    .map((text) => Number(text.replace(/,/g, '')))
    .filter((value) => value > 0)
    .sort((a, b) => a - b);
  if (numbers.length === 0) return;
  const middle = numbers[Math.floor(numbers.length / 2)]!;
  use.unit = use.field === 'load' && middle < 60 ? 'A' : 'VA';
  use.unitGuessed = true;
}
