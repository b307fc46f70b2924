import type { JobFile, Phasor, Solution } from '@farlug/solver/job';
import { describe, expect, it } from 'vitest';
import { jobFile, type LoadFile, ohmLoad, ohmRun, type RunFile } from './support/job-file.ts';
import { solveProduct } from './support/solvers.ts';

/**
 * A network with all that is linear: a ring, a neutral of its own size, two transformers one behind the other, impedance
 * loads. What it is asked follows from reciprocity and superposition alone (any text on circuits).
 */
const WIRES: RunFile['conductors'] = ['L1', 'L2', 'L3', 'N'];
const network = (loads: LoadFile[], more: Partial<JobFile> = {}): JobFile =>
  jobFile({
    sources: [{ id: 's', bus: 'S', system: '3ph-3w', volts: 4160, impedance: { r: 0.02, x: 0.3 } }],
    transformers: [
      {
        id: 'big',
        from: 'S',
        to: 'M',
        kva: 500,
        primaryVolts: 4160,
        secondaryVolts: 480,
        connection: 'delta-wye',
        percentZ: 5,
        xOverR: 4,
        system: '3ph-4w',
      },
      {
        id: 'small',
        from: 'M1',
        to: 'T',
        kva: 75,
        primaryVolts: 480,
        secondaryVolts: 208,
        connection: 'delta-wye',
        percentZ: 4,
        xOverR: 2,
        system: '3ph-4w',
      },
    ],
    runs: [
      ohmRun('f', 'M', 'M1', WIRES, 0.02, 0.015, { kind: 'feeder' }),
      ohmRun('g', 'M', 'M2', WIRES, 0.05, 0.02, { kind: 'feeder', neutral: { r: 0.08 } }),
      ohmRun('h', 'M1', 'M2', WIRES, 0.03, 0.01, { kind: 'feeder' }),
      ohmRun('b', 'T', 'B', WIRES, 0.06, 0.01, { neutral: { r: 0.1 } }),
      ohmRun('c', 'M2', 'C', WIRES, 0.09, 0.02),
    ],
    loads: [
      { id: 'heat', bus: 'B', terminals: 'L1-N', ...ohmLoad(6, 1, 208 / Math.sqrt(3)) },
      { id: 'coil', bus: 'C', terminals: 'L2-L3', ...ohmLoad(9, 4, 480) },
      ...loads,
    ],
    ...more,
  });
/** Every load but those given is stamped in both solutions, so that only what is asked changes. */
const drawn = (id: string, bus: string, terminals: LoadFile['terminals'], amps: number): LoadFile => ({
  id,
  bus,
  terminals,
  amps,
  powerFactor: 1,
});
const across = (solution: Solution, bus: string, [a, b]: readonly [string, string]): Phasor => {
  const phasors = solution.buses.find(({ id }) => id === bus)!.phasors!;
  const [x, y] = [phasors[a as 'L1']!, phasors[b as 'L1']!];
  return [x[0] - y[0], x[1] - y[1]];
};
const turned = ([re, im]: Phasor, by: Phasor): Phasor => {
  const size = Math.hypot(...by);
  return [(re * by[0] + im * by[1]) / size, (im * by[0] - re * by[1]) / size];
};

describe('reciprocity', () => {
  const places = [
    ['M1', 'L1', 'N'],
    ['C', 'L2', 'N'],
    ['C', 'L1', 'L3'],
    ['B', 'L1', 'N'],
    ['B', 'L2', 'L3'],
    ['T', 'L3', 'N'],
  ] as const;
  const bare = solveProduct(network([]), 'design');
  const AMPS = 50;
  /** Change of the volts at one place for a current at the other, ohm: both in the direction of the first axis. */
  const transfer = (at: (typeof places)[number], seen: (typeof places)[number]): Phasor => {
    const pair = `${at[1]}-${at[2]}` as LoadFile['terminals'];
    const loaded = solveProduct(network([drawn('x', at[0], pair, AMPS)]), 'design');
    const [now, before] = [loaded, bare].map((each) => across(each, seen[0], [seen[1], seen[2]]));
    const change: Phasor = [(before![0] - now![0]) / AMPS, (before![1] - now![1]) / AMPS];
    return turned(change, nominal(at));
  };
  /** The direction of the nominal EMF, which the current has: of an open network without impedance loads. */
  const open = solveProduct({ ...network([]), loads: [] }, 'design');
  const nominal = ([bus, a, b]: (typeof places)[number]): Phasor => across(open, bus, [a, b]);

  it.each(places.flatMap((a, i) => places.slice(i + 1).map((b) => [a, b] as const)))(
    'from %s to %s and back: one transfer impedance',
    (a, b) => {
      const [there, back] = [transfer(a, b), transfer(b, a)];
      // Differences of volts of some 480 V, known to 10⁻¹³ of them, over 50 A.
      expect(Math.hypot(there[0] - back[0], there[1] - back[1])).toBeLessThan((480 * 1e-12) / AMPS);
      expect(Math.hypot(...there)).toBeGreaterThan(1e-6);
    },
  );
});

