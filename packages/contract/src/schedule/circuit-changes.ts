import { CIRCUIT_KINDS } from '@farlug/solver/job';
import { parseBreaker } from '@farlug/solver/units';
import { newId } from '../edit/index.ts';
import { blankBreaker, breakersOfSpaces, spaceStep, spacesFromText, spacesOfBreaker } from '../job/index.ts';
import type { Row } from '../rows/index.ts';
import { buildCircuit, insertLoad, jobRowOf } from './build-circuit.ts';
import type { CircuitField } from './circuit-fields.ts';
import type { CircuitParts } from './circuit-parts.ts';
import { readDistances } from './distances.ts';
import {
  classChange,
  continuousChange,
  demandChange,
  type LoadChange,
  loadSizeChange,
  powerFactorChange,
  startingChange,
} from './load-fields.ts';
import { relineCircuit, usualTerminals } from './reline.ts';
import type { RowChanges } from './row-changes.ts';
import {
  feederDemandChange,
  groundChange,
  materialChange,
  neutralChange,
  type RunChange,
  racewayChange,
  setsChange,
  sizeChange,
} from './run-fields.ts';
import { linesOf } from './schedule-view.ts';
import { firstOpenSpace } from './space-search.ts';

/** Writes typed text into a circuit; what would have been right, where the text is not understood. */
type Change = (changes: RowChanges, parts: CircuitParts, text: string) => string | null;

export const CIRCUIT_CHANGES: Record<CircuitField, Change> = {
  spaces: changeSpaces,
  breaker: changeBreaker,
  kind: changeKind,
  description: words('description', 400),
  room: words('room', 400),
  loadType: words('loadType', 400),
  notes: words('notes', 4000),
  load: changeLoad,
  powerFactor: eachLoad(powerFactorChange),
  demand: (changes, parts, text) =>
    isFeeder(parts) ? feederDemand(changes, parts, text) : loadDemand(changes, parts, text),
  continuous: eachLoad((_, text) => continuousChange(text)),
  class: eachLoad(classChange),
  starting: eachLoad((_, text) => startingChange(text)),
  material: everyRun((_, text) => materialChange(text)),
  size: everyRun(({ rows }, text) => sizeChange(rows, jobRowOf(rows).wireUnit, text)),
  neutral: changeNeutral,
  ground: everyRun(({ rows }, text) => groundChange(rows, jobRowOf(rows).wireUnit, text)),
  sets: everyRun((_, text) => setsChange(text)),
  raceway: everyRun((_, text) => racewayChange(text)),
  length: changeLength,
};

const isFeeder = ({ circuit }: CircuitParts): boolean =>
  circuit.kind === 'feeder' || circuit.kind === 'feed-through';
const loadDemand = eachLoad((_, text) => demandChange(text));
const feederDemand = everyRun((_, text) => feederDemandChange(text));

function words(field: 'description' | 'room' | 'loadType' | 'notes', max: number): Change {
  return (changes, { circuit }, text) => {
    if (text.length > max) return `must be at most ${max} characters; has ${text.length}`;
    changes.update('circuit', circuit.id, { [field]: text === '' ? null : text });
    return null;
  };
}

const PARTS = /\s+\+\s+/;

/** One value for every load, or one for each joined by ` + `. */
function eachLoad(read: (load: Row<'load'>, text: string) => LoadChange): Change {
  return (changes, { loads }, text) => {
    if (loads.length === 0) return text === '' ? null : 'must follow the load: enter the load first';
    const each = text.split(PARTS);
    const texts = each.length === loads.length ? each : loads.map(() => text);
    for (const [i, load] of loads.entries()) {
      const change = read(load, texts[i]!);
      if (!change.ok) return change.message;
      changes.update('load', load.id, change.set);
    }
    return null;
  };
}

