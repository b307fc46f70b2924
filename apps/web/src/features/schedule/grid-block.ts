import type { CircuitField } from '@farlug/contract/schedule';
import type { GridColumn } from './columns.ts';

export interface TypedCell {
  circuitId: string;
  field: CircuitField;
  text: string;
}

/** A block as spreadsheets copy it: tabs between cells, a line for each row. */
export function readBlock(text: string): string[][] {
  const lines = text.replace(/\r\n?/g, '\n').replace(/\n$/, '').split('\n');
  return lines.map((line) => line.split('\t').map((cell) => cell.trim()));
}

/** Where the cells of a pasted block go: from `at` to the right and down; computed columns take nothing. */
export function placeBlock(
  block: readonly (readonly string[])[],
  at: { row: number; column: number },
  circuitIds: readonly string[],
  columns: readonly GridColumn[],
): TypedCell[] {
  return block.flatMap((line, down) =>
    line.flatMap((text, right): TypedCell[] => {
      const circuitId = circuitIds[at.row + down];
      const field = columns[at.column + right]?.field ?? null;
      return circuitId === undefined || field === null ? [] : [{ circuitId, field, text }];
    }),
  );
}
