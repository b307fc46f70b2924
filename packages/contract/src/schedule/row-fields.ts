import {
  BEHAVIOURS,
  BUS_KINDS,
  INSTALLATION_METHODS,
  PANEL_LAYOUTS,
  PROTECTIONS,
  SYSTEMS,
  TERMINALS,
  TRANSFORMER_CONNECTIONS,
} from '@farlug/solver/job';
import { parseAmps, parseBreaker, parseNumber, parseTemperature, parseVolts } from '@farlug/solver/units';
import type { JobRows, JobTable, Row, WireUnit } from '../rows/index.ts';
import { readLength } from './distances.ts';
import {
  classChange,
  continuousChange,
  demandChange,
  loadSizeChange,
  powerFactorChange,
  startingChange,
} from './load-fields.ts';
import {
  feederDemandChange,
  groundChange,
  materialChange,
  neutralChange,
  racewayChange,
  readShare,
  setsChange,
  sizeChange,
} from './run-fields.ts';
import { yesOrNo } from './words.ts';

/** What typed text makes of one field of a row. */
export type RowChange<T extends JobTable> =
  | { ok: true; set: Partial<Row<T>> }
  | { ok: false; message: string };
interface Context<T extends JobTable> {
  rows: JobRows;
  row: Row<T>;
  job: Row<'job'>;
}
type Reader<T extends JobTable> = (text: string, context: Context<T>) => RowChange<T>;
type Change = { ok: true; set: Record<string, unknown> } | { ok: false; message: string };
const refused = (message: string) => ({ ok: false as const, message });
const set = (field: string, value: unknown): Change => ({ ok: true, set: { [field]: value } });

const words =
  (field: string, max = 400) =>
  (text: string) =>
    text.length > max
      ? refused(`must be at most ${max} characters; has ${text.length}`)
      : set(field, text === '' ? null : text);
const oneOf = (field: string, values: readonly string[]) => (text: string) => {
  const value = values.find((one) => one.toLowerCase() === text.toLowerCase());
  return value === undefined ? refused(`must be one of ${values.join(', ')}`) : set(field, value);
};
const oneOfOrNone = (field: string, values: readonly string[]) => (text: string) =>
  text === '' ? set(field, null) : oneOf(field, values)(text);
const yes = (field: string) => (text: string) => {
  const value = yesOrNo(text);
  return value === null ? refused('must be yes or no') : set(field, value);
};
type Parsed = { ok: true; value: string } | { ok: false; message: string };
/** A decimal, or nothing. */
const decimal = (field: string, parse: (text: string) => Parsed) => (text: string) => {
  if (text === '') return set(field, null);
  const read = parse(text);
  return read.ok ? set(field, read.value) : read;
};
const number = (field: string, min: number, max: number) =>
  decimal(field, (text) => parseNumber(text.replace(/\s*%$/, ''), { min, max }));
const whole =
  (field: string, min: number, max: number, needed = false) =>
  (text: string) => {
    if (text === '' && !needed) return set(field, null);
    const read = parseNumber(text, { min, max });
    if (!read.ok || !Number.isInteger(Number(read.value)))
      return refused(`must be a whole number from ${min} to ${max}`);
    return set(field, Number(read.value));
  };
const rated = (field: string, values: readonly number[]) => (text: string) => {
  if (text === '') return set(field, null);
  const value = Number(text.replace(/\s*°?\s*c$/i, ''));
  return values.includes(value) ? set(field, value) : refused(`must be ${values.join(', ')} °C`);
};

const temperature = (text: string): Change => {
  if (/^operating$/i.test(text)) return { ok: true, set: { temperature: null, temperatureOperating: true } };
  const read = text === '' ? null : parseTemperature(text);
  if (read && !read.ok) return refused(`must be a temperature such as 75 °C, or operating: ${read.message}`);
  return { ok: true, set: { temperature: read?.value ?? null, temperatureOperating: false } };
};

const breaker = (text: string, { row }: Context<'run'>): Change => {
  if (text === '') return { ok: true, set: { breakerAmps: null, breakerPoles: null } };
  const read = parseBreaker(text, (row.breakerPoles ?? 3) as 1 | 2 | 3);
  return read.ok ? { ok: true, set: { breakerAmps: String(read.amps), breakerPoles: read.poles } } : read;
};

