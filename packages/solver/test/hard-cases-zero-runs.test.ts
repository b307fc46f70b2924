import type { JobFile, Solution } from '@farlug/solver/job';
import { describe, expect, it } from 'vitest';
import { jobFile, type LoadFile, ohmRun, type RunFile } from './support/job-file.ts';
import { solveProduct } from './support/solvers.ts';

/**
 * A run of no length makes one place of its two ends: every load has the volts that it has where the two buses are drawn
 * as one. Both are solved; they differ by rounding alone, some 10⁻¹⁵ of the volts.
 */
const WIRES: RunFile['conductors'] = ['L1', 'L2', 'L3', 'N'];
const VOLTS = 480;
const CLOSE = 1e-12 * VOLTS;

const feeder = (id: string, from: string, to: string, ohms: number): RunFile =>
  ohmRun(id, from, to, WIRES, ohms, ohms / 2, { kind: 'feeder', neutral: { r: 2 * ohms } });
const branch = (id: string, from: string, to: string, ohms: number): RunFile =>
  ohmRun(id, from, to, WIRES, ohms, ohms / 3);
const none = (id: string, from: string, to: string, kind: RunFile['kind'] = 'branch'): RunFile => ({
  ...branch(id, from, to, 0.2),
  kind,
  length: 0,
});

const loads = (...buses: string[]): LoadFile[] =>
  buses.flatMap((bus, k) => [
    { id: `${bus} one`, bus, terminals: 'L1-N' as const, amps: 11 + 3 * k, powerFactor: 0.9 },
    { id: `${bus} two`, bus, terminals: 'L2-L3' as const, amps: 7 + k, powerFactor: 0.8 },
    { id: `${bus} three`, bus, terminals: 'three-phase' as const, amps: 20, powerFactor: 0.85 },
  ]);
/** The service and two panels, P with a ring out to three taps; Q hangs on P. */
const building = (more: Partial<JobFile> & { runs: RunFile[] }): JobFile =>
  jobFile({
    sources: [{ id: 's', bus: 'S', system: '3ph-4w', volts: VOLTS, impedance: { r: 0.01, x: 0.03 } }],
    limits: { feeder: 3, branch: 3, total: 5 },
    buses: [
      { id: 'P', kind: 'panel' },
      { id: 'Q', kind: 'panel' },
    ],
    loads: loads('P', 'Q', '1', '2', '3'),
    ...more,
  });
const ring = [
  branch('r1', 'P', '1', 0.06),
  branch('r2', '1', '2', 0.11),
  branch('r3', '2', '3', 0.05),
  branch('r4', '3', 'P', 0.09),
];
const plain = building({ runs: [feeder('f', 'S', 'P', 0.05), feeder('g', 'P', 'Q', 0.08), ...ring] });

/** Buses of `job` under the names of those that they are one with. */
const merged = (job: JobFile, into: Record<string, string>): JobFile => {
  const at = (id: string) => into[id] ?? id;
  return {
    ...job,
    buses: job.buses!.filter(({ id }) => at(id) === id),
    sources: job.sources.map((source) => ({ ...source, bus: at(source.bus) })),
    runs: job
      .runs!.map((run) => ({ ...run, from: at(run.from), to: at(run.to) }))
      .filter(({ from, to }) => from !== to),
    loads: job.loads!.map((load) => ({ ...load, bus: at(load.bus!) })),
  };
};

const sameVolts = (one: Solution, other: Solution, into: Record<string, string> = {}) => {
  for (const load of other.loads) {
    const twin = one.loads.find(({ id }) => id === load.id)!;
    expect(Math.abs(twin.volts! - load.volts!), load.id).toBeLessThan(CLOSE);
    expect(Math.hypot(...twin.thevenin!) / Math.hypot(...load.thevenin!)).toBeCloseTo(1, 11);
    expect(twin.verdict).toBe(load.verdict);
  }
  for (const bus of one.buses) {
    const twin = other.buses.find(({ id }) => id === (into[bus.id] ?? bus.id))!;
    for (const [c, [re, im]] of Object.entries(bus.phasors!)) {
      const [re2, im2] = twin.phasors![c as 'L1']!;
      expect(Math.hypot(re - re2, im - im2), `${bus.id} ${c}`).toBeLessThan(CLOSE);
    }
  }
  expect(Math.abs(one.totals.lossWatts / other.totals.lossWatts - 1)).toBeLessThan(1e-12);
  expect(one.totals.kclResidual).toBeLessThan(1e-9);
};
const sameAs = (job: JobFile, into: Record<string, string>) => {
  for (const scenario of ['design', 'everything-on'] as const)
    sameVolts(solveProduct(job, scenario), solveProduct(merged(job, into), scenario), into);
};

