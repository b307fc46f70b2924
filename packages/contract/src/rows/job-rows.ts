import {
  ANGLES,
  BASES,
  BEHAVIOURS,
  BUS_KINDS,
  CIRCUIT_KINDS,
  CONDUCTORS,
  FORCES,
  INSTALLATION_METHODS,
  LENGTH_UNITS,
  LOAD_CLASSES,
  MATERIALS,
  PAIRS,
  PANEL_LAYOUTS,
  PROTECTIONS,
  RACEWAYS,
  RUN_KINDS,
  SYSTEMS,
  TERMINALS,
  TRANSFORMER_CONNECTIONS,
} from '@farlug/solver/job';
import { z } from 'zod';
import { code, decimal, lengthQuantity, line, loadQuantity, note, orderKey, rowId, text } from './fields.ts';

/**
 * The rows of a job: everything that a person enters. Every row has an `id` made by whoever creates it;
 * a row with a `code` appears in the job file under that code, unique within its table and job.
 * `null` is "not said"; the job file's defaults apply then.
 */

export const WIRE_UNITS = ['awg', 'mm2'] as const;
export type WireUnit = (typeof WIRE_UNITS)[number];
export const LENGTH_STATES = ['measured', 'scaled', 'assumed'] as const;
export type LengthState = (typeof LENGTH_STATES)[number];
export const LIMIT_KINDS = [
  'feeder',
  'branch',
  'total',
  'starting',
  'rise',
  'lowest-volts',
  'highest-volts',
  'rating-low',
  'rating-high',
] as const;
export type LimitKind = (typeof LIMIT_KINDS)[number];
export const OHMS_PER = ['1000ft', 'km'] as const;

export const jobRow = z.strictObject({
  id: rowId,
  name: line(400, 1),
  address: text,
  building: text,
  area: text,
  codeEdition: text,
  authority: text,
  permitNumber: text,
  frequency: decimal,
  basis: z.enum(BASES),
  angle: z.enum(ANGLES),
  lengthUnit: z.enum(LENGTH_UNITS),
  wireUnit: z.enum(WIRE_UNITS),
  limitPreset: text,
  limitBasis: text,
  limitForce: z.enum(FORCES),
  includeService: z.boolean(),
  includeTransformer: z.boolean(),
  includeSource: z.boolean(),
  longRun: z.boolean(),
});

/** A limit of the job; `class` null is every class; `atVolts` only with lowest-volts and highest-volts. */
export const limitRow = z.strictObject({
  id: rowId,
  class: z.enum(LOAD_CLASSES).nullable(),
  kind: z.enum(LIMIT_KINDS),
  atVolts: decimal.nullable(),
  value: decimal,
});

export const busRow = z.strictObject({
  id: rowId,
  code,
  orderKey,
  name: text,
  kind: z.enum(BUS_KINDS),
});

export const sourceRow = z.strictObject({
  id: rowId,
  code,
  orderKey,
  busId: rowId,
  system: z.enum(SYSTEMS),
  volts: decimal.nullable(),
  openVolts: decimal.nullable(),
  off: z.boolean(),
  impedanceR: decimal.nullable(),
  impedanceX: decimal.nullable(),
  faultAmps: decimal.nullable(),
  faultXOverR: decimal.nullable(),
});

export const panelRow = z.strictObject({
  id: rowId,
  busId: rowId,
  building: text,
  area: text,
  layout: z.enum(PANEL_LAYOUTS),
  spaces: z.int().min(1).max(200),
  lines: z.array(z.enum(CONDUCTORS)).min(1).max(3),
  mainAmps: decimal.nullable(),
  mounting: text,
  notes: note,
});

export const circuitRow = z.strictObject({
  id: rowId,
  orderKey,
  panelId: rowId,
  kind: z.enum(CIRCUIT_KINDS),
  description: text,
  room: text,
  loadType: text,
  notes: note,
});

/** A breaker of a circuit: `poles` consecutive spaces on its side from `space` on; `half` of a tandem. */
export const breakerRow = z.strictObject({
  id: rowId,
  circuitId: rowId,
  space: z.int().min(1).max(200),
  half: z.enum(['a', 'b']).nullable(),
  poles: z.int().min(1).max(3),
  amps: decimal.nullable(),
});

export const runRow = z.strictObject({
  id: rowId,
  code,
  orderKey,
  kind: z.enum(RUN_KINDS),
  name: text,
  circuitId: rowId.nullable(),
  fromBusId: rowId,
  toBusId: rowId,
  length: lengthQuantity.nullable(),
  lengthState: z.enum(LENGTH_STATES).nullable(),
  open: z.boolean(),
  conductors: z.array(z.enum(CONDUCTORS)).min(1).max(4),
  material: z.enum(MATERIALS),
  size: text,
  neutralSize: text,
  sets: z.int().min(1).max(50),
  raceway: z.enum(RACEWAYS).nullable(),
  racewaySize: text,
  temperature: decimal.nullable(),
  temperatureOperating: z.boolean(),
  ambient: decimal.nullable(),
  insulation: z.int().min(1).max(250).nullable(),
  terminals: z.int().min(1).max(250).nullable(),
  bundled: z.int().min(1).max(200).nullable(),
  method: z.enum(INSTALLATION_METHODS).nullable(),
  groundingSize: text,
  protection: z.enum(PROTECTIONS),
  ohmsR: decimal.nullable(),
  ohmsX: decimal.nullable(),
  ohmsPer: z.enum(OHMS_PER).nullable(),
  ohmsNeutralR: decimal.nullable(),
  ohmsNeutralX: decimal.nullable(),
  demand: decimal.nullable(),
  /** Only of a run that no circuit has; a circuit's runs take their breaker from it. */
  breakerAmps: decimal.nullable(),
  breakerPoles: z.int().min(1).max(3).nullable(),
  locked: z.boolean(),
  /** The reason that a person gave for a size below the ampacity floor; printed beside the number. */
  floorOverride: text,
  notes: note,
});