const length = (text: string, { job }: Context<'run'>): Change => {
  if (text === '') return { ok: true, set: { length: null, lengthState: null } };
  const read = readLength(text, job.lengthUnit);
  return read.ok ? { ok: true, set: { length: read.length, lengthState: null } } : read;
};

const lines = (text: string): Change => {
  const named = text
    .toUpperCase()
    .split(/[\s,;/-]+/)
    .filter((one) => one !== '');
  const right =
    named.length > 0 && named.every((one) => /^L[123]$/.test(one)) && new Set(named).size === named.length;
  return right ? set('lines', named) : refused('must name its lines once each, such as L1, L2, L3');
};

const wired =
  (read: (rows: JobRows, unit: WireUnit, text: string) => Change) =>
  (text: string, { rows, job }: { rows: JobRows; job: Row<'job'> }): Change =>
    read(rows, job.wireUnit, text);

type Readers = { [T in JobTable]?: Record<string, (text: string, context: Context<T>) => Change> };

/** Fields that are typed one by one, outside the grid: panels, feeders, transformers, single loads, points. */
export const ROW_FIELDS = {
  bus: { name: words('name'), kind: oneOf('kind', BUS_KINDS) },
  panel: {
    building: words('building'),
    area: words('area'),
    mounting: words('mounting'),
    notes: words('notes', 4000),
    layout: oneOf('layout', PANEL_LAYOUTS),
    spaces: whole('spaces', 1, 200, true),
    lines,
    mainAmps: decimal('mainAmps', (text) => parseAmps(text, { min: 0, above: true, max: 10_000 })),
  },
  run: {
    name: words('name'),
    length,
    material: materialChange,
    size: wired(sizeChange),
    neutral: (text, { rows, job, row }) => neutralChange(rows, job.wireUnit, row, text),
    ground: wired(groundChange),
    sets: setsChange,
    raceway: racewayChange,
    temperature,
    ambient: decimal('ambient', (text) => parseTemperature(text, { min: -60, max: 90 })),
    insulation: rated('insulation', [60, 70, 75, 90]),
    terminals: rated('terminals', [60, 75, 90]),
    bundled: whole('bundled', 1, 200),
    method: oneOfOrNone('method', INSTALLATION_METHODS),
    protection: oneOf('protection', PROTECTIONS),
    demand: feederDemandChange,
    breaker,
    open: yes('open'),
    locked: yes('locked'),
    floorOverride: words('floorOverride'),
    notes: words('notes', 4000),
  },
  transformer: {
    kva: decimal('kva', (text) =>
      parseNumber(text.replace(/\s*kva$/i, ''), { min: 0, above: true, max: 1e6 }),
    ),
    primaryVolts: decimal('primaryVolts', parseVolts),
    secondaryVolts: decimal('secondaryVolts', parseVolts),
    connection: oneOf('connection', TRANSFORMER_CONNECTIONS),
    primary: oneOf('primary', TERMINALS),
    system: oneOf('system', SYSTEMS),
    percentZ: decimal('percentZ', (text) =>
      parseNumber(text.replace(/\s*%$/, ''), { min: 0, above: true, max: 100 }),
    ),
    xOverR: number('xOverR', 0, 1000),
    tapPercent: number('tapPercent', -20, 20),
  },
  load: {
    name: words('name'),
    terminals: oneOf('terminals', TERMINALS),
    size: (text, { row }) => loadSizeChange(row, text),
    powerFactor: (text, { row }) => powerFactorChange(row, text),
    demand: demandChange,
    minimum: decimal('minimum', readShare),
    continuous: continuousChange,
    class: (text, { row }) => classChange(row, text),
    behaviour: oneOf('behaviour', BEHAVIOURS),
    ratedVolts: decimal('ratedVolts', parseVolts),
    starting: startingChange,
  },
} as const satisfies Readers;
export type TypedTable = keyof typeof ROW_FIELDS;
export type RowField<T extends TypedTable> = keyof (typeof ROW_FIELDS)[T] & string;

/** Reads one field of a row as it was typed. */
export function readRowField<T extends TypedTable>(
  rows: JobRows,
  table: T,
  row: Row<T>,
  field: RowField<T>,
  text: string,
): RowChange<T> {
  const job = [...rows.job.values()][0]!;
  const readers: Record<string, Reader<T>> = ROW_FIELDS[table] as never;
  return readers[field]!(text, { rows, row, job });
}
