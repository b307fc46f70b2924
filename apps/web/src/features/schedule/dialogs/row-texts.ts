import type { JobRows, Row } from '@farlug/contract/rows';
import type { RowField, TypedTable } from '@farlug/contract/schedule';

export type Texts = Readonly<Record<string, string>>;
type AnyRow = Readonly<Record<string, unknown>>;

/** Fields whose text is not simply their value; each reads back to what it came from. */
const SPECIAL: Record<string, (row: AnyRow) => string> = {
  'panel.lines': (row) => (row.lines as string[]).join(', '),
  'run.neutral': (row) =>
    (row.conductors as string[]).includes('N') ? ((row.neutralSize as string | null) ?? 'same') : 'none',
  'run.ground': (row) => (row.groundingSize as string | null) ?? '',
  'run.raceway': (row) => ((row.racewaySize ?? row.raceway) as string | null) ?? '',
  'run.temperature': (row) => (row.temperatureOperating ? 'operating' : textOf(row.temperature)),
  'run.breaker': (row) =>
    row.breakerAmps === null ? '' : `${row.breakerAmps}${row.breakerPoles ? `/${row.breakerPoles}` : ''}`,
};

const textOf = (value: unknown): string => {
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  return value === null || value === undefined ? '' : String(value);
};

/** A field of a row as it would be typed. */
export function rowText<T extends TypedTable>(table: T, row: Row<T>, field: RowField<T>): string {
  const special = SPECIAL[`${table}.${field}`];
  return special ? special(row) : textOf((row as AnyRow)[field]);
}

export function draftText(rows: JobRows, table: TypedTable, rowId: string, field: string): string | null {
  for (const draft of rows.draft.values())
    if (draft.table === table && draft.rowId === rowId && draft.field === field) return draft.text;
  return null;
}

/** Fields of a row as they were typed: text that was not understood stands as it was. */
export function rowTexts<T extends TypedTable>(
  rows: JobRows,
  table: T,
  row: Row<T>,
  fields: readonly RowField<T>[],
): Record<string, string> {
  return Object.fromEntries(
    fields.map((field) => [field, draftText(rows, table, row.id, field) ?? rowText(table, row, field)]),
  );
}