export const transformerRow = z.strictObject({
  id: rowId,
  code,
  orderKey,
  fromBusId: rowId,
  toBusId: rowId,
  kva: decimal.nullable(),
  primaryVolts: decimal.nullable(),
  secondaryVolts: decimal.nullable(),
  connection: z.enum(TRANSFORMER_CONNECTIONS),
  primary: z.enum(TERMINALS),
  percentZ: decimal.nullable(),
  xOverR: decimal.nullable(),
  tapPercent: decimal.nullable(),
  system: z.enum(SYSTEMS),
});

export const loadRow = z.strictObject({
  id: rowId,
  code,
  orderKey,
  circuitId: rowId.nullable(),
  busId: rowId.nullable(),
  alongRunId: rowId.nullable(),
  name: text,
  terminals: z.enum(TERMINALS),
  size: loadQuantity.nullable(),
  sizeAssumed: z.boolean(),
  powerFactor: decimal.nullable(),
  powerFactorAssumed: z.boolean(),
  leading: z.boolean(),
  quantity: decimal.nullable(),
  behaviour: z.enum(BEHAVIOURS),
  demand: decimal.nullable(),
  demandVa: decimal.nullable(),
  minimum: decimal.nullable(),
  continuous: z.boolean(),
  class: z.enum(LOAD_CLASSES),
  ratedVolts: decimal.nullable(),
  startingAmps: decimal.nullable(),
  startingPowerFactor: decimal.nullable(),
});

/** A size of the firm's own, copied into the job when it is first used: later changes of the firm's row leave it. */
export const conductorRow = z.strictObject({
  id: rowId,
  name: code,
  material: z.enum(MATERIALS),
  areaMm2: decimal,
  r: decimal,
  x: decimal,
  per: z.enum(OHMS_PER),
  temperature: decimal,
  ampacity: decimal.nullable(),
  source: line(400, 1),
});

export const readingRow = z.strictObject({
  id: rowId,
  busId: rowId,
  terminals: z.enum(PAIRS),
  volts: decimal,
  amps: decimal.nullable(),
  at: z.iso.datetime({ offset: true }),
});

/** Text that was typed into a field and not understood: kept as typed; its row counts as left out. */
export const draftRow = z.strictObject({
  id: rowId,
  table: line(40),
  rowId,
  field: line(40),
  text: line(400),
});

/** Every table that an edit may change, in an order in which inserts satisfy every reference. */
export const JOB_TABLES = {
  job: jobRow,
  limit: limitRow,
  bus: busRow,
  source: sourceRow,
  panel: panelRow,
  circuit: circuitRow,
  breaker: breakerRow,
  run: runRow,
  transformer: transformerRow,
  load: loadRow,
  conductor: conductorRow,
  reading: readingRow,
  draft: draftRow,
} as const;

export type JobTable = keyof typeof JOB_TABLES;
export const JOB_TABLE_NAMES = Object.keys(JOB_TABLES) as [JobTable, ...JobTable[]];
export type Row<T extends JobTable> = z.output<(typeof JOB_TABLES)[T]>;

/** All rows of one job, by table and id. Treated as immutable: `applyEdit` makes a new one. */
export type JobRows = { readonly [T in JobTable]: ReadonlyMap<string, Row<T>> };

/** The form in which rows travel. */
export const jobRowLists = z.strictObject({
  job: z.array(jobRow),
  limit: z.array(limitRow),
  bus: z.array(busRow),
  source: z.array(sourceRow),
  panel: z.array(panelRow),
  circuit: z.array(circuitRow),
  breaker: z.array(breakerRow),
  run: z.array(runRow),
  transformer: z.array(transformerRow),
  load: z.array(loadRow),
  conductor: z.array(conductorRow),
  reading: z.array(readingRow),
  draft: z.array(draftRow),
});
export type JobRowLists = z.output<typeof jobRowLists>;

export function rowsFromLists(lists: JobRowLists): JobRows {
  const maps: Record<string, ReadonlyMap<string, { id: string }>> = {};
  for (const table of JOB_TABLE_NAMES) maps[table] = new Map(lists[table].map((row) => [row.id, row]));
  return maps as unknown as JobRows;
}

export function listsFromRows(rows: JobRows): JobRowLists {
  const lists: Record<string, unknown[]> = {};
  for (const table of JOB_TABLE_NAMES) lists[table] = [...rows[table].values()];
  return lists as unknown as JobRowLists;
}
