import type { CircuitKind, LoadClass } from '@farlug/solver/job';
import type { Edit } from '../edit/index.ts';
import { breakersOfSpaces, spacesOfBreaker } from '../job/index.ts';
import type { JobRows, Row } from '../rows/index.ts';
import { type BreakerSpec, buildCircuit } from './build-circuit.ts';
import { CIRCUIT_CHANGES } from './circuit-changes.ts';
import { type CircuitField, fieldText } from './circuit-fields.ts';
import { type CircuitParts, circuitCode, circuitParts } from './circuit-parts.ts';
import { copyCircuit } from './copy-circuit.ts';
import { draftAt, dropDraft, keepDraft } from './drafts.ts';
import { removeCircuit } from './remove-circuit.ts';
import { RowChanges } from './row-changes.ts';
import { firstOpenSpace } from './space-search.ts';

/** An edit, or why there is none; `problem` beside an edit is text that was kept as it was typed. */
export interface ScheduleChange {
  edit: Edit | null;
  problem: string | null;
}
/** The same, with the id of what was added. */
export interface ScheduleAddition extends ScheduleChange {
  id: string | null;
}

const FIELD_WORDS: Record<CircuitField, string> = {
  spaces: 'Spaces',
  breaker: 'Breaker',
  kind: 'Kind',
  description: 'Description',
  room: 'Room',
  loadType: 'Load type',
  load: 'Load',
  powerFactor: 'Power factor',
  demand: 'Demand',
  continuous: 'Continuous',
  class: 'Class',
  starting: 'Starting current',
  material: 'Material',
  size: 'Size',
  neutral: 'Neutral',
  ground: 'Grounding conductor',
  sets: 'Sets',
  raceway: 'Raceway',
  length: 'Length',
  notes: 'Notes',
};

/**
 * A cell of the grid as it was typed. Text that is not understood is kept as a draft, with the reason in `problem`;
 * the row counts as left out until it is put right.
 */
export function changeCircuitFieldEdit(
  rows: JobRows,
  circuitId: string,
  field: CircuitField,
  typed: string,
): ScheduleChange {
  const parts = circuitParts(rows, circuitId);
  if (!parts) return { edit: null, problem: 'The row is gone.' };
  const text = typed.trim();
  const draft = draftAt(rows, 'circuit', circuitId, field);
  const label = `${FIELD_WORDS[field]} of ${codeOf(rows, parts)}`;
  const changes = new RowChanges(rows);
  if (text === fieldText(parts, field).trim()) {
    if (draft) dropDraft(changes, 'circuit', circuitId, field);
    return { edit: changes.edit(label), problem: null };
  }
  const problem = CIRCUIT_CHANGES[field](changes, parts, text);
  if (problem === null) {
    dropDraft(changes, 'circuit', circuitId, field);
    return { edit: changes.edit(label), problem: null };
  }
  if (text.length > 400) return { edit: null, problem };
  const kept = new RowChanges(rows);
  keepDraft(kept, 'circuit', circuitId, field, text);
  return { edit: kept.edit(label), problem };
}

export interface NewCircuit {
  kind?: CircuitKind;
  /** Where it goes; the first open spaces where none are given. */
  spaces?: readonly number[];
  poles?: 1 | 2 | 3;
  amps?: string | null;
  description?: string | null;
  class?: LoadClass;
}

/** A new row in a panel: breaker, run, end and load, all still to be filled in. */
export function addCircuitEdit(rows: JobRows, panelId: string, given: NewCircuit = {}): ScheduleAddition {
  const panel = rows.panel.get(panelId);
  if (!panel) return { edit: null, problem: 'The panel is gone.', id: null };
  const kind = given.kind ?? 'branch';
  const places = given.spaces
    ? breakersOfSpaces(panel.layout, given.spaces, given.poles ?? null)
    : openPlace(rows, panel, given.poles ?? 1);
  if (places === null)
    return { edit: null, problem: `${codeOfPanel(rows, panel)} has no open space left.`, id: null };
  const changes = new RowChanges(rows);
  const circuit = buildCircuit(changes, panel, {
    kind,
    breakers: places.map((place) => ({ ...place, amps: given.amps ?? null })),
    circuit: { description: given.description ?? null },
    loads: given.class ? [{ class: given.class }] : [],
  });
  const parts = circuitParts(changes.rows, circuit.id)!;
  return { edit: changes.edit(`Add ${codeOf(changes.rows, parts)}`), problem: null, id: circuit.id };
}

/** A copy of a circuit in the first open spaces of its panel, with points, runs and loads of its own. */
export function duplicateCircuitEdit(rows: JobRows, circuitId: string): ScheduleAddition {
  const parts = circuitParts(rows, circuitId);
  if (!parts) return { edit: null, problem: 'The row is gone.', id: null };
  if (parts.circuit.kind === 'feeder' || parts.circuit.kind === 'feed-through')
    return { edit: null, problem: 'A feeder is duplicated with its panel.', id: null };
  const changes = new RowChanges(rows);
  const places: BreakerSpec[] = [];
  for (const breaker of parts.breakers) {
    const space = firstOpenSpaceBeside(changes.rows, parts.panel, breaker.poles, places);
    if (space === null)
      return { edit: null, problem: `${codeOfPanel(rows, parts.panel)} has no open space left.`, id: null };
    places.push({ space, poles: breaker.poles, half: null, amps: breaker.amps });
  }
  const id = copyCircuit(changes, parts, parts.panel, places);
  const copy = circuitParts(changes.rows, id)!;
  return {
    edit: changes.edit(`Duplicate ${codeOf(rows, parts)} as ${codeOf(changes.rows, copy)}`),
    problem: null,
    id,
  };
}

export function deleteCircuitEdit(rows: JobRows, circuitId: string): ScheduleChange {
  const parts = circuitParts(rows, circuitId);
  if (!parts) return { edit: null, problem: 'The row is gone.' };
  const changes = new RowChanges(rows);
  removeCircuit(changes, parts);
  return { edit: changes.edit(`Delete ${codeOf(rows, parts)}`), problem: null };
}

function openPlace(
  rows: JobRows,
  panel: Row<'panel'>,
  poles: number,
): { space: number; poles: number }[] | null {
  const space = firstOpenSpace(rows, panel, poles);
  return space === null ? null : [{ space, poles }];
}

function firstOpenSpaceBeside(
  rows: JobRows,
  panel: Row<'panel'>,
  poles: number,
  places: readonly BreakerSpec[],
): number | null {
  const scratch = new RowChanges(rows);
  if (places.length > 0) buildCircuit(scratch, panel, { kind: 'reserved', breakers: places });
  const space = firstOpenSpace(scratch.rows, panel, poles);
  return space !== null && spacesOfBreaker(panel.layout, { space, poles }).every((one) => one <= panel.spaces)
    ? space
    : null;
}

export const codeOfPanel = (rows: JobRows, panel: Row<'panel'>): string => rows.bus.get(panel.busId)!.code;
export const codeOf = (rows: JobRows, parts: CircuitParts): string =>
  circuitCode(parts, codeOfPanel(rows, parts.panel));
