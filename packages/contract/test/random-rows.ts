import {
  CIRCUIT_KINDS,
  LOAD_CLASSES,
  MATERIALS,
  PANEL_LAYOUTS,
  RACEWAYS,
  RUN_KINDS,
  SYSTEMS,
  TERMINALS,
} from '@farlug/solver/job';
import fc from 'fast-check';
import { type EditOp, newId, REFERENCES, rowsWhere } from '../src/edit/index.ts';
import {
  blankBreaker,
  blankBus,
  blankCircuit,
  blankJob,
  blankLoad,
  blankPanel,
  blankRun,
  blankSource,
  blankTransformer,
} from '../src/job/blank-rows.ts';
import {
  JOB_TABLE_NAMES,
  type JobRowLists,
  type JobRows,
  type JobTable,
  type Row,
} from '../src/rows/index.ts';

/** Random jobs and random edits of them, for the properties of the reducer and of the SQL that is held to it. */

const text = fc.option(fc.string({ maxLength: 12 }));
const decimal = fc
  .tuple(fc.integer({ min: -9999, max: 9999 }), fc.integer({ min: 0, max: 999 }))
  .map(([whole, part]) => (part === 0 ? `${whole}` : `${whole}.${String(part).padStart(3, '0')}`));
const maybeDecimal = fc.option(decimal);
const length = fc.option(
  fc.tuple(decimal, fc.constantFrom('ft', 'm', 'in')).map(([n, unit]) => `${n} ${unit}`),
);
const load = fc.option(
  fc.tuple(decimal, fc.constantFrom('A', 'VA', 'kW', 'hp')).map(([n, unit]) => `${n} ${unit}`),
);
const conductors = fc.subarray(['L1', 'L2', 'L3', 'N'] as const, { minLength: 1 });
const lines = fc.subarray(['L1', 'L2', 'L3'] as const, { minLength: 1 });
const orderKey = fc.string({ minLength: 1, maxLength: 4, unit: fc.constantFrom('a', 'b', 'Z', '0', '9') });

/** Fields that hold no reference and no code. */
const FIELDS: { [T in JobTable]: fc.Arbitrary<Partial<Row<T>>> } = {
  job: fc.record({ address: text, permitNumber: text, longRun: fc.boolean(), frequency: decimal }),
  limit: fc.record({
    class: fc.option(fc.constantFrom(...LOAD_CLASSES)),
    kind: fc.constantFrom('feeder', 'branch', 'total'),
    atVolts: maybeDecimal,
    value: decimal,
  }),
  bus: fc.record({ orderKey, name: text, kind: fc.constantFrom('panel', 'junction', 'outlet') }),
  source: fc.record({
    orderKey,
    system: fc.constantFrom(...SYSTEMS),
    volts: maybeDecimal,
    off: fc.boolean(),
  }),
  panel: fc.record({
    building: text,
    layout: fc.constantFrom(...PANEL_LAYOUTS),
    spaces: fc.integer({ min: 1, max: 200 }),
    lines,
    mainAmps: maybeDecimal,
  }),
  circuit: fc.record({ orderKey, kind: fc.constantFrom(...CIRCUIT_KINDS), description: text, room: text }),
  breaker: fc.record({
    space: fc.integer({ min: 1, max: 200 }),
    half: fc.option(fc.constantFrom('a', 'b')),
    poles: fc.integer({ min: 1, max: 3 }),
    amps: maybeDecimal,
  }),
  run: fc.record({
    orderKey,
    kind: fc.constantFrom(...RUN_KINDS),
    length,
    conductors,
    material: fc.constantFrom(...MATERIALS),
    size: text,
    sets: fc.integer({ min: 1, max: 50 }),
    raceway: fc.option(fc.constantFrom(...RACEWAYS)),
    demand: maybeDecimal,
    locked: fc.boolean(),
    notes: text,
  }),
  transformer: fc.record({ orderKey, kva: maybeDecimal, tapPercent: maybeDecimal }),
  load: fc.record({
    orderKey,
    name: text,
    terminals: fc.constantFrom(...TERMINALS),
    size: load,
    powerFactor: maybeDecimal,
    powerFactorAssumed: fc.boolean(),
    class: fc.constantFrom(...LOAD_CLASSES),
  }),
  conductor: fc.record({ areaMm2: decimal, r: decimal, source: fc.string({ minLength: 1, maxLength: 9 }) }),
  reading: fc.record({ volts: decimal, amps: maybeDecimal }),
  draft: fc.record({ field: fc.constantFrom('size', 'length'), text: fc.string({ maxLength: 20 }) }),
};

