import type { JobFile, Pair, Solution } from '@farlug/solver/job';
import { describe, expect, it } from 'vitest';
import {
  jobFile,
  type LoadFile,
  ohmRun,
  phasorSink,
  type RunFile,
  type TransformerFile,
} from './support/job-file.ts';
import { solveProduct } from './support/solvers.ts';

/** Closed forms of one loop or one node each; volts of some hundred agree to 10⁻¹¹, rounding being some 10⁻¹⁴ of them. */
const ROOT3 = Math.sqrt(3);
const FOUR: RunFile['conductors'] = ['L1', 'L2', 'L3', 'N'];
const bus = (solution: Solution, id: string) => solution.buses.find((each) => each.id === id)!;
const near = (value: number | null | undefined, right: number, digits = 10) =>
  expect(value).toBeCloseTo(right, digits);

describe('mid-point delta', () => {
  const source: JobFile['sources'] = [{ id: 's', bus: 'A', system: '3ph-4w-delta', volts: 240 }];
  const runs = [ohmRun('r', 'A', 'B', FOUR, 0.1, 0, { neutral: { r: 0.3 } })];
  const at = (loads: Partial<LoadFile>[]) =>
    solveProduct(
      jobFile({
        sources: source,
        runs,
        loads: loads.map((load, k) => ({
          id: `l${k}`,
          bus: 'B',
          terminals: 'L1-N',
          powerFactor: 1,
          ...load,
        })),
      }),
      'design',
    );

  it('the high leg: 207.8 V less 40 A through 0.1 and 0.3 Ω', () => {
    const solution = at([{ terminals: 'L2-N', amps: 40 }]);
    near(solution.loads[0]!.volts, 120 * ROOT3 - 16);
    near(bus(solution, 'B').volts!['L1-N'], Math.hypot(120, 12)); // the neutral stands at −12j V
  });

  it('every conductor by itself: V = E − R·ΣI, the neutral at 0.3·ΣI', () => {
    // L1: 120, L3: −120, L2: −207.8j. 20 A of L1-N (1), 12 A of L3-N (−1), 15 A of L2-N (−j), and a three-phase load of
    // 30 A a line, which leaves L1 at 30∠30°, L2 at 30∠−90°, L3 at 30∠150° (30° behind the EMF between lines, and the
    // first of those is L1-L2 = 240∠60°).
    const solution = at([
      { terminals: 'L1-N', amps: 20 },
      { terminals: 'L3-N', amps: 12 },
      { terminals: 'L2-N', amps: 15 },
      { terminals: 'three-phase', amps: 30 },
    ]);
    const cos = 30 * Math.cos(Math.PI / 6);
    const right = {
      L1: [120 - 0.1 * (20 + cos), -0.1 * 15],
      L2: [0, -120 * ROOT3 + 0.1 * (15 + 30)],
      L3: [-120 + 0.1 * (12 + cos), -0.1 * 15],
      N: [0.3 * (20 - 12), -0.3 * 15],
    };
    for (const [c, [re, im]] of Object.entries(right)) {
      near(bus(solution, 'B').phasors![c as 'L1']![0], re!);
      near(bus(solution, 'B').phasors![c as 'L1']![1], im!);
    }
    near(solution.runs[0]!.amps!.N, Math.hypot(8, 15));
  });

  it('its two legs alone are a mid-point system of two lines', () => {
    const legs: LoadFile[] = [
      { id: 'a', bus: 'B', terminals: 'L1-N', amps: 20, powerFactor: 0.9 },
      { id: 'b', bus: 'B', terminals: 'L3-N', amps: 7, powerFactor: 0.8 },
      { id: 'c', bus: 'B', terminals: 'L1-L3', amps: 11, powerFactor: 0.7 },
    ];
    const delta = solveProduct(jobFile({ sources: source, runs, loads: legs }), 'each-circuit');
    const swap = (terminals: LoadFile['terminals']) => `${terminals}`.replace('L3', 'L2') as Pair;
    const split = solveProduct(
      jobFile({
        sources: [{ id: 's', bus: 'A', system: '1ph-3w', volts: 240 }],
        runs: [{ ...runs[0]!, conductors: ['L1', 'L2', 'N'] }],
        loads: legs.map((load) => ({ ...load, terminals: swap(load.terminals) })),
      }),
      'each-circuit',
    );
    for (const [k, load] of delta.loads.entries()) {
      near(load.volts, split.loads[k]!.volts!);
      near(load.totalPercent, split.loads[k]!.totalPercent!);
    }
  });
});