function changeLoad(changes: RowChanges, parts: CircuitParts, text: string): string | null {
  if (isFeeder(parts)) return 'must be empty: a feeder carries what lies beyond it';
  if (parts.circuit.kind !== 'branch') return 'must be empty: make it a branch circuit first';
  const loads = parts.loads.length > 0 ? parts.loads : [firstLoad(changes, parts)];
  const each = text === '' ? loads.map(() => '') : text.split(PARTS);
  if (each.length !== loads.length)
    return `must be ${loads.length} loads joined by +, such as ${loads.map(() => '8 A').join(' + ')}`;
  for (const [i, load] of loads.entries()) {
    const change = loadSizeChange(load, each[i]!);
    if (!change.ok) return change.message;
    changes.update('load', load.id, change.set);
  }
  return null;
}

function firstLoad(changes: RowChanges, parts: CircuitParts): Row<'load'> {
  const last = parts.runs.at(-1);
  const place = { busId: last?.toBusId ?? parts.panel.busId };
  const code = last?.code ?? `${changes.rows.bus.get(parts.panel.busId)!.code}-load`;
  return insertLoad(
    changes,
    { ...place, circuitId: parts.circuit.id, terminals: usualTerminals(linesOf(parts)) },
    code,
  );
}

/** One value for every segment of the circuit. */
function everyRun(read: (changes: RowChanges, text: string, run: Row<'run'>) => RunChange): Change {
  return (changes, { runs }, text) => {
    if (runs.length === 0) return text === '' ? null : 'must belong to a run: this row has none';
    for (const run of runs) {
      const change = read(changes, text, run);
      if (!change.ok) return change.message;
      changes.update('run', run.id, change.set);
    }
    return null;
  };
}

function changeNeutral(changes: RowChanges, parts: CircuitParts, text: string): string | null {
  const needs = parts.loads.some((load) => load.terminals.endsWith('-N'));
  if (/^(none|no)$/i.test(text) && needs)
    return 'must stay: a load of this circuit is connected to the neutral';
  const { rows } = changes;
  return everyRun((_, typed, run) => neutralChange(rows, jobRowOf(rows).wireUnit, run, typed))(
    changes,
    parts,
    text,
  );
}

function changeLength(changes: RowChanges, parts: CircuitParts, text: string): string | null {
  if (parts.runs.length === 0) return text === '' ? null : 'must belong to a run: this row has none';
  const read = readDistances(parts, text, jobRowOf(changes.rows).lengthUnit);
  if (!read.ok) return read.message;
  for (const [i, run] of parts.runs.entries())
    if (run.length !== read.lengths[i])
      changes.update('run', run.id, { length: read.lengths[i]!, lengthState: null });
  return null;
}

function changeSpaces(changes: RowChanges, parts: CircuitParts, text: string): string | null {
  const { circuit, panel, breakers } = parts;
  const tandem = /^(\d{1,3})\s*([ab])$/i.exec(text);
  const spaces = text === '' ? [] : tandem ? [Number(tandem[1])] : spacesFromText(text);
  if (spaces === null) return 'must be the numbers of its spaces, such as 7, 2,4 or 1,3,5';
  const beyond = spaces.find((space) => space < 1 || space > panel.spaces);
  if (beyond !== undefined)
    return `must be from 1 to ${panel.spaces}; ${beyond} is not a space of this panel`;
  const apart = breakers.length > 1 && breakers.every((breaker) => breaker.poles === 1);
  const groups = breakersOfSpaces(panel.layout, spaces, apart ? 1 : null);
  if (groups.length > 1 && !apart)
    return `must be neighbours, ${spaceStep(panel.layout)} apart, such as ${neighbours(panel, spaces)}`;
  writeBreakers(
    changes,
    circuit.id,
    breakers,
    groups.map((one) => ({ ...one, half: halfOf(tandem) })),
  );
  relineCircuit(changes, circuit.id);
  return null;
}

const halfOf = (tandem: RegExpExecArray | null): 'a' | 'b' | null =>
  tandem ? (tandem[2]!.toLowerCase() as 'a' | 'b') : null;

