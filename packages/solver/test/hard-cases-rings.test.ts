import type { JobFile, Scenario } from '@farlug/solver/job';
import { describe, expect, it } from 'vitest';
import { jobFile, type LoadFile, ohmRun, type RunFile } from './support/job-file.ts';
import { SOLVERS, solveProduct } from './support/solvers.ts';

const DENSE = SOLVERS.find(([name]) => name === 'dense')![1];
const AMPS = 10;

describe('meshes with a closed form, r in every edge and conductor', () => {
  /** Drop of one load at `to` with the source at `from`, over 2·r·I: the resistance between two corners in r. */
  const between = (edges: [number, number][], from: number, to: number): number => {
    const r = 0.05;
    const solution = solveProduct(
      jobFile({
        sources: [{ id: 's', bus: `${from}`, system: '1ph-2w', volts: 240 }],
        runs: edges.map(([a, b], k) => ohmRun(`r${k}`, `${a}`, `${b}`, ['L1', 'N'], r)),
        loads: [{ id: 'l', bus: `${to}`, terminals: 'L1-N', amps: AMPS, powerFactor: 1 }],
      }),
      'each-circuit',
    );
    const load = solution.loads[0]!;
    // The driving-point impedance is the same resistance, out and back.
    expect(load.thevenin![0]).toBeCloseTo(load.dropVolts! / AMPS, 12);
    return load.dropVolts! / (2 * r * AMPS);
  };

  it('a cube: 7/12, 3/4 and 5/6 of an edge to the next corner, across a face, across the cube', () => {
    const edges: [number, number][] = [];
    for (let a = 0; a < 8; a++) for (const bit of [1, 2, 4]) if (!(a & bit)) edges.push([a, a | bit]);
    expect(between(edges, 0, 1)).toBeCloseTo(7 / 12, 12);
    expect(between(edges, 0, 3)).toBeCloseTo(3 / 4, 12);
    expect(between(edges, 0, 7)).toBeCloseTo(5 / 6, 12);
  });

  it.each([3, 5, 12, 40])('everything joined with everything, %d buses: 2/n', (n) => {
    const edges = Array.from({ length: n }, (_, a) =>
      Array.from({ length: n - a - 1 }, (_, k): [number, number] => [a, a + k + 1]),
    ).flat();
    expect(between(edges, 0, n - 1)).toBeCloseTo(2 / n, 12);
  });

  it.each([3, 10, 501])('a ring of %d: k·(n − k)/n', (n) => {
    const edges = Array.from({ length: n }, (_, k): [number, number] => [k, (k + 1) % n]);
    for (const k of [1, Math.floor(n / 3), n - 1])
      expect(between(edges, 0, k)).toBeCloseTo((k * (n - k)) / n, 9);
  });

  it.each([1, 2, 6, 30, 300])('a wheel of a hub and %d + 2 spokes: by Fibonacci numbers', (more) => {
    // Between the hub and a rim bus: F(2n)/(F(2n + 1) + F(2n − 1) − 2) = F(2n)/(L(2n) − 2) of an edge (number of spanning
    // trees with the two joined over the number of spanning trees, Myers 1971). Both in exact integers.
    const n = more + 2;
    const fibonacci = (k: number): bigint => {
      let [a, b] = [0n, 1n];
      for (let i = 0; i < k; i++) [a, b] = [b, a + b];
      return a;
    };
    const edges = Array.from({ length: n }, (_, k): [number, number][] => [
      [n, k],
      [k, (k + 1) % n],
    ]).flat();
    const trees = fibonacci(2 * n + 1) + fibonacci(2 * n - 1) - 2n;
    const digits = 10n ** 17n;
    expect(between(edges, n, 1)).toBeCloseTo(Number((fibonacci(2 * n) * digits) / trees) / 1e17, 12);
  });
});

/** Loads of every kind that one solve serves, at every bus in turn. */
const KINDS: Omit<LoadFile, 'id' | 'bus'>[] = [
  { terminals: 'L1-N', amps: 9, powerFactor: 0.95 },
  { terminals: 'L2-L3', amps: 6, powerFactor: 0.8 },
  { terminals: 'three-phase', amps: 5, powerFactor: 0.85 },
  { terminals: 'L3-N', amps: 7, powerFactor: 0.9, behaviour: 'impedance' },
  { terminals: 'L2-N', amps: 8, powerFactor: 0.7, demand: 0.4 },
];
const mesh = (
  edges: [string, string][],
  kindOf: (k: number) => RunFile['kind'] = () => 'branch',
): JobFile => {
  const buses = [...new Set(edges.flat())].filter((bus) => bus !== 'S');
  return jobFile({
    sources: [{ id: 's', bus: 'S', system: '3ph-4w', volts: 400, impedance: { r: 0.01, x: 0.02 } }],
    limits: { feeder: 2, branch: 3, total: 5 },
    runs: edges.map(([from, to], k) =>
      ohmRun(`r${k}`, from, to, ['L1', 'L2', 'L3', 'N'], 0.02 * (1 + (k % 5)), 0.004 * (1 + (k % 3)), {
        kind: kindOf(k),
        neutral: { r: 0.03 * (1 + (k % 4)) },
      }),
    ),
    loads: buses.map((bus, k) => ({ id: `l${k}`, bus, ...KINDS[k % KINDS.length]! })),
  });
};
const ring = (...buses: string[]): [string, string][] =>
  buses.map((bus, k) => [bus, buses[(k + 1) % buses.length]!]);