describe('runs of no length', () => {
  it('at the source', () => {
    const runs = [none('z', 'S', 'S2', 'service'), feeder('f', 'S2', 'P', 0.05), ...plain.runs!.slice(1)];
    sameAs(building({ runs }), { S2: 'S' });
  });

  it('at an ideal source: its bus and the next stand at its EMF', () => {
    const sources: JobFile['sources'] = [{ id: 's', bus: 'S', system: '3ph-4w', volts: VOLTS }];
    const runs = [none('z', 'S', 'S2', 'service'), feeder('f', 'S2', 'P', 0.05), ...plain.runs!.slice(1)];
    const job = building({ sources, runs });
    sameAs(job, { S2: 'S' });
    expect(solveProduct(job, 'design').buses.find(({ id }) => id === 'S2')!.volts!['L1-L2']).toBeCloseTo(
      480,
      10,
    );
  });

  it('at a panel, before it and behind it', () => {
    const runs = [
      feeder('f', 'S', 'P0', 0.05),
      none('z', 'P0', 'P', 'feeder'),
      none('y', 'P', 'P1', 'feeder'),
      feeder('g', 'P1', 'Q', 0.08),
      ...ring,
    ];
    sameAs(building({ runs }), { P0: 'P', P1: 'P' });
  });

  it('on a tap, several in a row', () => {
    const runs = [...plain.runs!, none('z', '2', '2a'), none('y', '2a', '2b'), none('x', '2b', '2c')];
    sameAs(building({ runs, loads: [...plain.loads!, ...loads('2a', '2c')] }), {
      '2a': '2',
      '2b': '2',
      '2c': '2',
    });
  });

  it('that close a ring, and rings of nothing else', () => {
    const open = plain.runs!.map((run) => (run.id === 'r4' ? { ...run, to: 'P9' } : run));
    sameAs(building({ runs: [...open, none('z', 'P9', 'P')] }), { P9: 'P' });
    const runs = [
      ...plain.runs!,
      none('z1', '3', '3a'),
      none('z2', '3a', '3b'),
      none('z3', '3b', '3'),
      none('z4', '3', '3b'),
    ];
    sameAs(building({ runs, loads: [...plain.loads!, ...loads('3b')] }), { '3a': '3', '3b': '3' });
  });

  it('across runs that have ohms: these carry nothing', () => {
    const job = building({ runs: [...plain.runs!, none('z', '1', '2')] });
    sameAs(job, { '2': '1' });
    const solution = solveProduct(job, 'design');
    const bridged = solution.runs.find(({ id }) => id === 'r2')!;
    expect(bridged.dropVolts ?? 0).toBe(0);
    expect(bridged.lossWatts ?? 0).toBe(0);
  });

  it('between two panels that share a ring', () => {
    const runs = [
      feeder('f', 'S', 'P', 0.05),
      none('tie', 'P', 'Q', 'feeder'),
      ...ring.map((run) => (run.id === 'r4' ? { ...run, to: 'Q' } : run)),
    ];
    sameAs(building({ runs }), { Q: 'P' });
  });

  it('between loads that follow the voltage, at both of its ends', () => {
    const follow = (list: LoadFile[]): LoadFile[] =>
      list.map((load, k) => ({ ...load, behaviour: (['power', 'impedance', 'current'] as const)[k % 3]! }));
    const runs = [...plain.runs!, none('z', '1', '1a'), none('y', 'Q', 'Q1', 'feeder')];
    const job = building({ runs, loads: follow([...plain.loads!, ...loads('1a', 'Q1')]) });
    sameAs({ ...job, angle: 'local' }, { '1a': '1', Q1: 'Q' });
  });

  it('of two wires alone: they join no other conductor', () => {
    // L1 and N of 3 and 3a are one; L2 and L3 of 3a come by their own way.
    const wires = (run: RunFile): RunFile => ({ ...run, conductors: ['L1', 'N'] });
    const others = { ...branch('o', '3', '3a', 0.07), conductors: ['L2', 'L3'] as RunFile['conductors'] };
    const runs = [...plain.runs!, wires(none('z', '3', '3a')), others];
    const solution = solveProduct(building({ runs, loads: [...plain.loads!, ...loads('3a')] }), 'design');
    const [one, other] = ['3', '3a'].map((bus) => solution.buses.find(({ id }) => id === bus)!.phasors!);
    expect(other!.L1).toEqual(one!.L1);
    expect(other!.N).toEqual(one!.N);
    expect(other!.L2).not.toEqual(one!.L2);
    expect(solution.totals.kclResidual).toBeLessThan(1e-9);
  });

  it('stated in ohms of nothing, or of no reactance on the resistance basis, are the same', () => {
    const zero = { ...branch('z', '2', '2a', 0), length: 40 };
    const job = building({ runs: [...plain.runs!, zero], loads: [...plain.loads!, ...loads('2a')] });
    sameAs(job, { '2a': '2' });
    const reactive = { ...zero, ohms: { r: 0, x: 0.4, per: 'km' as const } };
    sameAs({ ...job, basis: 'resistance', runs: [...plain.runs!, reactive] }, { '2a': '2' });
  });

  it('cut circuits as drawn: the figures of a circuit that begins behind one are those before it', () => {
    // The branch part is counted from the panel, not from where the run of no length ends: nothing is lost in it.
    const runs = [
      ...plain.runs!.slice(0, 2),
      none('z', 'P', 'P1'),
      ...ring.map((run) => ({
        ...run,
        from: run.from === 'P' ? 'P1' : run.from,
        to: run.to === 'P' ? 'P1' : run.to,
      })),
    ];
    const job = building({ runs });
    const [one, other] = [job, merged(job, { P1: 'P' })].map((each) => solveProduct(each, 'each-circuit'));
    for (const [k, load] of one!.loads.entries()) {
      expect(load.branchPercent).toBeCloseTo(other!.loads[k]!.branchPercent!, 11);
      expect(load.feederPercent).toBeCloseTo(other!.loads[k]!.feederPercent!, 11);
      expect(load.turn).toBe(other!.loads[k]!.turn);
      expect(load.headroomAmps! / (other!.loads[k]!.headroomAmps! || 1)).toBeCloseTo(
        other!.loads[k]!.headroomAmps ? 1 : 0,
        9,
      );
    }
  });
});
