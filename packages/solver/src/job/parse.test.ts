import { describe, expect, it } from 'vitest';
import { parseJob } from './parse.ts';
import type { JobFile } from './schema.ts';

const LINES = ['L1', 'L2', 'L3', 'N'] as const;
const base = () => ({
  format: 'farlug-job/1' as const,
  name: 'Mill',
  lengthUnit: 'ft' as const,
  sources: [{ id: 's', bus: 'S', system: '3ph-4w', volts: 208 }] as JobFile['sources'],
  runs: [
    { id: 'F1', kind: 'feeder', from: 'S', to: 'P', length: 100, conductors: [...LINES], size: '3/0' },
    { id: 'B1', kind: 'branch', from: 'P', to: 'E', length: 80, conductors: ['L1', 'N'], size: '12' },
  ] as NonNullable<JobFile['runs']>,
  loads: [{ id: 'l', bus: 'E', terminals: 'L1-N', amps: 12, powerFactor: 0.9 }] as NonNullable<
    JobFile['loads']
  >,
  transformers: [] as NonNullable<JobFile['transformers']>,
});
type Base = ReturnType<typeof base>;

const problems = (change: (job: Base) => unknown): Record<string, string> => {
  const job = base();
  change(job);
  const outcome = parseJob(job);
  return outcome.ok ? {} : Object.fromEntries(outcome.problems.map((p) => [p.path, p.message]));
};
const delta = (t: object) => ({
  id: 'T',
  from: 'P',
  to: 'Q',
  kva: 45,
  primaryVolts: 208,
  secondaryVolts: 240,
  connection: 'delta-delta',
  percentZ: 4,
  xOverR: 2,
  system: '3ph-3w',
  ...t,
});

describe('a good job', () => {
  it('comes back with defaults filled in and sizes in canonical form', () => {
    const outcome = parseJob(base());
    if (!outcome.ok) throw new Error(JSON.stringify(outcome.problems));
    expect(outcome.job).toMatchObject({ frequency: 60, basis: 'impedance', angle: 'nominal' });
    expect(outcome.job.runs.map((run) => run.size)).toEqual(['3/0 AWG', '12 AWG']);
    expect(outcome.warnings).toEqual([]);
  });
  it('takes null as absent and either order of a pair', () => {
    const job = base();
    const outcome = parseJob({
      ...job,
      limits: null,
      buses: null,
      loads: [{ ...job.loads[0], terminals: 'N-L1', demandVa: null }],
    });
    expect(outcome.ok && outcome.job.loads[0]!.terminals).toBe('L1-N');
  });
  it('leaves to the solver a load at a bus without a path', () => {
    expect(
      problems((job) =>
        job.loads.push({ id: 'm', bus: 'nowhere', terminals: 'L1-N', amps: 1, powerFactor: 1 }),
      ),
    ).toEqual({});
  });
});

