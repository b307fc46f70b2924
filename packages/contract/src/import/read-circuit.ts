import type { LoadClass } from '@farlug/solver/job';
import { lineOfSpace } from '../job/index.ts';
import type { JobRows, Row } from '../rows/index.ts';
import type { CircuitSpec } from '../schedule/build-circuit.ts';
import { jobRowOf, linesOfBreakers } from '../schedule/build-circuit.ts';
import { readLength } from '../schedule/distances.ts';
import {
  classChange,
  continuousChange,
  demandChange,
  loadSizeChange,
  powerFactorChange,
} from '../schedule/load-fields.ts';
import {
  groundChange,
  materialChange,
  neutralChange,
  racewayChange,
  setsChange,
  sizeChange,
} from '../schedule/run-fields.ts';
import { classFromText } from '../schedule/words.ts';
import type { ImportProblem } from './cells.ts';
import type { ImportField } from './headings.ts';
import type { ImportDefaults } from './import-defaults.ts';
import { phaseLoads } from './phase-loads.ts';
import { errorAt, type PlacedRecord } from './place-records.ts';
import type { ColumnMapping } from './recognise-columns.ts';
import { idleKind, isDitto } from './records.ts';
import { readWire } from './wire-text.ts';

/** Codes that schedules use for types of load. */
const TYPE_CODES: Record<string, LoadClass> = {
  l: 'lighting',
  r: 'receptacle',
  m: 'motor',
  h: 'heat',
  c: 'cooling',
  k: 'kitchen',
  e: 'equipment',
};

export interface CircuitReading {
  spec: CircuitSpec;
  problems: ImportProblem[];
}

/** A placed record as a circuit to build, with every cell that is not understood. */
export function readCircuit(
  rows: JobRows,
  panel: Row<'panel'>,
  mapping: ColumnMapping,
  placed: PlacedRecord,
  defaults: ImportDefaults,
): CircuitReading {
  const { record, breakers, amps } = placed;
  const problems: ImportProblem[] = [];
  const error = errorAt(problems, record);
  const textOf = (field: ImportField): string | undefined => {
    const text = record.fields[field]?.text;
    return text === undefined || isDitto(text) ? undefined : text;
  };
  const unitOf = (field: ImportField): string | null =>
    mapping.columns[(record.fields[field]?.column ?? 0) - 1]?.unit ?? null;

  for (const [field, cell] of Object.entries(record.fields))
    if (cell.text.startsWith('='))
      error(
        field as ImportField,
        'The cell holds a formula.',
        'its value: copy the sheet as values and upload it again',
      );
  if (problems.length > 0) return { spec: { kind: 'branch', breakers: [] }, problems };

  const description = textOf('description') ?? null;
  const idle = idleKind(description ?? '');
  const circuit = {
    description: short(description),
    room: short(textOf('room') ?? null),
    loadType: short(textOf('loadType') ?? null),
    notes: textOf('notes') ?? null,
  };
  const places = breakers.map((breaker) => ({ ...breaker, amps }));
  if (idle) return { spec: { kind: idle, breakers: places, circuit }, problems };

  const take = <C extends { ok: true; set: object } | { ok: false; message: string }>(
    field: ImportField,
    change: C,
  ) => {
    if (change.ok) return change.set;
    error(field, `“${record.fields[field]?.text ?? ''}”: ${change.message}.`, null);
    return {};
  };
  const lines = linesOfBreakers(panel, breakers);
  const ofClass = classOf(textOf, take);
  const run = readRun(rows, textOf, unitOf, take, error, lines.length);
  const load: Partial<Row<'load'>> = { class: ofClass };
  const loadText = textOf('load');
  if (loadText !== undefined)
    Object.assign(load, take('load', loadSizeChange({ class: ofClass }, withUnit(loadText, unitOf('load')))));
  const perPhase = phaseLoads(placed, mapping, panel, problems);
  if (perPhase !== null) load.size = perPhase;
  const pf = textOf('powerFactor');
  if (pf !== undefined) Object.assign(load, take('powerFactor', powerFactorChange({ class: ofClass }, pf)));
  const demand = textOf('demand');
  if (demand !== undefined) {
    const unit = unitOf('demand');
    Object.assign(
      load,
      take(
        'demand',
        demandChange(unit === '%' || unit === 'VA' || unit === 'kVA' ? withUnit(demand, unit) : demand),
      ),
    );
  }
  const continuous = textOf('continuous');
  if (continuous !== undefined) Object.assign(load, take('continuous', continuousChange(continuous)));
  if (ofClass === 'receptacle')
    defaults.receptacle(
      load,
      amps,
      breakers.reduce((sum, one) => sum + one.poles, 0),
    );

  const line = textOf('line');
  if (line !== undefined)
    checkLine(line, placed, panel, (message) => errorAt(problems, record, 'warning')('line', message, null));
  const neutral = run.conductors?.includes('N');
  const spread = ofClass === 'lighting' && defaults.spreadLighting;
  const { conductors: _, ...conductorsAside } = run;
  return {
    spec: {
      kind: 'branch',
      breakers: places,
      circuit,
      run: conductorsAside,
      loads: multiLoads(placed, load),
      spread,
      ...(neutral ? { neutral } : {}),
    },
    problems,
  };
}

