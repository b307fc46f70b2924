import type { JobFile, Solution } from '@farlug/solver/job';
import { describe, expect, it } from 'vitest';
import { jobFile, type LoadFile, ohmRun } from './support/job-file.ts';
import './support/ledger.ts';
import { SOLVERS } from './support/solvers.ts';

/**
 * One small case per kind of schedule row, worked by hand: resistances only, an ideal source, round numbers.
 * The arithmetic stands beside each figure; V is the far voltage, drops go out by the line and back by the other wire.
 */
const SPLIT: JobFile['sources'] = [{ id: 's', bus: 'P', system: '1ph-3w', volts: 240 }];
/** 120 V from line to neutral, 207.8 V between lines. */
const WYE: JobFile['sources'] = [{ id: 's', bus: 'P', system: '3ph-4w', volts: 120 * Math.sqrt(3) }];

const amps = (id: string, bus: string, terminals: LoadFile['terminals'], size: number): LoadFile => ({
  id,
  bus,
  terminals,
  amps: size,
});
const volts = (solution: Solution, id: string): number => solution.loads.find((l) => l.id === id)!.volts!;
const near = (value: number | null | undefined, hand: number) =>
  expect((value ?? Number.NaN) - hand).toBeWithin(1e-12, 'figures worked by hand');

