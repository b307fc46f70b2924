import type { CircuitKind } from '@farlug/solver/job';
import { applyEdit, composeEdits, type Edit } from '../edit/index.ts';
import { spacesOfBreaker } from '../job/index.ts';
import { isStorable, type JobRows, type Row } from '../rows/index.ts';
import { buildCircuit } from '../schedule/build-circuit.ts';
import { fieldText } from '../schedule/circuit-fields.ts';
import { circuitParts } from '../schedule/circuit-parts.ts';
import { addPanelEdit, type NewPanel } from '../schedule/panel-edits.ts';
import { removeCircuit } from '../schedule/remove-circuit.ts';
import { RowChanges } from '../schedule/row-changes.ts';
import { firstOpenSpace, takenSpaces } from '../schedule/space-search.ts';
import { CELL_MAX, type Cells, type ImportProblem, sheetProblems } from './cells.ts';
import { IMPORT_OPTIONS, ImportDefaults, type ImportOptions } from './import-defaults.ts';
import { mixedUnits } from './mixed-units.ts';
import { type PlacedRecord, placeRecords } from './place-records.ts';
import { readCircuit } from './read-circuit.ts';
import type { ColumnMapping } from './recognise-columns.ts';
import { recordsOf } from './records.ts';

export interface ImportedCircuit {
  /** Row of the sheet, from 1. */
  row: number;
  kind: CircuitKind;
  spaces: string;
  breaker: string;
  description: string;
  load: string;
  size: string;
  length: string;
}
export interface ImportPreview {
  circuits: ImportedCircuit[];
  /** In the order of the sheet. */
  problems: ImportProblem[];
  /** All of it as one edit; null while a problem of severity `error` remains, or where there is nothing. */
  edit: Edit | null;
}
export type ImportTarget = { panelId: string } | { newPanel: NewPanel };

/** What an upload would write, and every problem by row and column. Nothing is written here. */
export function previewImport(
  rows: JobRows,
  cells: Cells,
  mapping: ColumnMapping,
  target: ImportTarget,
  name: string,
  given: Partial<ImportOptions> = {},
): ImportPreview {
  const options = { ...IMPORT_OPTIONS, ...given };
  const refused = sheetProblems(cells);
  if (refused.length > 0) return { circuits: [], problems: refused, edit: null };
  const made = targetPanel(rows, target);
  if ('problem' in made) return { circuits: [], problems: [sheetError(made.problem)], edit: null };

  const { records, problems } = recordsOf(cells, mapping);
  const kept = records.filter((record) => !options.skipRows.includes(record.row));
  const unreadable = cellProblems(cells).filter((problem) => !options.skipRows.includes(problem.row));
  problems.push(...columnProblems(mapping), ...mixedUnits(kept, mapping), ...unreadable);
  const numbered = mapping.columns.some((column) => column.field === 'space');
  const placement = placeRecords(kept, made.panel, numbered, (poles, taken) =>
    openBeside(made.rows, made.panel, poles, taken),
  );
  problems.push(...placement.problems);

  const changes = new RowChanges(made.rows);
  const defaults = new ImportDefaults(options);
  const circuits: ImportedCircuit[] = [];
  for (const placed of placement.placed) {
    problems.push(...makeRoom(changes, made.panel, placed));
    const reading = readCircuit(made.rows, made.panel, mapping, placed, defaults);
    problems.push(...reading.problems);
    if (reading.problems.some((problem) => problem.severity === 'error')) continue;
    const circuit = buildCircuit(changes, made.panel, reading.spec);
    circuits.push(shown(changes, circuit.id, placed));
  }
  if (defaults.receptacles > 0)
    problems.push(
      remark(
        `${defaults.receptacles === 1 ? '1 receptacle circuit is judged at 80 % of its' : `${defaults.receptacles} receptacle circuits are judged at 80 % of their`} breaker (common practice, assumed); what the sheet states counts upstream.`,
      ),
    );
  if (circuits.length === 0 && !problems.some((problem) => problem.severity === 'error'))
    problems.push(sheetError('No circuit is found under the headings.'));
  problems.sort((a, b) => a.row - b.row || a.column - b.column);
  const label = `Import of ${name}`.slice(0, 200);
  const edit = problems.some((problem) => problem.severity === 'error') ? null : changes.edit(label);
  return { circuits, problems, edit: edit && made.edit ? composeEdits([made.edit, edit], label) : edit };
}

type Target = { rows: JobRows; panel: Row<'panel'>; edit: Edit | null } | { problem: string };

