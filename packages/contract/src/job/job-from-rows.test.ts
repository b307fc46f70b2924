import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { randomRows } from '../../test/random-rows.ts';
import { workshop } from '../../test/workshop.ts';
import { newId } from '../edit/index.ts';
import type { JobRows, JobTable, Row } from '../rows/index.ts';
import { blankBus, blankRun } from './blank-rows.ts';
import { jobFromRows } from './job-from-rows.ts';
import { rowAtPath } from './job-index.ts';

const byCode = <T extends 'run' | 'load' | 'transformer' | 'source' | 'bus'>(
  rows: JobRows,
  table: T,
  code: string,
): Row<T> => {
  for (const row of rows[table].values() as Iterable<Row<T>>) if (row.code === code) return row;
  throw new Error(`no ${table} ${code}`);
};
const put = <T extends JobTable>(rows: JobRows, table: T, row: Row<T>): JobRows => ({
  ...rows,
  [table]: new Map(rows[table] as ReadonlyMap<string, Row<T>>).set(row.id, row),
});
const change = <T extends 'run' | 'load' | 'transformer' | 'source'>(
  rows: JobRows,
  table: T,
  code: string,
  changes: Partial<Row<T>>,
) => put(rows, table, { ...byCode(rows, table, code), ...changes });
const said = (rows: JobRows) =>
  jobFromRows(rows)
    .leftOut.filter((one) => !one.follows)
    .map(({ table, code, field, reason }) => [table, code, field, reason]);

describe('what is left out', () => {
  test.each([
    ['run', 'LP-1-1', { length: null }, 'length', 'The length is missing.'],
    ['run', 'LP-1-1', { size: null }, 'size', 'The size of the conductors is missing.'],
    ['run', 'LP-1-1', { size: '13 AWG' }, 'size', /size in the tables/],
    ['load', 'LP-1-1', { size: null }, 'size', 'The load is missing.'],
    ['load', 'LP-1-1', { busId: null }, 'busId', 'The load is at no point.'],
    ['load', 'LP-1-1', { terminals: 'L1-L2' }, 'terminals', /LP-1-1-end/],
    ['load', 'LP-1-1', { size: '3.3 hp' }, 'size', /430\.248/],
    ['load', 'LP-1-1', { powerFactor: '1.4' }, 'powerFactor', /≤ 1/],
    [
      'load',
      'LP-1-1',
      { startingAmps: '40' },
      'startingPowerFactor',
      'The starting power factor is missing.',
    ],
  ] as const)('%s %s with %j is named with its field', (table, code, changes, field, reason) => {
    const rows = change(workshop(), table, code, changes as never);
    const { job, leftOutCount } = jobFromRows(rows);
    expect(said(rows)).toEqual([
      [table, code, field, typeof reason === 'string' ? reason : expect.stringMatching(reason)],
    ]);
    expect(leftOutCount).toBe(1);
    expect(job.loads.map((load) => load.id)).not.toContain(code);
    expect(job.loads).toHaveLength(8);
  });

  test('a transformer without its impedance takes along what it feeds, and nothing else', () => {
    const rows = change(workshop(), 'transformer', 'T1', { percentZ: null });
    const { job, leftOut, problems } = jobFromRows(rows);
    expect(said(rows)).toEqual([
      ['transformer', 'T1', 'percentZ', 'The percent impedance is missing: read it off the nameplate.'],
    ]);
    expect(job.runs.map((run) => run.id)).toEqual(['S1', 'F1']);
    expect(job.loads).toEqual([]);
    expect(problems).toEqual([]);
    expect(leftOut.filter((one) => one.table === 'load')).toHaveLength(9);
  });

  test('what follows a missing length of its own circuit says that reason', () => {
    const rows = change(workshop(), 'run', 'LP-1-7', { length: null });
    const follows = jobFromRows(rows).leftOut.filter((one) => one.follows);
    expect(follows.map((one) => one.code)).toEqual(['LP-1-7.2', 'LP-1-7a', 'LP-1-7b']);
    expect(new Set(follows.map((one) => one.reason))).toEqual(new Set(['The length is missing.']));
  });

  test('a ring with one segment missing is still fed from its other end', () => {
    const rows = change(workshop(), 'run', 'LP-1-13.3', { length: null });
    const { job, leftOutCount } = jobFromRows(rows);
    expect(leftOutCount).toBe(1);
    expect(job.loads.map((load) => load.id)).toContain('LP-1-13b');
  });

  test('text that was not understood leaves its row out', () => {
    const rows = workshop();
    const run = byCode(rows, 'run', 'LP-1-1');
    const drafted = put(rows, 'draft', {
      id: newId(),
      table: 'run',
      rowId: run.id,
      field: 'length',
      text: '12O ft',
    });
    expect(said(drafted)).toEqual([['run', 'LP-1-1', 'length', '“12O ft” is not understood.']]);
  });

  test('a draft of a row that is gone counts for nothing', () => {
    const rows = put(workshop(), 'draft', {
      id: newId(),
      table: 'run',
      rowId: newId(),
      field: 'length',
      text: 'x',
    });
    expect(jobFromRows(rows).leftOut).toEqual([]);
  });

  test('a run of no length needs no size', () => {
    const rows = change(workshop(), 'run', 'F2', { length: '0 ft', size: null });
    expect(jobFromRows(rows).leftOut).toEqual([]);
  });

  test('a point that nothing feeds is not in the job, and a run beyond it is left out', () => {
    let rows = workshop();
    const far = blankBus({ id: newId(), code: 'far', orderKey: 'z' });
    const farther = blankBus({ id: newId(), code: 'farther', orderKey: 'zz' });
    rows = put(put(rows, 'bus', far), 'bus', farther);
    const run = blankRun({
      id: newId(),
      code: 'X',
      orderKey: 'z',
      kind: 'feeder',
      fromBusId: far.id,
      toBusId: farther.id,
      conductors: ['L1', 'N'],
      length: '10 ft',
      size: '12 AWG',
    });
    const { job, leftOut } = jobFromRows(put(rows, 'run', run));
    expect(job.buses.map((bus) => bus.id)).not.toContain('far');
    expect(leftOut).toMatchObject([
      { code: 'X', follows: true, reason: 'No complete run leads from a source to it.' },
    ]);
  });

  test('a supply that its frequency does not allow is named', () => {
    const rows = workshop();
    const job = [...rows.job.values()][0]!;
    expect(said(put(rows, 'job', { ...job, frequency: '0' }))).toEqual([
      ['source', 'utility', 'system', expect.stringMatching(/dc-2w/)],
    ]);
  });

  test('what no row of the network can be blamed for is a problem of the job', () => {
    const rows = workshop();
    const limit = [...rows.limit.values()].find((one) => one.kind === 'feeder')!;
    const { problems, leftOut } = jobFromRows(put(rows, 'limit', { ...limit, value: '-3' }));
    expect(problems).toEqual([{ path: 'limits.feeder', message: 'must be ≥ 0' }]);
    expect(leftOut).toEqual([]);
  });

  test('whatever the rows hold, the job is built and every row is in it or left out', () => {
    fc.assert(
      fc.property(randomRows, (rows) => {
        const { job, leftOut, index } = jobFromRows(rows);
        const out = new Set(leftOut.map((one) => `${one.table} ${one.row}`));
        for (const id of rows.run.keys()) expect(index.runs.includes(id) !== out.has(`run ${id}`)).toBe(true);
        for (const id of rows.load.keys())
          expect(index.loads.includes(id) !== out.has(`load ${id}`)).toBe(true);
        expect(job.runs).toHaveLength(index.runs.length);
      }),
    );
  });
});