const neighbours = (panel: Row<'panel'>, spaces: readonly number[]): string =>
  spacesOfBreaker(panel.layout, { space: Math.min(...spaces), poles: Math.min(3, spaces.length) }).join(',');

/** Puts breakers into the given spaces, keeping rows and ratings as far as they go. */
function writeBreakers(
  changes: RowChanges,
  circuitId: string,
  was: readonly Row<'breaker'>[],
  now: readonly { space: number; poles: number; half: 'a' | 'b' | null }[],
): void {
  now.forEach((place, i) => {
    const kept = was[i];
    if (kept) changes.update('breaker', kept.id, place);
    else
      changes.insert('breaker', {
        ...blankBreaker({ id: newId(), circuitId, space: place.space }),
        ...place,
        amps: was[0]?.amps ?? null,
      });
  });
  for (const gone of was.slice(now.length)) changes.remove('breaker', gone.id);
}

function changeBreaker(changes: RowChanges, parts: CircuitParts, text: string): string | null {
  const { circuit, panel, breakers } = parts;
  if (text === '') {
    for (const breaker of breakers) changes.update('breaker', breaker.id, { amps: null });
    return null;
  }
  const poles = (breakers[0]?.poles ?? 1) as 1 | 2 | 3;
  const read = parseBreaker(text, poles);
  if (!read.ok) return read.message;
  const amps = String(read.amps);
  const space = breakers[0]?.space ?? firstOpenSpace(changes.rows, panel, read.poles);
  if (space === null) return `must fit the panel: it has no ${read.poles} open spaces together`;
  const total = parts.spaces.length;
  if (read.poles === poles || (breakers.length > 1 && read.poles !== total)) {
    if (breakers.length === 0)
      writeBreakers(changes, circuit.id, [], [{ space, poles: read.poles, half: null }]);
    for (const breaker of changes.rows.breaker.values())
      if (breaker.circuitId === circuit.id) changes.update('breaker', breaker.id, { amps });
  } else {
    const last = Math.max(...spacesOfBreaker(panel.layout, { space, poles: read.poles }));
    if (last > panel.spaces)
      return `must fit the panel: ${read.poles} poles from space ${space} end at ${last}`;
    writeBreakers(changes, circuit.id, breakers, [{ space, poles: read.poles, half: null }]);
    for (const breaker of changes.rows.breaker.values())
      if (breaker.circuitId === circuit.id) changes.update('breaker', breaker.id, { amps });
  }
  relineCircuit(changes, circuit.id);
  return null;
}

function changeKind(changes: RowChanges, parts: CircuitParts, text: string): string | null {
  const kind = CIRCUIT_KINDS.find((one) => one === text.toLowerCase());
  if (!kind) return `must be one of ${CIRCUIT_KINDS.join(', ')}`;
  const { circuit, runs, loads } = parts;
  if (kind === circuit.kind) return null;
  const wired = runs.length > 0 || loads.length > 0;
  if ((kind === 'spare' || kind === 'reserved') && wired)
    return 'must keep its run and load: delete the circuit and add a spare in its place';
  changes.update('circuit', circuit.id, { kind });
  if (kind === 'branch' && !wired) wireUp(changes, parts);
  return null;
}

/** Gives a space that was spare a run and a load to fill in. */
function wireUp(changes: RowChanges, { circuit, panel, breakers }: CircuitParts): void {
  const built = buildCircuit(changes, panel, { kind: 'branch', breakers });
  for (const breaker of changes.rows.breaker.values())
    if (breaker.circuitId === built.id) changes.remove('breaker', breaker.id);
  for (const run of changes.rows.run.values())
    if (run.circuitId === built.id) changes.update('run', run.id, { circuitId: circuit.id });
  for (const load of changes.rows.load.values())
    if (load.circuitId === built.id) changes.update('load', load.id, { circuitId: circuit.id });
  changes.remove('circuit', built.id);
}