interface Step {
  kind: 'insert' | 'update' | 'delete';
  table: JobTable;
  id: string;
  pick: number;
  fields: Record<string, unknown>;
}
const stepOf = (kinds: readonly Step['kind'][], tables: readonly JobTable[]): fc.Arbitrary<Step> =>
  fc.constantFrom(...tables).chain((table) =>
    fc.record({
      kind: fc.constantFrom(...kinds),
      table: fc.constant(table),
      id: fc.uuid({ version: 4 }),
      pick: fc.nat({ max: 1000 }),
      fields: FIELDS[table] as fc.Arbitrary<Record<string, unknown>>,
    }),
  );

const pickFrom = <V>(items: readonly V[], pick: number): V | undefined =>
  items.length === 0 ? undefined : items[pick % items.length];

/** A row of `table` with references into `rows`; undefined where there is nothing that it could refer to. */
function freshRow(rows: JobRows, { table, id, pick, fields }: Step): Row<JobTable> | undefined {
  const bus = pickFrom([...rows.bus.keys()], pick);
  const otherBus = pickFrom([...rows.bus.keys()], pick + 1);
  const circuit = pickFrom([...rows.circuit.keys()], pick);
  const panel = pickFrom([...rows.panel.keys()], pick);
  const code = `c-${id}`;
  const orderKey = 'a';
  const common = { id, code, orderKey };
  const maybeCircuit = pick % 3 === 0 ? null : (circuit ?? null);
  switch (table) {
    case 'job':
      return undefined;
    case 'limit':
      return { id, class: null, kind: 'total', atVolts: null, value: '5', ...fields } as Row<'limit'>;
    case 'bus':
      return { ...blankBus(common), ...fields };
    case 'source':
      return bus === undefined
        ? undefined
        : { ...blankSource({ ...common, busId: bus, system: '3ph-4w' }), ...fields };
    case 'panel':
      return bus === undefined
        ? undefined
        : { ...blankPanel({ id, busId: bus, spaces: 42, lines: ['L1'] }), ...fields };
    case 'circuit':
      return panel === undefined
        ? undefined
        : { ...blankCircuit({ id, orderKey, panelId: panel }), ...fields };
    case 'breaker':
      return circuit === undefined
        ? undefined
        : { ...blankBreaker({ id, circuitId: circuit, space: 1 }), ...fields };
    case 'run':
      return bus === undefined
        ? undefined
        : {
            ...blankRun({
              ...common,
              kind: 'branch',
              fromBusId: bus,
              toBusId: otherBus!,
              conductors: ['L1'],
            }),
            circuitId: maybeCircuit,
            ...fields,
          };
    case 'transformer':
      return bus === undefined
        ? undefined
        : {
            ...blankTransformer({
              ...common,
              fromBusId: bus,
              toBusId: otherBus!,
              connection: 'delta-wye',
              system: '3ph-4w',
            }),
            ...fields,
          };
    case 'load':
      return {
        ...blankLoad({ ...common, terminals: 'L1-N', busId: bus ?? null, circuitId: maybeCircuit }),
        ...fields,
      };
    case 'conductor':
      return {
        id,
        name: code,
        material: 'copper',
        areaMm2: '10',
        r: '1',
        x: '0',
        per: 'km',
        temperature: '20',
        ampacity: null,
        source: 'maker',
        ...fields,
      } as Row<'conductor'>;
    case 'reading':
      return bus === undefined
        ? undefined
        : {
            id,
            busId: bus,
            terminals: 'L1-N',
            volts: '1',
            amps: null,
            at: '2026-11-03T09:20:00Z',
            ...fields,
          };
    case 'draft':
      return { id, table: 'run', rowId: id, field: 'size', text: '', ...fields } as Row<'draft'>;
  }
}