describe('linearity', () => {
  const some: LoadFile[] = [
    drawn('p', 'B', 'L2-N', 30),
    { ...drawn('q', 'C', 'three-phase', 55), powerFactor: 0.8 },
    { ...drawn('r', 'T', 'L1-L3', 12), powerFactor: 0.6, leading: true },
    { ...drawn('t', 'M2', 'L3-N', 40), powerFactor: 0.9 },
  ];
  const currents = (loads: LoadFile[]) => ({ ...network([]), loads });
  const open = solveProduct(currents([]), 'everything-on');
  const far = (solution: Solution) =>
    solution.buses.flatMap(({ id, phasors }) =>
      Object.entries(phasors!).map(([c, [re, im]]) => {
        const [re0, im0] = open.buses.find((bus) => bus.id === id)!.phasors![c as 'L1']!;
        return [re - re0, im - im0] as const;
      }),
    );

  it.each([1e-3, 0.5, 2, 30])('%d times the loads: so many times the change of every phasor', (times) => {
    const one = far(solveProduct(currents(some), 'everything-on'));
    const more = far(
      solveProduct(currents(some.map((load) => ({ ...load, amps: load.amps! * times }))), 'everything-on'),
    );
    // Phasors of up to 4160/√3 V are printed in 16 digits: what is left of them in a difference is some 10⁻¹².
    for (const [k, [re, im]] of one.entries())
      expect(Math.hypot(more[k]![0] - times * re, more[k]![1] - times * im)).toBeLessThan(
        4e-12 * Math.max(1, times),
      );
  });

  it('loads one at a time add up to all of them', () => {
    const all = far(solveProduct(currents(some), 'everything-on'));
    const parts = some.map((load) => far(solveProduct(currents([load]), 'everything-on')));
    for (const [k, [re, im]] of all.entries()) {
      const of = (axis: 0 | 1) => parts.reduce((sum, part) => sum + part[k]![axis], 0);
      expect(Math.hypot(of(0) - re, of(1) - im)).toBeLessThan(1e-11);
    }
  });

  it('source power is loads and losses, and losses are I²·R of runs, windings and source', () => {
    const solution = solveProduct(network(some), 'everything-on');
    const { sourceWatts, loadWatts, lossWatts } = solution.totals;
    expect(Math.abs(sourceWatts - loadWatts - lossWatts)).toBeLessThan(1e-12 * sourceWatts);
    const inRuns = solution.runs.reduce((sum, run) => sum + run.lossWatts!, 0);
    expect(inRuns).toBeGreaterThan(0);
    expect(lossWatts - inRuns).toBeGreaterThan(0);
    // Without resistance in transformers and source, only runs lose.
    const job = network(some);
    const stiff: JobFile = {
      ...job,
      sources: [{ ...job.sources[0]!, impedance: { r: 0, x: 0.3 } }],
      transformers: job.transformers!.map((t) => ({ ...t, xOverR: 1e9 })),
    };
    const { totals, runs } = solveProduct(stiff, 'everything-on');
    const lost = runs.reduce((sum, run) => sum + run.lossWatts!, 0);
    expect(Math.abs(totals.lossWatts / lost - 1)).toBeLessThan(1e-6);
  });
});

describe('negative sinks', () => {
  const job = (amps: number, more: Partial<LoadFile> = {}): JobFile =>
    jobFile({
      sources: [{ id: 's', bus: 'A', system: '1ph-3w', volts: 240 }],
      limits: { total: 5, rise: 2 },
      runs: [ohmRun('r', 'A', 'B', ['L1', 'L2', 'N'], 0.11, 0.02)],
      loads: [{ id: 'pv', bus: 'B', terminals: 'L1-L2', amps, powerFactor: 1, class: 'generation', ...more }],
    });

  it('raise in light load what as much load would lower, as phasors', () => {
    const up = solveProduct(job(-30), 'light');
    const down = solveProduct(job(30, { minimum: 1 }), 'light');
    // 240 V and 30 A through 0.22 + 0.04j Ω: 240 ± (6.6 + 1.2j) V.
    expect(up.loads[0]!.volts).toBeCloseTo(Math.hypot(246.6, 1.2), 11);
    expect(down.loads[0]!.volts).toBeCloseTo(Math.hypot(233.4, 1.2), 11);
    expect(up.loads[0]!.verdict).toBe('rise');
    expect(up.totals.loadWatts).toBeLessThan(0);
    expect(up.totals.lossWatts).toBeCloseTo(30 * 30 * 0.22, 9);
  });

  it('of constant power: the larger root of V² − 240·V − P·R = 0 on direct current', () => {
    const direct = jobFile({
      frequency: 0,
      sources: [{ id: 's', bus: 'A', system: 'dc-2w', volts: 240 }],
      runs: [ohmRun('r', 'A', 'B', ['L1', 'N'], 0.2)],
      loads: [{ id: 'pv', bus: 'B', terminals: 'L1-N', watts: -6000, behaviour: 'power' }],
    });
    const { loads } = solveProduct(direct, 'light');
    expect(loads[0]!.volts).toBeCloseTo(120 + Math.sqrt(120 * 120 + 6000 * 0.4), 10);
  });

  it('count nowhere else', () => {
    for (const scenario of ['design', 'each-circuit', 'everything-on'] as const)
      expect(solveProduct(job(-30), scenario).loads[0]!.dropVolts).toBeCloseTo(0, 12);
  });
});