describe('what the job is made of', () => {
  test('lengths are converted in decimals, from the unit that was typed', () => {
    const length = (text: string) => {
      const { job } = jobFromRows(change(workshop(), 'run', 'LP-1-1', { length: text }));
      return job.runs.find((run) => run.id === 'LP-1-1')!.length;
    };
    // 1 ft = 0.3048 m exactly (international foot, 1959), 1 mi = 5280 ft.
    expect(length('120 ft')).toBe(120);
    expect(length('0.3048 m')).toBe(1);
    expect(length('36.576 m')).toBe(120);
    expect(length('36 m')).toBe(118.11023622047244);
    expect(length('0.1 mi')).toBe(528);
    expect(length('18 in')).toBe(1.5);
    expect(length('40 yd')).toBe(120);
  });

  test('loads keep the unit that they were typed in; kVA is VA', () => {
    const load = (size: string) => {
      const { job } = jobFromRows(change(workshop(), 'load', 'LP-1-1', { size }));
      const { amps, va, watts, kw, hp } = job.loads.find((one) => one.id === 'LP-1-1')!;
      return { amps, va, watts, kw, hp };
    };
    const none = { amps: null, va: null, watts: null, kw: null, hp: null };
    expect(load('16 A')).toEqual({ ...none, amps: 16 });
    expect(load('2.4 kVA')).toEqual({ ...none, va: 2400 });
    expect(load('1.1 kVA')).toEqual({ ...none, va: 1100 });
    expect(load('0.75 hp')).toEqual({ ...none, hp: 0.75 });
    expect(load('-640 W')).toEqual({ ...none, watts: -640 });
  });

  test('the runs of a circuit have its breaker and its spaces', () => {
    const { job } = jobFromRows(workshop());
    for (const id of ['LP-1-13', 'LP-1-13.2', 'LP-1-13.3'])
      expect(job.runs.find((run) => run.id === id)).toMatchObject({
        breaker: { amps: 20, poles: 1 },
        circuit: '13',
      });
  });

  test('what nobody stated is listed as assumed', () => {
    let rows = workshop();
    rows = change(rows, 'run', 'LP-1-1', { raceway: null, lengthState: 'assumed' });
    rows = change(rows, 'load', 'LP-1-1', { sizeAssumed: true, powerFactorAssumed: true });
    rows = change(rows, 'load', 'LP-1-9', { powerFactor: null });
    expect(jobFromRows(rows).assumed.map(({ code, field, value }) => [code, field, value])).toEqual([
      ['LP-1-1', 'length', '85 ft'],
      ['LP-1-1', 'raceway', 'pvc'],
      ['LP-1-1', 'size', '12 A'],
      ['LP-1-1', 'powerFactor', '0.9'],
      ['LP-1-9', 'powerFactor', '1'],
    ]);
  });

  test('the index leads from the job back to the rows', () => {
    const rows = workshop();
    const { job, index } = jobFromRows(rows);
    job.runs.forEach((run, i) => {
      const at = rowAtPath(index, `runs[${i}].neutralSize`)!;
      expect(rows.run.get(at.row)?.code).toBe(run.id);
      expect(at.field).toBe('neutralSize');
      expect(index.runByCode.get(run.id)?.row).toBe(at.row);
    });
    const placed = index.loadByCode.get('LP-1-7b')!;
    expect(rows.circuit.get(placed.circuitId!)?.description).toBe('Two taps');
    expect(rows.bus.get(rows.panel.get(placed.panelId!)!.busId)?.code).toBe('LP-1');
    expect(rowAtPath(index, 'frequency')).toBeNull();
    expect(rowAtPath(index, 'panels[1].circuits[0].spaces')).toMatchObject({
      table: 'circuit',
      field: 'spaces',
    });
  });
});