describe('several sources', () => {
  const line = (length: number, id: string, from: string, to: string) =>
    ohmRun(id, from, to, FOUR, length, length / 2);

  it('a load between two of the same EMF: each gives the share of the far side', () => {
    const solution = solveProduct(
      jobFile({
        sources: ['A', 'B'].map((id) => ({ id, bus: id, system: '3ph-4w' as const, volts: 400 })),
        runs: [line(0.3, 'a', 'A', 'X'), line(0.1, 'b', 'X', 'B')],
        loads: [{ id: 'l', bus: 'X', terminals: 'three-phase', amps: 40, powerFactor: 1 }],
      }),
      'design',
    );
    near(solution.runs[0]!.amps!.L1, 10);
    near(solution.runs[1]!.amps!.L1, 30);
    near(solution.loads[0]!.volts, ROOT3 * Math.hypot(400 / ROOT3 - 3, 1.5));
  });

  it('of unlike open volts: 4 V a phase drive a current through both impedances and the line', () => {
    const solution = solveProduct(
      jobFile({
        sources: [
          {
            id: 'A',
            bus: 'A',
            system: '3ph-4w',
            volts: 400,
            openVolts: 400 + 4 * ROOT3,
            impedance: { r: 0.05, x: 0.1 },
          },
          { id: 'B', bus: 'B', system: '3ph-4w', volts: 400, impedance: { r: 0.15, x: 0.2 } },
        ],
        runs: [line(0.4, 'a', 'A', 'B')],
        loads: [],
      }),
      'design',
    );
    near(solution.runs[0]!.amps!.L1, 4 / Math.hypot(0.6, 0.5));
    near(solution.runs[0]!.amps!.N, 0);
    // What one gives the other takes in part: EMFs deliver the losses together.
    near(solution.totals.sourceWatts, (3 * 16 * 0.6) / (0.36 + 0.25), 8);
    near(solution.totals.lossWatts, (3 * 16 * 0.6) / (0.36 + 0.25), 8);
  });

  it('a generator in place of the service is a job with the generator alone', () => {
    const generator = {
      id: 'gen',
      bus: 'G',
      system: '3ph-4w',
      volts: 480,
      impedance: { r: 0.02, x: 0.2 },
    } as const;
    const rest = {
      runs: [
        { ...line(0.02, 'service', 'S', 'M'), kind: 'service' as const },
        { ...line(0.03, 'transfer', 'G', 'M'), kind: 'feeder' as const },
        line(0.1, 'b', 'M', 'X'),
      ],
      loads: [
        { id: 'l', bus: 'X', terminals: 'three-phase' as const, amps: 30, powerFactor: 0.85 },
        { id: 'k', bus: 'X', terminals: 'L2-N' as const, amps: 12, powerFactor: 0.9 },
      ],
    };
    const service = {
      id: 's',
      bus: 'S',
      system: '3ph-4w',
      volts: 480,
      impedance: { r: 0.001, x: 0.004 },
    } as const;
    const alone = solveProduct(
      jobFile({ sources: [generator], ...rest, runs: rest.runs.slice(1) }),
      'each-circuit',
    );
    const off = solveProduct(
      jobFile({ sources: [{ ...service, off: true }, generator], ...rest }),
      'each-circuit',
    );
    const open = solveProduct(
      jobFile({
        sources: [service, generator],
        ...rest,
        runs: rest.runs.map((run) => ({ ...run, open: run.id === 'service' })),
      }),
      'each-circuit',
    );
    for (const other of [off, open])
      for (const [k, load] of alone.loads.entries()) {
        near(other.loads[k]!.volts, load.volts!);
        near(other.loads[k]!.thevenin![1], load.thevenin![1]);
        near(other.loads[k]!.sourcePercent, load.sourcePercent!);
      }
    near(off.totals.lossWatts, alone.totals.lossWatts, 8);
  });
});

