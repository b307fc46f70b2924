import { newId } from '../edit/index.ts';
import { blankBreaker, blankBus, spacesOfBreaker } from '../job/index.ts';
import type { JobRows, Row } from '../rows/index.ts';
import { insertLoad, letter, linesOfBreakers } from './build-circuit.ts';
import { codeOf, type ScheduleChange } from './circuit-edits.ts';
import { circuitForm } from './circuit-form.ts';
import { type CircuitParts, circuitParts } from './circuit-parts.ts';
import { removeWithDrafts } from './drafts.ts';
import { terminalsOf } from './reline.ts';
import { removeIfUnused } from './remove-circuit.ts';
import { RowChanges } from './row-changes.ts';
import { takenSpaces } from './space-search.ts';

type Rewire = (changes: RowChanges, parts: CircuitParts) => string | null;

function rewire(rows: JobRows, circuitId: string, words: string, write: Rewire): ScheduleChange {
  const parts = circuitParts(rows, circuitId);
  if (!parts) return { edit: null, problem: 'The row is gone.' };
  if (parts.circuit.kind !== 'branch' || parts.runs.length === 0)
    return { edit: null, problem: 'Only a branch circuit with a run can be wired otherwise.' };
  const changes = new RowChanges(rows);
  const problem = write(changes, parts);
  return problem
    ? { edit: null, problem }
    : { edit: changes.edit(`${words} ${codeOf(rows, parts)}`), problem: null };
}

/** A further segment from the last point, like the one before it, with a load at its end to fill in. */
export const addTapEdit = (rows: JobRows, circuitId: string): ScheduleChange =>
  rewire(rows, circuitId, 'Add a tap to', (changes, parts) => {
    if (circuitForm(parts) === 'spread')
      return 'A load that is spread along its run has no taps: gather it at the end first.';
    if (circuitForm(parts) === 'ring') return 'A ring has no end to go on from: open it first.';
    const last = parts.runs.at(-1)!;
    const end = newPoint(changes, last);
    segment(changes, last, last.toBusId, end);
    const like = parts.loads.at(-1);
    insertLoad(
      changes,
      {
        busId: end,
        circuitId: parts.circuit.id,
        terminals: like?.terminals ?? 'L1-N',
        class: like?.class ?? 'equipment',
      },
      parts.runs[0]!.code,
    );
    return null;
  });

/** Closes the circuit by a run from its last point back to the panel. */
export const closeRingEdit = (rows: JobRows, circuitId: string): ScheduleChange =>
  rewire(rows, circuitId, 'Close the ring of', (changes, parts) => {
    if (circuitForm(parts) === 'ring') return 'The circuit is a ring already.';
    const last = parts.runs.at(-1)!;
    if (circuitForm(parts) === 'spread') return 'Gather the load at the end first.';
    segment(changes, last, last.toBusId, parts.panel.busId);
    return null;
  });

/** Takes the last segment away, with the loads at a point that nothing else reaches. */
export const removeLastSegmentEdit = (rows: JobRows, circuitId: string): ScheduleChange =>
  rewire(rows, circuitId, 'Take the last segment from', (changes, parts) => {
    if (parts.runs.length === 1) return 'The only segment goes with the circuit: delete the circuit instead.';
    const last = parts.runs.at(-1)!;
    for (const load of parts.loads)
      if (load.alongRunId === last.id || (load.busId === last.toBusId && last.toBusId !== parts.panel.busId))
        removeWithDrafts(changes, 'load', load.id);
    removeWithDrafts(changes, 'run', last.id);
    removeIfUnused(changes, last.toBusId);
    return null;
  });

/** Spreads the load evenly along the run, or gathers it at the end. */
export const spreadLoadEdit = (rows: JobRows, circuitId: string, spread: boolean): ScheduleChange =>
  rewire(rows, circuitId, spread ? 'Spread the load of' : 'Gather the load of', (changes, parts) => {
    if (parts.runs.length > 1) return 'Only the load of a single run can be spread along it.';
    const run = parts.runs[0]!;
    for (const load of parts.loads)
      changes.update(
        'load',
        load.id,
        spread ? { busId: null, alongRunId: run.id } : { busId: run.toBusId, alongRunId: null },
      );
    return null;
  });

/** Makes a single-pole circuit multiwire: the next poles of its column join it and share its neutral. */
export const makeMultiwireEdit = (rows: JobRows, circuitId: string, poles: 2 | 3): ScheduleChange =>
  rewire(rows, circuitId, 'Make multiwire of', (changes, parts) => {
    const { circuit, panel, breakers, runs } = parts;
    const first = breakers[0];
    if (!first || breakers.length !== 1 || first.poles !== 1 || runs.length !== 1)
      return 'Only a single-pole circuit of one run can become multiwire.';
    const spaces = spacesOfBreaker(panel.layout, { space: first.space, poles });
    const taken = takenSpaces(rows, panel.id, circuit.id);
    if (spaces.some((space) => space > panel.spaces || taken.has(space)))
      return `Spaces ${spaces.slice(1).join(' and ')} must be open first.`;
    const lines = linesOfBreakers(
      panel,
      spaces.map((space) => ({ space, poles: 1 })),
    );
    if (lines.length < poles) return `The panel has only ${lines.length} lines.`;
    for (const space of spaces.slice(1))
      changes.insert('breaker', {
        ...blankBreaker({ id: newId(), circuitId: circuit.id, space }),
        amps: first.amps,
      });
    const run = runs[0]!;
    const own = run.conductors.find((one) => one !== 'N');
    changes.update('run', run.id, { conductors: [...lines, 'N'] });
    lines.forEach((line, i) => {
      if (line === own) return;
      insertLoad(
        changes,
        { busId: run.toBusId, circuitId: circuit.id, terminals: terminalsOf([line, 'N']) },
        `${run.code}${letter(i)}`,
      );
    });
    return null;
  });

/** Parts the legs of a multiwire circuit beyond its last common point: a run of its own for each line. */
export const splitMultiwireEdit = (rows: JobRows, circuitId: string): ScheduleChange =>
  rewire(rows, circuitId, 'Part the legs of', (changes, parts) => {
    const run = parts.runs[0]!;
    if (circuitForm(parts) !== 'multiwire' || parts.runs.length !== 1)
      return 'Only a multiwire circuit of one run has legs to part.';
    for (const load of parts.loads) {
      const [line] = load.terminals.split('-');
      if (!load.terminals.endsWith('-N') || !line) continue;
      const end = newPoint(changes, run);
      segment(changes, run, run.toBusId, end, { conductors: [line as 'L1', 'N'] });
      changes.update('load', load.id, { busId: end });
    }
    return null;
  });

function newPoint(changes: RowChanges, like: Row<'run'>): string {
  const bus = blankBus({
    id: newId(),
    code: changes.freshCode('bus', `${like.code}-end`),
    orderKey: changes.nextKey('bus'),
  });
  return changes.insert('bus', { ...bus, kind: 'outlet' }).id;
}

/** A run like another one, its length still to be filled in. */
function segment(
  changes: RowChanges,
  like: Row<'run'>,
  fromBusId: string,
  toBusId: string,
  more: Partial<Row<'run'>> = {},
): void {
  changes.insert('run', {
    ...like,
    id: newId(),
    code: changes.freshCode('run', like.code),
    orderKey: changes.nextKey('run'),
    fromBusId,
    toBusId,
    length: null,
    lengthState: null,
    locked: false,
    ...more,
  });
}
