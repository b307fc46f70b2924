import type { Cells, ColumnMapping, ColumnUse, ImportField } from '@farlug/contract/import';
import type { LengthUnit } from '@farlug/solver/job';
import { IMPORT_UNITS } from './import-words.ts';

const change = (mapping: ColumnMapping, column: number, fields: Partial<ColumnUse>): ColumnMapping => ({
  ...mapping,
  columns: mapping.columns.map((use, i) => (i === column ? { ...use, ...fields } : use)),
});

/** Says what a column holds; the column of that half that was taken for it before is then not read. */
export function chooseField(
  mapping: ColumnMapping,
  column: number,
  field: ImportField | null,
  lengthUnit: LengthUnit,
): ColumnMapping {
  const side = mapping.columns[column]!.right;
  const freed = {
    ...mapping,
    columns: mapping.columns.map((use) =>
      field !== null && use.field === field && use.right === side ? { ...use, field: null } : use,
    ),
  };
  const units = field === null ? undefined : IMPORT_UNITS[field];
  const said = mapping.columns[column]!.unit ?? '';
  if (!units || units.includes(said)) return change(freed, column, { field });
  const unit = field === 'length' ? lengthUnit : field === 'demand' || field === 'size' ? null : units[0]!;
  return change(freed, column, { field, unit, unitGuessed: unit === 'VA' });
}

export const chooseUnit = (mapping: ColumnMapping, column: number, unit: string): ColumnMapping =>
  change(mapping, column, { unit: unit === '' ? null : unit, unitGuessed: false });

export const chooseHalf = (mapping: ColumnMapping, column: number, right: boolean): ColumnMapping =>
  change(mapping, column, { right });

/** The first filled cells under the headings, to tell a column by. */
export function samplesOf(cells: Cells, { headingRow }: ColumnMapping, column: number): string[] {
  const samples: string[] = [];
  for (let row = (headingRow ?? -1) + 1; row < cells.length && samples.length < 3; row++) {
    const text = (cells[row]?.[column] ?? '').trim();
    if (text !== '' && !samples.includes(text)) samples.push(text);
  }
  return samples;
}