/**
 * Both solve the same linear equations: to 1e-10 of 400 V, of the largest amperes, of 100 %; to 1e-10 of an impedance.
 */
const asDense = (job: JobFile, ...scenarios: Scenario[]) => {
  for (const scenario of scenarios) {
    const [ours, theirs] = [solveProduct(job, scenario), DENSE(job, scenario)];
    const near = (a: number, b: number, scale: number, what: string) =>
      expect(Math.abs(a - b), `${scenario} ${what}: ${a} against ${b}`).toBeLessThan(1e-10 * scale);
    for (const bus of theirs.buses)
      for (const [c, right] of Object.entries(bus.phasors!)) {
        const found = ours.buses.find(({ id }) => id === bus.id)!.phasors![c as 'L1']!;
        near(Math.hypot(found[0] - right[0], found[1] - right[1]), 0, 400, `${bus.id} ${c}`);
      }
    const most = Math.max(...theirs.runs.flatMap(({ amps }) => Object.values(amps!)));
    for (const [k, { id, amps, verdict }] of theirs.runs.entries()) {
      for (const [c, right] of Object.entries(amps!))
        near(ours.runs[k]!.amps![c as 'L1']!, right, most, `${id} ${c}`);
      expect(ours.runs[k]!.verdict, id).toBe(verdict);
    }
    for (const [k, load] of theirs.loads.entries()) {
      const found = ours.loads[k]!;
      for (const part of [
        'dropPercent',
        'sourcePercent',
        'feederPercent',
        'branchPercent',
        'totalPercent',
      ] as const)
        near(found[part]!, load[part]!, 100, `${load.id} ${part}`);
      for (const part of [0, 1] as const)
        near(found.thevenin![part], load.thevenin![part], Math.hypot(...load.thevenin!), `${load.id} ohms`);
      expect([found.verdict, found.turn]).toEqual([load.verdict, load.turn]);
    }
  }
};

describe('rings in rings, as the dense solver has them', () => {
  it('a ladder of rings', () => {
    const rungs = Array.from({ length: 4 }, (_, k): [string, string][] => [
      [`a${k}`, `b${k}`],
      [`a${k}`, `a${k + 1}`],
      [`b${k}`, `b${k + 1}`],
    ]).flat();
    asDense(mesh([['S', 'a0'], ...rungs, ['a4', 'b4']]), 'design', 'each-circuit');
  });

  it('a ring that hangs on a bus of a ring, and one on that', () => {
    asDense(
      mesh([...ring('S', '1', '2', '3'), ...ring('2', '4', '5'), ...ring('5', '6', '7', '8')]),
      'design',
      'each-circuit',
    );
  });

  it('two rings that share a run, and three around one bus', () => {
    asDense(
      mesh([...ring('S', '1', '2', '3'), ['3', '4'], ['4', '5'], ['5', '2']]),
      'design',
      'each-circuit',
    );
    asDense(
      mesh([...ring('S', 'x'), ...ring('x', '1', '2'), ...ring('x', '3', '4'), ...ring('x', '5', '6')]),
    );
  });

  it('a ring of feeders with rings of branch runs between its panels', () => {
    const feeders = ring('S', 'P', 'Q', 'R');
    const branches: [string, string][] = [
      ...ring('P', '1', '2'),
      ['Q', '3'],
      ['3', '4'],
      ['4', 'R'],
      ['4', '5'],
    ];
    const job = mesh([...feeders, ...branches], (k) => (k < feeders.length ? 'feeder' : 'branch'));
    asDense(
      { ...job, buses: ['P', 'Q', 'R'].map((id) => ({ id, kind: 'panel' })) },
      'design',
      'each-circuit',
    );
  });

  it('a grid of four by four', () => {
    const at = (r: number, c: number) => (r === 0 && c === 0 ? 'S' : `${r}.${c}`);
    const edges: [string, string][] = [];
    for (let r = 0; r < 4; r++)
      for (let c = 0; c < 4; c++) {
        if (c < 3) edges.push([at(r, c), at(r, c + 1)]);
        if (r < 3) edges.push([at(r, c), at(r + 1, c)]);
      }
    asDense(mesh(edges), 'design');
  });
});