const isReferredTo = (rows: JobRows, table: JobTable, id: string): boolean =>
  (Object.entries(REFERENCES) as [JobTable, Record<string, JobTable>][]).some(([from, fields]) =>
    Object.entries(fields).some(
      ([field, target]) => target === table && rowsWhere(rows, from, field as never, id).length > 0,
    ),
  );

/** The operation of a step upon `rows`, valid there; null where the step has nothing to work on. */
export function opOfStep(rows: JobRows, step: Step): EditOp | null {
  if (step.kind === 'insert') {
    const row = freshRow(rows, step);
    return row === undefined ? null : { table: step.table, row: row.id, was: null, set: { ...row } };
  }
  const row = pickFrom([...rows[step.table].values()], step.pick) as
    | ({ id: string } & Record<string, unknown>)
    | undefined;
  if (row === undefined) return null;
  if (step.kind === 'delete')
    return step.table === 'job' || isReferredTo(rows, step.table, row.id)
      ? null
      : { table: step.table, row: row.id, was: { ...row }, set: null };
  const was = Object.fromEntries(Object.keys(step.fields).map((field) => [field, row[field]]));
  return { table: step.table, row: row.id, was, set: { ...step.fields } };
}

export function applyOpFreely(rows: JobRows, op: EditOp): JobRows {
  const table = new Map(rows[op.table] as ReadonlyMap<string, unknown>);
  if (op.set === null) table.delete(op.row);
  else table.set(op.row, { ...(table.get(op.row) ?? {}), ...op.set });
  return { ...rows, [op.table]: table };
}

/** Operations, each valid upon the rows that the ones before it leave. */
function opsOfSteps(rows: JobRows, steps: readonly Step[]): EditOp[] {
  const ops: EditOp[] = [];
  let now = rows;
  for (const step of steps) {
    const op = opOfStep(now, step);
    if (op === null) continue;
    ops.push(op);
    now = applyOpFreely(now, op);
  }
  return ops;
}

export function emptyRows(jobId: string = newId()): JobRows {
  const rows = Object.fromEntries(JOB_TABLE_NAMES.map((table) => [table, new Map()])) as unknown as JobRows;
  const job = blankJob({ id: jobId, name: 'Job', lengthUnit: 'ft', wireUnit: 'awg' });
  return { ...rows, job: new Map([[jobId, job]]) };
}

const GROWING: readonly JobTable[] = JOB_TABLE_NAMES.filter((table) => table !== 'job');

export const randomRows: fc.Arbitrary<JobRows> = fc
  .tuple(
    fc.uuid({ version: 4 }),
    ...(['bus', 'bus', 'panel', 'circuit', 'run', 'load'] as const).map((table) =>
      stepOf(['insert'], [table]),
    ),
    fc.array(stepOf(['insert'], GROWING), { maxLength: 20 }),
  )
  .map(([jobId, ...rest]) => {
    let rows = emptyRows(jobId as string);
    for (const op of opsOfSteps(rows, rest.flat() as Step[])) rows = applyOpFreely(rows, op);
    return rows;
  });

/** Rows and an edit that is valid upon them. */
export const rowsAndEdit = (editId: string = newId()) =>
  fc
    .tuple(
      randomRows,
      fc.array(stepOf(['insert', 'update', 'update', 'delete'], JOB_TABLE_NAMES), {
        minLength: 1,
        maxLength: 12,
      }),
    )
    .map(([rows, steps]) => ({ rows, edit: { editId, label: 'random edit', ops: opsOfSteps(rows, steps) } }))
    .filter(({ edit }) => edit.ops.length > 0);

/** Rows as lists in the order of their ids: two jobs are the same when these are equal. */
export function inIdOrder(lists: JobRowLists): JobRowLists {
  const sorted = Object.entries(lists).map(([table, list]) => [
    table,
    [...(list as { id: string }[])].sort((a, b) => (a.id < b.id ? -1 : 1)),
  ]);
  return Object.fromEntries(sorted) as JobRowLists;
}
