import {
  type Cells,
  type ColumnMapping,
  type ColumnUse,
  columnLetters,
  IMPORT_FIELDS,
  type ImportField,
  type ImportProblem,
} from '@farlug/contract/import';
import type { LengthUnit } from '@farlug/solver/job';
import { Select } from '../../../ui/select.tsx';
import { RowHead, Table, Td, Th } from '../../../ui/table.tsx';
import { chooseField, chooseHalf, chooseUnit, samplesOf } from './column-mapping.ts';
import { IMPORT_UNITS, IMPORT_WORDS, UNIT_WORDS } from './import-words.ts';

interface ColumnsTableProps {
  cells: Cells;
  mapping: ColumnMapping;
  problems: ReadonlyMap<number, readonly ImportProblem[]>;
  lengthUnit: LengthUnit;
  onMapping: (mapping: ColumnMapping) => void;
}

const FIELD_CHOICES = [
  { value: '' as const, label: 'not read' },
  ...IMPORT_FIELDS.map((value) => ({ value, label: IMPORT_WORDS[value] })),
];

/** Each column with its heading, a few of its cells, and what it is read as. */
export function ColumnsTable({ cells, mapping, problems, lengthUnit, onMapping }: ColumnsTableProps) {
  const halves = mapping.columns.some((use) => use.right);
  return (
    <Table stacked caption="Columns of the sheet and what they hold">
      <thead>
        <tr>
          <Th>Column</Th>
          <Th>First cells</Th>
          <Th>Holds</Th>
          <Th>Bare numbers are</Th>
          {halves && <Th>Side of the panel</Th>}
        </tr>
      </thead>
      <tbody>
        {mapping.columns.map((use, column) => {
          const samples = samplesOf(cells, mapping, column);
          if (samples.length === 0 && use.heading === '') return null;
          const letters = columnLetters(column + 1);
          return (
            <tr key={letters}>
              <RowHead>
                <span className="mr-2 font-normal text-ink-soft">{letters}</span>
                {use.heading || <span className="font-normal text-ink-soft">no heading</span>}
              </RowHead>
              <Td label="First cells" className="max-w-56 text-ink-soft desk:truncate">
                {samples.join(' · ')}
              </Td>
              <Td label="Holds" className="desk:w-48">
                <Select
                  aria-label={`Column ${letters} holds`}
                  className="h-11! desk:h-8! desk:text-grid"
                  value={use.field ?? ''}
                  onValue={(value: ImportField | '') =>
                    onMapping(chooseField(mapping, column, value || null, lengthUnit))
                  }
                  choices={FIELD_CHOICES}
                />
              </Td>
              <Td label="Numbers are" className="desk:w-44">
                <UnitOfColumn
                  use={use}
                  label={`Unit of column ${letters}`}
                  onUnit={(unit) => onMapping(chooseUnit(mapping, column, unit))}
                />
                {(problems.get(column + 1) ?? []).map((problem) => (
                  <p key={problem.message} className="mt-1 text-label text-near">
                    {problem.message}
                  </p>
                ))}
              </Td>
              {halves && (
                <Td label="Side" className="desk:w-32">
                  <Select
                    aria-label={`Side of column ${letters}`}
                    className="h-11! desk:h-8! desk:text-grid"
                    value={use.right ? 'right' : 'left'}
                    onValue={(side) => onMapping(chooseHalf(mapping, column, side === 'right'))}
                    choices={[
                      { value: 'left', label: 'left' },
                      { value: 'right', label: 'right' },
                    ]}
                  />
                </Td>
              )}
            </tr>
          );
        })}
      </tbody>
    </Table>
  );
}

interface UnitProps {
  use: ColumnUse;
  label: string;
  onUnit: (unit: string) => void;
}

function UnitOfColumn({ use, label, onUnit }: UnitProps) {
  const units = use.field === null ? undefined : IMPORT_UNITS[use.field];
  if (!units) return null;
  const value = use.unit ?? '';
  const offered = units.includes(value) ? units : [value, ...units];
  return (
    <Select
      aria-label={label}
      className="h-11! desk:h-8! desk:text-grid"
      value={value}
      onValue={onUnit}
      choices={offered.map((unit) => ({
        value: unit,
        label: unit === '' && use.field !== 'demand' ? 'as the job has them' : (UNIT_WORDS[unit] ?? unit),
      }))}
    />
  );
}
