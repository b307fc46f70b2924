import type {
  Cells,
  ColumnMapping,
  ImportedCircuit,
  ImportField,
  ImportPreview,
  ImportProblem,
} from '@farlug/contract/import';

/** A line of the preview: what a row of the sheet, or one half of it, comes to. */
export interface PreviewLine {
  key: string;
  row: number;
  state: 'new' | 'idle' | 'refused' | 'skipped' | 'passed';
  texts: Record<(typeof SHOWN_FIELDS)[number], string>;
}
export interface PreviewRow {
  row: number;
  lines: PreviewLine[];
  problems: ImportProblem[];
}
export interface ReadPreview {
  rows: PreviewRow[];
  /** Of the sheet as a whole. */
  sheet: ImportProblem[];
  /** Of a column as a whole, by its number from 1. */
  columns: ReadonlyMap<number, ImportProblem[]>;
  counts: Record<PreviewLine['state'], number>;
  /** Rows with an error, in the order of the sheet. */
  errorRows: number[];
}

export const SHOWN_FIELDS = ['space', 'breaker', 'description', 'load', 'size', 'length'] as const;

/** The preview in the order of the sheet, each row with its circuits and its problems. */
export function previewRows(
  cells: Cells,
  mapping: ColumnMapping,
  { circuits, problems }: ImportPreview,
  skipRows: readonly number[],
): ReadPreview {
  const headings = (mapping.headingRow ?? -1) + 1;
  const below = problems.filter((one) => one.row > headings);
  const byRow = groupBy(below, (one) => one.row);
  const circuitsOf = groupBy(circuits, (one) => one.row);
  const numbers = new Set([...byRow.keys(), ...circuitsOf.keys(), ...skipRows]);
  const rows = [...numbers]
    .sort((a, b) => a - b)
    .map((row): PreviewRow => {
      const own = byRow.get(row) ?? [];
      const lines = skipRows.includes(row)
        ? [lineOf(cells, mapping, row, false, 'skipped')]
        : linesOf(cells, mapping, row, circuitsOf.get(row) ?? [], own);
      return { row, lines, problems: own };
    });
  const counts = { new: 0, idle: 0, refused: 0, skipped: 0, passed: 0 };
  for (const { lines } of rows) for (const line of lines) counts[line.state]++;
  return {
    rows,
    sheet: problems.filter((one) => one.row === 0),
    columns: groupBy(
      problems.filter((one) => one.row > 0 && one.row <= headings),
      (one) => one.column,
    ),
    counts,
    errorRows: [...new Set(below.filter((one) => one.severity === 'error').map((one) => one.row))],
  };
}

function linesOf(
  cells: Cells,
  mapping: ColumnMapping,
  row: number,
  circuits: readonly ImportedCircuit[],
  problems: readonly ImportProblem[],
): PreviewLine[] {
  const sideOf = (column: number) => mapping.columns[column - 1]?.right ?? false;
  const wrong = new Set(problems.filter((one) => one.severity === 'error').map((one) => sideOf(one.column)));
  const refused = [...wrong].map((right) => lineOf(cells, mapping, row, right, 'refused'));
  const spoilt = new Set(refused.map((line) => firstNumber(line.texts.space)));
  const read = circuits
    .filter((circuit) => wrong.size === 0 || !spoilt.has(firstNumber(circuit.spaces)))
    .map(
      (circuit): PreviewLine => ({
        key: `${row} ${circuit.spaces}`,
        row,
        state: circuit.kind === 'branch' ? 'new' : 'idle',
        texts: { ...circuit, space: circuit.spaces },
      }),
    );
  if (read.length + refused.length > 0) return [...read, ...refused];
  return [lineOf(cells, mapping, row, false, 'passed')];
}

/** A row as it stands in the sheet. */
function lineOf(
  cells: Cells,
  mapping: ColumnMapping,
  row: number,
  right: boolean,
  state: PreviewLine['state'],
): PreviewLine {
  const text = (field: ImportField) => {
    const column = mapping.columns.findIndex((use) => use.field === field && use.right === right);
    return (cells[row - 1]?.[column] ?? '').trim();
  };
  const texts = Object.fromEntries(SHOWN_FIELDS.map((field) => [field, text(field)]));
  return { key: `${row} ${right ? 'right' : 'left'}`, row, state, texts: texts as PreviewLine['texts'] };
}

const firstNumber = (text: string): string => /\d+/.exec(text)?.[0] ?? text;

function groupBy<T>(items: readonly T[], keyOf: (item: T) => number): Map<number, T[]> {
  const groups = new Map<number, T[]>();
  for (const item of items) groups.set(keyOf(item), [...(groups.get(keyOf(item)) ?? []), item]);
  return groups;
}