const short = (text: string | null): string | null => (text === null ? null : text.slice(0, 400));

/** One load, or one of each pole where single-pole breakers share the circuit. */
const multiLoads = ({ breakers }: PlacedRecord, load: Partial<Row<'load'>>): Partial<Row<'load'>>[] =>
  breakers.length > 1 ? breakers.map(() => load) : [load];

type TextOf = (field: ImportField) => string | undefined;
type Take = (
  field: ImportField,
  change: { ok: true; set: object } | { ok: false; message: string },
) => object;

function classOf(textOf: TextOf, take: Take): LoadClass {
  const stated = textOf('class');
  if (stated !== undefined) {
    const set = take('class', classChange({ powerFactorAssumed: false }, stated)) as { class?: LoadClass };
    if (set.class) return set.class;
  }
  const type = textOf('loadType');
  return (
    TYPE_CODES[type?.trim().toLowerCase() ?? ''] ??
    classFromText(type ?? '') ??
    classFromText(textOf('description') ?? '') ??
    'equipment'
  );
}

function readRun(
  rows: JobRows,
  textOf: TextOf,
  unitOf: (field: ImportField) => string | null,
  take: Take,
  error: ReturnType<typeof errorAt>,
  lines: number,
): Partial<Row<'run'>> {
  const { wireUnit, lengthUnit } = jobRowOf(rows);
  const run: Partial<Row<'run'>> = {};
  const material = textOf('material');
  const size = textOf('size');
  if (size !== undefined) {
    const metric = unitOf('size') === 'mm2' || (unitOf('size') === null && wireUnit === 'mm2');
    const wire = readWire(size, metric ? 'mm2' : '');
    if (wire === null) take('size', sizeChange(rows, wireUnit, size));
    else {
      Object.assign(run, { size: wire.size, groundingSize: wire.ground, neutralSize: wire.neutral });
      if (wire.sets) run.sets = wire.sets;
      if (wire.material) run.material = wire.material;
      const raceway = wire.raceway === null ? null : racewayChange(wire.raceway);
      if (raceway?.ok) Object.assign(run, raceway.set);
    }
  }
  if (material !== undefined) Object.assign(run, take('material', materialChange(material)));
  const ground = textOf('ground');
  if (ground !== undefined) Object.assign(run, take('ground', groundChange(rows, wireUnit, ground)));
  const sets = textOf('sets');
  if (sets !== undefined) Object.assign(run, take('sets', setsChange(sets)));
  const raceway = textOf('raceway');
  if (raceway !== undefined) {
    const read = racewayChange(raceway);
    Object.assign(run, read.ok ? read.set : { racewaySize: raceway.slice(0, 400) });
  }
  const neutral = textOf('neutral');
  if (neutral !== undefined)
    Object.assign(
      run,
      take(
        'neutral',
        neutralChange(rows, wireUnit, { conductors: lines > 1 ? ['L1', 'L2'] : ['L1', 'N'] }, neutral),
      ),
    );
  const length = textOf('length');
  if (length !== undefined) {
    const unit = unitOf('length') === 'm' ? 'm' : unitOf('length') === 'ft' ? 'ft' : lengthUnit;
    const read = readLength(length, unit);
    if (read.ok) run.length = read.length;
    else error('length', `“${length}”: ${read.message}.`, `a length such as 85 ${unit}`);
  }
  return run;
}

/** A bare number with the unit of its column. */
export const withUnit = (text: string, unit: string | null): string =>
  unit !== null && /^-?[\d,. /]*\d$/.test(text) ? `${text} ${unit}` : text;

const LETTERS: Record<string, string> = { a: 'L1', b: 'L2', c: 'L3', 1: 'L1', 2: 'L2', 3: 'L3' };
function checkLine(
  text: string,
  placed: PlacedRecord,
  panel: Row<'panel'>,
  warn: (message: string) => void,
): void {
  const said = text
    .toLowerCase()
    .replace(/l(?=[123])/g, '')
    .replace(/[^abc123]/g, '');
  const lines = [...new Set([...said].map((one) => LETTERS[one]!))].sort();
  const own = [...new Set(placed.spaces.map((space) => lineOfSpace(panel, space)))].sort();
  if (lines.length > 0 && lines.join() !== own.join())
    warn(
      `The sheet says ${lines.join(' and ')}; space ${placed.spaces.join(',')} of this panel is on ${own.join(' and ')}, which is taken.`,
    );
}