describe('refusals name the place, what is wrong and what would be right', () => {
  const cases: [string, (job: Base) => unknown, Record<string, string | RegExp>][] = [
    [
      'negative length',
      (j) => Object.assign(j.runs[0]!, { length: -1 }),
      { 'runs[0].length': 'must be ≥ 0' },
    ],
    [
      'NaN',
      (j) => Object.assign(j.runs[0]!, { length: Number.NaN }),
      { 'runs[0].length': /must be a number/ },
    ],
    ['an unknown key', (j) => Object.assign(j.runs[1]!, { colour: 1 }), { 'runs[1].colour': /not a key/ }],
    [
      'a wrong word',
      (j) => Object.assign(j.runs[1]!, { raceway: 'tube' }),
      { 'runs[1].raceway': /must be one of pvc, aluminum, steel, cable; is "tube"/ },
    ],
    [
      'a missing key',
      (j) => delete (j as Partial<Base>).lengthUnit,
      { lengthUnit: /must be one of ft, m; is missing/ },
    ],
    ['two sizes of a load', (j) => Object.assign(j.loads[0]!, { kw: 1 }), { 'loads[0]': /exactly one of/ }],
    [
      'duplicate ids',
      (j) => Object.assign(j.runs[1]!, { id: 'F1' }),
      { 'runs[1].id': /runs\[0\] has it already/ },
    ],
    [
      'a run to itself',
      (j) => Object.assign(j.runs[1]!, { to: 'P' }),
      { 'runs[1].to': /another bus/, 'loads[0].terminals': '' },
    ],
    [
      'an unknown size',
      (j) => Object.assign(j.runs[1]!, { size: '11' }),
      { 'runs[1].size': /12 AWG and 10 AWG/ },
    ],
    ['no size', (j) => Object.assign(j.runs[1]!, { size: null }), { 'runs[1].size': /is missing/ }],
    [
      'size and ohms',
      (j) => Object.assign(j.runs[1]!, { ohms: { r: 1, per: 'km' } }),
      { 'runs[1].size': /state one of the two/ },
    ],
    [
      'fault and impedance',
      (j) => Object.assign(j.sources[0]!, { fault: { amps: 1e4 }, impedance: { r: 0.1 } }),
      { 'sources[0].fault': /state one/ },
    ],
    [
      'a terminal not there',
      (j) => Object.assign(j.loads[0]!, { terminals: 'L2-N' }),
      { 'loads[0].terminals': /bus "E" has no L2, it has L1, N/ },
    ],
    [
      'three-phase on a pair',
      (j) => Object.assign(j.loads[0]!, { terminals: 'three-phase' }),
      { 'loads[0].terminals': /no L2 and no L3/ },
    ],
    [
      'a conductor not there',
      (j) => Object.assign(j.sources[0]!, { system: '3ph-3w' }),
      {
        'runs[0].conductors': /N is neither at "S" nor at "P"/,
        'runs[1].conductors': /N/,
        'loads[0].terminals': /no N, it has L1/,
      },
    ],
    [
      'along no run',
      (j) => Object.assign(j.loads[0]!, { bus: null, along: 'B9' }),
      { 'loads[0].along': /no run is called/ },
    ],
    [
      'along a feeder',
      (j) => Object.assign(j.loads[0]!, { bus: null, along: 'F1' }),
      { 'loads[0].along': /"F1" is a feeder/ },
    ],
    [
      'direct current at 60 Hz',
      (j) => Object.assign(j.sources[0]!, { system: 'dc-2w', volts: 48 }),
      { 'sources[0].system': /must not be dc-2w at 60 Hz/ },
    ],
    [
      'three-phase at 0 Hz',
      (j) => Object.assign(j, { frequency: 0 }),
      { 'sources[0].system': /must be dc-2w at frequency 0/ },
    ],
    [
      'hp between columns',
      (j) =>
        Object.assign(j.sources[0]!, { volts: 480 }) && Object.assign(j.loads[0]!, { amps: null, hp: 1 }),
      { 'loads[0].hp': /no column for 277.1 V/ },
    ],
    [
      'contradicting limits',
      (j) => Object.assign(j, { limits: { lowestVolts: { low: 3 }, rating: { low: 110, high: 90 } } }),
      { 'limits.lowestVolts.low': /nominal volts/, 'limits.rating.low': /must be < high/ },
    ],
    [
      'operating without an ampacity',
      (j) => Object.assign(j.runs[1]!, { size: '4 mm2', temperature: 'operating' }),
      { 'runs[1].temperature': /installation method is not stated/ },
    ],
    [
      'a panel nobody names',
      (j) =>
        Object.assign(j, {
          panels: [{ bus: 'X', spaces: 4, lines: ['L1'], circuits: [{ spaces: [5], run: 'B7' }] }],
        }),
      {
        'panels[0].bus': /nothing names "X"/,
        'panels[0].circuits[0].run': /B7/,
        'panels[0].circuits[0].spaces': /≤ 4/,
      },
    ],
    [
      'systems that differ in volts',
      (j) => j.sources.push({ id: 'g', bus: 'P', system: '3ph-4w', volts: 240 }),
      { 'sources[1].bus': /"P" is 3ph-4w at 208 V, this source is 3ph-4w at 240 V/ },
    ],
    [
      'systems that differ in angle',
      (j) =>
        j.sources.push({ id: 'g', bus: 'G', system: '1ph-3w', volts: 240 }) &&
        j.runs.push({
          id: 'x',
          kind: 'feeder',
          from: 'P',
          to: 'G',
          length: 1,
          conductors: ['L1', 'L2', 'N'],
          size: '4',
        }),
      { 'sources[1].bus': /"G" is 3ph-4w at 208 V, this source is 1ph-3w at 240 V: L1-L2/ },
    ],
    [
      'a run between the two sides of a transformer',
      (j) => {
        j.transformers.push(
          delta({ from: 'S', connection: 'delta-wye', system: '3ph-4w', secondaryVolts: 208 }) as never,
        );
        j.runs.push({
          id: 'x',
          kind: 'feeder',
          from: 'P',
          to: 'Q',
          length: 1,
          conductors: [...LINES],
          size: '4',
        });
      },
      { 'runs[2].to': /"P" is 3ph-4w at 208 V, "Q" is 3ph-4w at 208 V: L1-L2 differs in angle/ },
    ],
    [
      'wye–wye without N',
      (j) => j.transformers.push(delta({ connection: 'wye-wye', system: '3ph-3w' }) as never),
      { 'transformers[0].system': /wye-wye needs a neutral on both sides/ },
    ],
    [
      'wye–wye on a bus without N',
      (j) =>
        Object.assign(j.runs[0]!, { conductors: ['L1', 'L2', 'L3'] }) &&
        Object.assign(j.loads[0]!, { terminals: 'L1-L2' }) &&
        Object.assign(j.runs[1]!, { conductors: ['L1', 'L2'] }) &&
        j.transformers.push(delta({ connection: 'wye-wye', system: '3ph-4w' }) as never),
      { 'transformers[0].from': /wye-wye needs a neutral on both sides/ },
    ],
    [
      'a single-phase unit without its pair',
      (j) => j.transformers.push(delta({ connection: 'single-phase', system: '1ph-3w' }) as never),
      { 'transformers[0].primary': /such as L1-L2/ },
    ],
    [
      'a primary off its bus',
      (j) => j.transformers.push(delta({ primaryVolts: 480 }) as never),
      { 'transformers[0].primaryVolts': /within 10 % of the 208 V/ },
    ],
    [
      'a 30° clash between two ways',
      (j) => j.transformers.push(delta({}) as never, delta({ id: 'U', connection: 'wye-delta' }) as never),
      { 'transformers[1].to': /differs in angle/ },
    ],
    [
      'diversity in a ring',
      (j) =>
        j.runs.push({
          id: 'F2',
          kind: 'feeder',
          from: 'S',
          to: 'P',
          length: 9,
          conductors: [...LINES],
          size: '3/0',
          demand: 0.8,
        }),
      { 'runs[2].demand': /part of a loop/ },
    ],
    [
      'diversity between two sources',
      (j) =>
        j.sources.push({ id: 'g', bus: 'P', system: '3ph-4w', volts: 208 }) &&
        Object.assign(j.runs[0]!, { demand: 0.8 }),
      { 'runs[0].demand': /fed from both ends/ },
    ],
  ];
  it.each(cases)('%s', (_, change, expected) => {
    const found = problems(change);
    const wanted = Object.entries(expected).filter(([, message]) => message !== '');
    for (const [path, message] of wanted) expect(found[path], JSON.stringify(found)).toMatch(message);
    expect(Object.keys(found).sort()).toEqual(wanted.map(([path]) => path).sort());
  });

  it('tells every problem, also beside an entry that cannot be read', () => {
    const found = problems((job) => {
      Object.assign(job.runs[0]!, { length: 'far' });
      Object.assign(job.runs[1]!, { size: '11' });
      Object.assign(job.loads[0]!, { demand: 9 });
      job.loads.push({ id: 'l', bus: 'E', terminals: 'L1-N', amps: 1 });
    });
    expect(Object.keys(found).sort()).toEqual([
      'loads[0].demand',
      'loads[1].id',
      'runs[0].length',
      'runs[1].size',
    ]);
  });
  it.each([null, 3, 'text', [], {}])('refuses %j as a whole', (json) =>
    expect(parseJob(json).ok).toBe(false),
  );
  it('allows diversity on a radial feeder, also where the source lies beyond its "to"', () => {
    expect(problems((job) => Object.assign(job.runs[0]!, { from: 'P', to: 'S', demand: 0.8 }))).toEqual({});
  });
});