describe.each(SOLVERS)('schedule rows worked by hand, by the %s solver', (_, solve) => {
  it('single-pole: a run of line and neutral to one load', () => {
    // 10 A through 0.1 Ω out and 0.1 Ω back: 10 · 0.2 = 2 V of 120 V
    const solution = solve(
      jobFile({
        sources: SPLIT,
        runs: [ohmRun('c', 'P', 'end', ['L1', 'N'], 0.1)],
        loads: [amps('a', 'end', 'L1-N', 10)],
      }),
      'design',
    );
    near(volts(solution, 'a'), 118);
    near(solution.loads[0]!.branchPercent, 200 / 120);
    near(solution.runs[0]!.lossWatts, 20); // 10² · 0.1 in each of two wires
    near(solution.buses.find((b) => b.id === 'end')!.volts!.N, 1);
  });

  it('two-pole without neutral: two lines', () => {
    // 20 · (0.1 + 0.1) = 4 V of 240 V
    const solution = solve(
      jobFile({
        sources: SPLIT,
        runs: [ohmRun('c', 'P', 'end', ['L1', 'L2'], 0.1)],
        loads: [amps('a', 'end', 'L1-L2', 20)],
      }),
      'design',
    );
    near(volts(solution, 'a'), 236);
  });

  it('two-pole with neutral: a load between lines and one to neutral', () => {
    // L1 carries 20 + 10 = 30 A, L2 20 A, N 10 A. L1 at 120 − 3 = 117, L2 at −120 + 2 = −118, N at +1.
    const solution = solve(
      jobFile({
        sources: SPLIT,
        runs: [ohmRun('c', 'P', 'end', ['L1', 'L2', 'N'], 0.1)],
        loads: [amps('a', 'end', 'L1-L2', 20), amps('b', 'end', 'L1-N', 10)],
      }),
      'design',
    );
    near(volts(solution, 'a'), 117 + 118);
    near(volts(solution, 'b'), 117 - 1);
    near(solution.buses.find((b) => b.id === 'end')!.volts!['L2-N'], 118 + 1);
    expect(solution.runs[0]!.amps).toEqual({
      L1: expect.closeTo(30, 9),
      L2: expect.closeTo(20, 9),
      N: expect.closeTo(10, 9),
    });
  });

  it('three-pole: a three-phase load, and a line load that adds to it', () => {
    // Each line 20 A: 120 − 2 = 118 V to the star, √3 · 118 between lines.
    const runs = [ohmRun('c', 'P', 'end', ['L1', 'L2', 'L3', 'N'], 0.1)];
    const motor = amps('m', 'end', 'three-phase', 20);
    const alone = solve(jobFile({ sources: WYE, runs, loads: [motor] }), 'design');
    near(volts(alone, 'm'), 118 * Math.sqrt(3));
    near(alone.runs[0]!.amps!.N, 0);
    // 10 A more on L1 and the neutral, all in phase: L1 at 120 − 3 = 117, N at +1.
    const both = solve(
      jobFile({ sources: WYE, runs, loads: [motor, amps('a', 'end', 'L1-N', 10)] }),
      'design',
    );
    near(volts(both, 'a'), 116);
    near(both.runs[0]!.amps!.L1, 30);
  });

  it('multiwire: a shared neutral is worst with one leg alone', () => {
    const job = jobFile({
      sources: SPLIT,
      runs: [
        ohmRun('home', 'P', 'split', ['L1', 'L2', 'N'], 0.1),
        ohmRun('r1', 'split', 'e1', ['L1', 'N'], 0.05),
        ohmRun('r2', 'split', 'e2', ['L2', 'N'], 0.05),
      ],
      loads: [amps('a', 'e1', 'L1-N', 10), amps('b', 'e2', 'L2-N', 6)],
    });
    // Both on: the home neutral carries 10 − 6 = 4 A and stands at +0.4.
    // a: L1 120 − 1 − 0.5 = 118.5, N 0.4 + 0.5 = 0.9. b: L2 −120 + 0.6 + 0.3 = −119.1, N 0.4 − 0.3 = 0.1.
    const design = solve(job, 'design');
    near(volts(design, 'a'), 118.5 - 0.9);
    near(volts(design, 'b'), 119.1 + 0.1);
    // One leg alone: 10 · 2 · 0.15 = 3 V and 6 · 2 · 0.15 = 1.8 V.
    const full = solve(job, 'each-circuit');
    near(volts(full, 'a'), 117);
    near(volts(full, 'b'), 118.2);
    expect(full.loads.map((l) => l.turn)).toEqual(['L1', 'L2']);
  });

  it('lumped: one run, one bus, its loads', () => {
    // 6 + 4 = 10 A: 10 · 0.2 = 2 V
    const solution = solve(
      jobFile({
        sources: SPLIT,
        runs: [ohmRun('c', 'P', 'end', ['L1', 'N'], 0.1)],
        loads: [amps('a', 'end', 'L1-N', 6), amps('b', 'end', 'L1-N', 4)],
      }),
      'design',
    );
    near(volts(solution, 'a'), 118);
    near(volts(solution, 'b'), 118);
  });

  it('taps: one run per segment, a bus per tap', () => {
    // Segments carry 9, 5 and 2 A: 120 − 9 · 0.2 = 118.2, − 5 · 0.2 = 117.2, − 2 · 0.4 = 116.4.
    const solution = solve(
      jobFile({
        sources: SPLIT,
        runs: [
          ohmRun('c1', 'P', 't1', ['L1', 'N'], 0.1),
          ohmRun('c2', 't1', 't2', ['L1', 'N'], 0.1),
          ohmRun('c3', 't2', 't3', ['L1', 'N'], 0.2),
        ],
        loads: [amps('a', 't1', 'L1-N', 4), amps('b', 't2', 'L1-N', 3), amps('c', 't3', 'L1-N', 2)],
      }),
      'design',
    );
    near(volts(solution, 'a'), 118.2);
    near(volts(solution, 'b'), 117.2);
    near(volts(solution, 'c'), 116.4);
  });

  it('spread: a load evenly along its run', () => {
    // ∫ i·r·(L − x) dx: half of what the same load would drop at the end: 10 · 0.4 / 2 = 2 V
    const solution = solve(
      jobFile({
        sources: SPLIT,
        runs: [ohmRun('c', 'P', 'end', ['L1', 'N'], 0.2)],
        loads: [{ id: 'a', terminals: 'L1-N', amps: 10, along: 'c' }],
      }),
      'design',
    );
    near(volts(solution, 'a'), 118);
    near(solution.loads[0]!.branchPercent, 200 / 120);
  });

  it('ring: the last run returns to the panel', () => {
    // Three equal legs. 9 A at 1 and 6 A at 2: the first leg carries 9 · 2/3 + 6 · 1/3 = 8 A, the last 15 − 8 = 7 A.
    // Drops 8 · 0.2 = 1.6 V and 7 · 0.2 = 1.4 V; the middle leg carries 9 − 8 = 1 A the other way.
    const solution = solve(
      jobFile({
        sources: SPLIT,
        runs: [
          ohmRun('r1', 'P', '1', ['L1', 'N'], 0.1),
          ohmRun('r2', '1', '2', ['L1', 'N'], 0.1),
          ohmRun('r3', '2', 'P', ['L1', 'N'], 0.1),
        ],
        loads: [amps('a', '1', 'L1-N', 9), amps('b', '2', 'L1-N', 6)],
      }),
      'design',
    );
    near(volts(solution, 'a'), 118.4);
    near(volts(solution, 'b'), 118.6);
    near(solution.runs[0]!.amps!.L1, 8);
    near(solution.runs[1]!.amps!.L1, 1);
    near(solution.runs[2]!.amps!.L1, 7);
    near(solution.runs[1]!.dropVolts, -0.2);
  });

  it('sub-feed and feed-through lugs: feeder runs from panel to panel', () => {
    // The first feeder carries both circuits, 20 A: 20 · 0.04 = 0.8 V; the second 10 A: 0.4 V; each circuit 2 V.
    const solution = solve(
      jobFile({
        sources: [{ ...SPLIT[0]!, bus: 'service' }],
        buses: [
          { id: 'P1', kind: 'panel' },
          { id: 'P2', kind: 'panel' },
        ],
        runs: [
          ohmRun('F1', 'service', 'P1', ['L1', 'L2', 'N'], 0.02, 0, { kind: 'feeder' }),
          ohmRun('F2', 'P1', 'P2', ['L1', 'L2', 'N'], 0.02, 0, { kind: 'feeder' }),
          ohmRun('c1', 'P1', 'e1', ['L1', 'N'], 0.1),
          ohmRun('c2', 'P2', 'e2', ['L1', 'N'], 0.1),
        ],
        loads: [amps('a', 'e1', 'L1-N', 10), amps('b', 'e2', 'L1-N', 10)],
        limits: { feeder: 0.9, branch: 2, total: 5 },
      }),
      'each-circuit',
    );
    const [a, b] = solution.loads;
    near(a!.volts, 120 - 0.8 - 2);
    near(a!.feederPercent, 80 / 120);
    near(a!.branchPercent, 200 / 120);
    near(b!.volts, 120 - 0.8 - 0.4 - 2);
    near(b!.feederPercent, 120 / 120);
    expect(a!.verdict).toBe('within');
    expect(b!.verdict).toBe('over');
    const [p1, p2] = solution.buses;
    near(p1!.feederPercent, 80 / 120);
    near(p2!.feederPercent, 1);
    expect([p1!.verdict, p2!.verdict]).toEqual(['within', 'over']);
    // Both loads hang on F1, so it is as bad as the worse of them.
    expect(solution.runs.map((r) => r.verdict)).toEqual(['over', 'over', 'within', 'over']);
  });

  it('sub-feed over a transformer: run, bus, transformer, bus', () => {
    // 480 → 120 V, 12 kVA, 5 % resistive: 0.05 · 120²/12000 = 0.06 Ω at the secondary. 20 A there is 5 A at 480 V:
    // feeder 5 · 0.48 = 2.4 V of 480 = 0.5 %, which is 0.6 V at 120; transformer 20 · 0.06 = 1.2 V = 1 %; circuit 4 V.
    const solution = solve(
      jobFile({
        sources: [{ id: 's', bus: 'P', system: '3ph-3w', volts: 480 }],
        runs: [
          ohmRun('F', 'P', 'X', ['L1', 'L2'], 0.24, 0, { kind: 'feeder' }),
          ohmRun('c', 'Y', 'end', ['L1', 'N'], 0.1),
        ],
        transformers: [
          {
            id: 'T',
            from: 'X',
            to: 'Y',
            kva: 12,
            primaryVolts: 480,
            secondaryVolts: 120,
            connection: 'single-phase',
            primary: 'L1-L2',
            percentZ: 5,
            xOverR: 0,
            system: '1ph-2w',
          },
        ],
        loads: [amps('a', 'end', 'L1-N', 20)],
      }),
      'design',
    );
    const load = solution.loads[0]!;
    near(load.volts, 120 - 0.6 - 1.2 - 4);
    near(load.feederPercent, 0.5);
    near(load.transformerPercent, 1);
    near(load.branchPercent, 400 / 120);
    near(solution.runs[0]!.amps!.L1, 5);
  });

  it('spare and reserved spaces: no network rows, nothing changes', () => {
    const job = jobFile({
      sources: SPLIT,
      runs: [ohmRun('c', 'P', 'end', ['L1', 'N'], 0.1)],
      loads: [amps('a', 'end', 'L1-N', 10)],
    });
    const spaces: JobFile['panels'] = [
      {
        bus: 'P',
        spaces: 12,
        lines: ['L1', 'L2'],
        circuits: [
          { spaces: [1], run: 'c' },
          { spaces: [2], kind: 'spare' },
          { spaces: [3], kind: 'reserved' },
        ],
      },
    ];
    const plain = solve(job, 'each-circuit');
    const listed = solve({ ...job, panels: spaces }, 'each-circuit');
    expect(listed.loads).toEqual(plain.loads);
    expect(listed.runs).toEqual(plain.runs);
  });
});