function targetPanel(rows: JobRows, target: ImportTarget): Target {
  if ('panelId' in target) {
    const panel = rows.panel.get(target.panelId);
    return panel ? { rows, panel, edit: null } : { problem: 'The panel is gone.' };
  }
  const added = addPanelEdit(rows, target.newPanel);
  if (!added.edit) return { problem: added.problem ?? 'The panel cannot be added.' };
  const outcome = applyEdit(rows, added.edit);
  if (!outcome.ok) return { problem: 'The panel cannot be added.' };
  return { rows: outcome.rows, panel: outcome.rows.panel.get(added.id!)!, edit: added.edit };
}

/** Spares give way to what is imported into their spaces; a circuit that is wired does not. */
function makeRoom(
  changes: RowChanges,
  panel: Row<'panel'>,
  { record, spaces, half }: PlacedRecord,
): ImportProblem[] {
  const problems: ImportProblem[] = [];
  for (const breaker of changes.rows.breaker.values()) {
    const circuit = changes.rows.circuit.get(breaker.circuitId);
    if (circuit?.panelId !== panel.id) continue;
    const shared = spacesOfBreaker(panel.layout, breaker).find((space) => spaces.includes(space));
    if (shared === undefined || (half !== null && breaker.half !== null && half !== breaker.half)) continue;
    const column = record.fields.space?.column ?? 0;
    if (circuit.kind === 'spare' || circuit.kind === 'reserved') {
      removeCircuit(changes, circuitParts(changes.rows, circuit.id)!);
      problems.push({
        row: record.row,
        column,
        severity: 'remark',
        message: `Takes the place of the ${circuit.kind === 'spare' ? 'spare' : 'open space'} in space ${shared}.`,
        wouldBeRight: null,
      });
    } else
      problems.push({
        row: record.row,
        column,
        severity: 'error',
        message: `Space ${shared} holds “${circuit.description ?? circuit.kind}” already.`,
        wouldBeRight: 'an open space; or delete that circuit, or leave this row out',
      });
  }
  return problems;
}

function openBeside(
  rows: JobRows,
  panel: Row<'panel'>,
  poles: number,
  taken: ReadonlySet<number>,
): number | null {
  const scratch = new RowChanges(rows);
  const own = takenSpaces(rows, panel.id);
  const breakers = [...taken].filter((space) => !own.has(space)).map((space) => ({ space, poles: 1 }));
  if (breakers.length > 0) buildCircuit(scratch, panel, { kind: 'reserved', breakers });
  return firstOpenSpace(scratch.rows, panel, poles);
}

function columnProblems(mapping: ColumnMapping): ImportProblem[] {
  const problems: ImportProblem[] = [];
  const row = (mapping.headingRow ?? -1) + 1;
  mapping.columns.forEach(({ field, unit, unitGuessed, heading }, i) => {
    if (field !== null && unitGuessed)
      problems.push({
        row,
        column: i + 1,
        severity: 'warning',
        message: `No unit stands in the heading${heading ? ` “${heading}”` : ''}: numbers are taken as ${unit}.`,
        wouldBeRight: 'the unit of the column, set above',
      });
  });
  if (!mapping.columns.some((column) => column.field !== null))
    problems.push(sheetError('No column is recognised: say above what each holds.'));
  return problems;
}

/** Cells that no row can hold. */
function cellProblems(cells: Cells): ImportProblem[] {
  const problems: ImportProblem[] = [];
  cells.forEach((row, r) => {
    row.forEach((text, c) => {
      const error = (message: string, wouldBeRight: string) =>
        problems.push({ row: r + 1, column: c + 1, severity: 'error', message, wouldBeRight });
      if (text.length > CELL_MAX)
        error(`The cell has ${text.length} characters.`, `at most ${CELL_MAX} characters`);
      if (!isStorable(text)) error('The cell holds a character that is no text.', 'the cell typed again');
    });
  });
  return problems;
}

function shown(changes: RowChanges, circuitId: string, { record }: PlacedRecord): ImportedCircuit {
  const parts = circuitParts(changes.rows, circuitId)!;
  return {
    row: record.row,
    kind: parts.circuit.kind,
    spaces: fieldText(parts, 'spaces'),
    breaker: fieldText(parts, 'breaker'),
    description: fieldText(parts, 'description'),
    load: fieldText(parts, 'load'),
    size: fieldText(parts, 'size'),
    length: fieldText(parts, 'length'),
  };
}

const sheetError = (message: string): ImportProblem => ({
  row: 0,
  column: 0,
  severity: 'error',
  message,
  wouldBeRight: null,
});
const remark = (message: string): ImportProblem => ({
  row: 0,
  column: 0,
  severity: 'remark',
  message,
  wouldBeRight: null,
});