describe('warnings', () => {
  const warnings = (change: (job: Base) => unknown) => {
    const job = base();
    change(job);
    const outcome = parseJob(job);
    return outcome.ok ? outcome.warnings : outcome.problems;
  };
  it('say which power factors are assumed', () => {
    expect(warnings((job) => Object.assign(job.loads[0]!, { powerFactor: null }))).toEqual([
      { at: 'loads[0].powerFactor', text: 'no power factor is stated: 1 is assumed' },
    ]);
    const motor = warnings((job) =>
      Object.assign(job.loads[0]!, { powerFactor: null, amps: null, hp: 0.75 }),
    );
    expect(motor).toEqual([{ at: 'loads[0].powerFactor', text: expect.stringContaining('0.85') }]);
  });
  it('say which table values are estimated', () => {
    const found = warnings((job) => Object.assign(job.runs[0]!, { size: '700 kcmil' }));
    expect(found).toEqual([
      { at: 'runs[0].size', text: expect.stringContaining('not in Chapter 9 Table 9') },
    ]);
  });
  it('are silent about power factors on direct current', () => {
    const outcome = parseJob({
      ...base(),
      frequency: 0,
      sources: [{ id: 's', bus: 'S', system: 'dc-2w', volts: 48 }],
      runs: [{ id: 'B1', kind: 'branch', from: 'S', to: 'E', length: 8, conductors: ['L1', 'N'], size: '6' }],
      loads: [{ id: 'l', bus: 'E', terminals: 'L1-N', watts: 100 }],
    });
    expect(outcome.ok && outcome.warnings).toEqual([]);
  });
});