describe('transformers', () => {
  const unit = (
    id: string,
    from: string,
    to: string,
    more: Partial<TransformerFile> = {},
  ): TransformerFile => ({
    id,
    from,
    to,
    kva: 45,
    primaryVolts: 480,
    secondaryVolts: 208,
    connection: 'delta-wye',
    percentZ: 4,
    xOverR: 2,
    system: '3ph-4w',
    ...more,
  });
  const source: JobFile['sources'] = [{ id: 's', bus: 'A', system: '3ph-3w', volts: 480 }];
  const loads: LoadFile[] = [
    { id: 'm', bus: 'B', terminals: 'three-phase', amps: 90, powerFactor: 0.8 },
    { id: 'n', bus: 'B', terminals: 'L1-N', amps: 40, powerFactor: 0.95 },
    { id: 'o', bus: 'B', terminals: 'L2-L3', amps: 25, powerFactor: 0.7 },
  ];
  const solved = (transformers: TransformerFile[], more: Partial<JobFile> = {}) =>
    solveProduct(jobFile({ sources: source, transformers, runs: [], loads, ...more }), 'design');

  it('two alike in parallel are one of twice the size', () => {
    const two = solved([unit('x', 'A', 'B'), unit('y', 'A', 'B')]);
    const one = solved([unit('x', 'A', 'B', { kva: 90 })]);
    for (const [k, load] of one.loads.entries()) near(two.loads[k]!.volts, load.volts!);
    near(two.totals.lossWatts, one.totals.lossWatts, 8);
  });

  it('unlike ones in parallel share by kVA over %Z', () => {
    // At one X/R amperes go as 45/4 to 75/5: 3 to 4. Runs of the same share behind each measure them.
    const run = (id: string, from: string, r: number) =>
      ohmRun(id, from, 'B', FOUR, r, 2 * r, { kind: 'feeder' });
    const solution = solved([unit('x', 'A', 'X'), unit('y', 'A', 'Y', { kva: 75, percentZ: 5 })], {
      runs: [run('rx', 'X', 4e-3), run('ry', 'Y', 3e-3)],
      loads: [{ id: 'm', bus: 'B', terminals: 'three-phase', amps: 140, powerFactor: 0.8 }],
    });
    near(solution.runs[0]!.amps!.L1, 60);
    near(solution.runs[1]!.amps!.L2, 80);
  });

  it('unlike taps drive a current between them', () => {
    // ±2.5 % of 120.09 V apart across two leakage impedances of 4 % of 208²/45000 Ω; open, the common bus is at nominal.
    const run = (id: string, from: string) => ohmRun(id, from, 'B', FOUR, 1e-3, 0, { kind: 'feeder' });
    const solution = solved(
      [unit('x', 'A', 'X', { tapPercent: 2.5 }), unit('y', 'A', 'Y', { tapPercent: -2.5 })],
      { runs: [run('rx', 'X'), run('ry', 'Y')], loads: [] },
    );
    const z = (0.04 * 208 ** 2) / 45_000;
    const [r, x] = [z / Math.sqrt(5), (2 * z) / Math.sqrt(5)];
    near(solution.runs[0]!.amps!.L1, ((208 / ROOT3) * 0.05) / Math.hypot(2 * r + 2e-3, 2 * x), 9);
    near(bus(solution, 'B').volts!['L1-N'], 208 / ROOT3);
  });

  it('three levels deep: each impedance comes down by the squares of the ratios', () => {
    const solution = solveProduct(
      jobFile({
        sources: [{ id: 's', bus: 'A', system: '3ph-3w', volts: 12_470, impedance: { r: 0.5, x: 2 } }],
        transformers: [
          unit('1', 'A', 'B', {
            kva: 1500,
            primaryVolts: 12_470,
            secondaryVolts: 4160,
            percentZ: 5.5,
            xOverR: 7,
          }),
          unit('2', 'C', 'D', { kva: 500, primaryVolts: 4160, secondaryVolts: 480, percentZ: 5, xOverR: 4 }),
          unit('3', 'E', 'F', { kva: 75, percentZ: 4.5, xOverR: 1.5 }),
        ],
        runs: [
          ohmRun('bc', 'B', 'C', FOUR, 0.2, 0.15, { kind: 'feeder' }),
          ohmRun('de', 'D', 'E', FOUR, 0.04, 0.03, { kind: 'feeder' }),
          ohmRun('fg', 'F', 'G', FOUR, 0.02, 0.005),
        ],
        loads: [{ id: 'l', bus: 'G', terminals: 'three-phase', amps: 180, powerFactor: 0.8 }],
      }),
      'design',
    );
    const leakage = (percent: number, volts: number, kva: number, ratio: number) => {
      const z = ((percent / 100) * volts ** 2) / (1000 * kva);
      const r = z / Math.hypot(1, ratio);
      return [r, r * ratio] as const;
    };
    let [r, x] = [0.5, 2];
    const down = (ratio: number, ...more: (readonly [number, number])[]) => {
      r /= ratio ** 2;
      x /= ratio ** 2;
      for (const [ownR, ownX] of more) {
        r += ownR;
        x += ownX;
      }
    };
    down(12_470 / 4160, leakage(5.5, 4160, 1500, 7), [0.2, 0.15]);
    down(4160 / 480, leakage(5, 480, 500, 4), [0.04, 0.03]);
    down(480 / 208, leakage(4.5, 208, 75, 1.5), [0.02, 0.005]);
    // |E − I·(cos φ − j·sin φ)·(r + jx)| a phase, balanced.
    const volts = Math.hypot(208 / ROOT3 - 180 * (0.8 * r + 0.6 * x), 180 * (0.8 * x - 0.6 * r));
    near(solution.loads[0]!.volts, ROOT3 * volts);
    near(solution.loads[0]!.thevenin![0], r, 12);
    near(solution.loads[0]!.thevenin![1], x, 12);
    near(solution.runs[0]!.amps!.L1, (180 * 208) / 4160, 9);
    const { sourcePercent, transformerPercent, feederPercent, branchPercent, dropPercent } =
      solution.loads[0]!;
    near(sourcePercent! + transformerPercent! + feederPercent! + branchPercent!, dropPercent!);
    // Lagging 30° at each of three steps down: a quarter turn behind the primary.
    const [re, im] = bus(solution, 'G').phasors!.L1!;
    const leads = Math.atan2(-(0.8 * x - 0.6 * r) * 180, 208 / ROOT3 - 180 * (0.8 * r + 0.6 * x));
    near(Math.atan2(im, re), -Math.PI / 2 + leads, 11);
  });
});

