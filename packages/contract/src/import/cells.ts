/** A sheet as text: what each cell shows; formulas as their text beginning with `=`. */
export type Cells = readonly (readonly string[])[];

export const COLUMNS_MAX = 60;
export const ROWS_MAX = 5000;
export const CELL_MAX = 400;

export interface ImportProblem {
  /** As the sheet counts: from 1; 0 is the sheet as a whole. */
  row: number;
  /** From 1; 0 is the row as a whole. */
  column: number;
  /** Only an `error` keeps the import from being written. */
  severity: 'error' | 'warning' | 'remark';
  message: string;
  wouldBeRight: string | null;
}

/** `A`, `Z`, `AA` for columns 1, 26, 27. */
export function columnLetters(column: number): string {
  let letters = '';
  for (let rest = column; rest > 0; rest = Math.floor((rest - 1) / 26))
    letters = String.fromCharCode(65 + ((rest - 1) % 26)) + letters;
  return letters;
}

/** What keeps a sheet from being read at all. */
export function sheetProblems(cells: Cells): ImportProblem[] {
  const problems: ImportProblem[] = [];
  const columns = cells.reduce((most, row) => Math.max(most, lastFilled(row)), 0);
  const whole = (message: string, wouldBeRight: string) =>
    problems.push({ row: 0, column: 0, severity: 'error', message, wouldBeRight });
  if (columns > COLUMNS_MAX)
    whole(
      `The sheet has ${columns} columns; at most ${COLUMNS_MAX} are read.`,
      'Keep only the columns of the schedule.',
    );
  if (cells.length > ROWS_MAX)
    whole(
      `The sheet has ${cells.length} rows; at most ${ROWS_MAX} are read.`,
      'Upload one panel, or a few, at a time.',
    );
  if (cells.every((row) => lastFilled(row) === 0))
    whole('The sheet is empty.', 'Choose the sheet that holds the schedule.');
  return problems;
}

const lastFilled = (row: readonly string[]): number => {
  let last = row.length;
  while (last > 0 && row[last - 1]!.trim() === '') last--;
  return last;
};

export const isEmptyRow = (row: readonly string[]): boolean => lastFilled(row) === 0;
export const cellAt = (cells: Cells, row: number, column: number): string =>
  (cells[row]?.[column] ?? '').trim();