describe('direct current', () => {
  const job = (more: Partial<LoadFile>): JobFile =>
    jobFile({
      frequency: 0,
      sources: [
        { id: 'a', bus: 'A', system: 'dc-2w', volts: 48, openVolts: 50, impedance: { r: 0.02, x: 0 } },
        { id: 'b', bus: 'B', system: 'dc-2w', volts: 48, openVolts: 51, impedance: { r: 0.05, x: 0 } },
      ],
      runs: [ohmRun('r', 'A', 'B', ['L1', 'N'], 0.03, 0.9, { neutral: { r: 0.01 } })],
      loads: [{ id: 'l', bus: 'A', terminals: 'L1-N', ...more }],
    });

  it('is real throughout, whatever reactance and power factor say', () => {
    const plain = solveProduct(job({ amps: 40 }), 'design');
    const told = solveProduct(job({ amps: 40, powerFactor: 0.6 }), 'design');
    for (const { phasors } of plain.buses) for (const [, im] of Object.values(phasors!)) expect(im).toBe(0);
    expect(told.loads).toEqual(plain.loads);
  });

  it('two batteries side by side (Millman): with the neutral stiff at both, only L1 of the run counts', () => {
    const solution = solveProduct(job({ amps: 40 }), 'design');
    // At A: (50/0.02 + 51/(0.05 + 0.03) − 40) ÷ (1/0.02 + 1/0.08).
    near(solution.loads[0]!.volts, (50 / 0.02 + 51 / 0.08 - 40) / (1 / 0.02 + 1 / 0.08), 12);
  });

  it('amperes, watts and volt-amperes are one', () => {
    const amps = solveProduct(job({ amps: 40 }), 'design').loads;
    expect(solveProduct(job({ watts: 40 * 48 }), 'design').loads).toEqual(amps);
    expect(solveProduct(job({ va: 40 * 48 }), 'design').loads).toEqual(amps);
  });
});

describe('sinks at a stated angle', () => {
  it.each([-80, -30, 0, 45, 89])('%d° against the EMF: |E − z·I| by the cosine rule', (degrees) => {
    const [r, x, amps] = [0.3, 0.4, 25];
    const solution = solveProduct(
      jobFile({
        sources: [{ id: 's', bus: 'A', system: '1ph-2w', volts: 230 }],
        runs: [ohmRun('r', 'A', 'B', ['L1', 'N'], r / 2, x / 2)],
        loads: [{ id: 'l', bus: 'B', terminals: 'L1-N', ...phasorSink(amps, degrees) }],
      }),
      'design',
    );
    const [size, angle] = [Math.hypot(r, x) * amps, Math.atan2(x, r) + (degrees * Math.PI) / 180];
    near(solution.loads[0]!.volts, Math.sqrt(230 ** 2 + size ** 2 - 2 * 230 * size * Math.cos(angle)));
  });
});
