import type { JobFile, Solution } from '@farlug/solver/job';
import { SCENARIOS } from '@farlug/solver/job';
import { describe, expect, it } from 'vitest';
import { jobFile, type LoadFile, ohmRun, type RunFile } from './support/job-file.ts';
import { randomFrom } from './support/random.ts';
import { solveProduct } from './support/solvers.ts';
import { relabelled, reordered } from './support/variants.ts';

/** What is drawn or said in two ways has one answer: to 10⁻¹² of the largest value of its kind, and the same verdicts. */
const CLOSE = 1e-12;
const SPLIT: JobFile['sources'] = [{ id: 's', bus: 'A', system: '1ph-3w', volts: 240 }];

const numbers = (value: unknown, into: number[] = []): number[] => {
  if (typeof value === 'number') into.push(value);
  else if (value !== null && typeof value === 'object')
    for (const each of Object.values(value)) numbers(each, into);
  return into;
};
/** Every number of two results beside each other; keys may come in another order. */
const sameNumbers = (a: unknown, b: unknown, scale: number, path = ''): void => {
  if (typeof a === 'number' && typeof b === 'number')
    expect(Math.abs(a - b), `${path}: ${a} against ${b}`).toBeLessThanOrEqual(
      CLOSE * Math.max(scale, Math.abs(a)),
    );
  else if (a !== null && typeof a === 'object' && b !== null && typeof b === 'object')
    for (const key of new Set([...Object.keys(a), ...Object.keys(b)]))
      sameNumbers(a[key as never], b[key as never], scale, `${path}.${key}`);
  else expect(a, path).toEqual(b);
};

/** Two levels of transformers, a ring, feeders in parallel, shared neutrals, every behaviour that is not iterated. */
const campus = (): JobFile =>
  jobFile({
    sources: [{ id: 's', bus: 'S', system: '3ph-4w', volts: 480, impedance: { r: 0.004, x: 0.011 } }],
    limits: { feeder: 2, branch: 3, total: 5, starting: 15, lowestVolts: { '120': 112 } },
    buses: ['S', 'M', 'T', 'U'].map((id) => ({ id, kind: 'panel' as const })),
    runs: [
      ohmRun('f1', 'S', 'M', ['L1', 'L2', 'L3', 'N'], 0.021, 0.014, { kind: 'feeder' }),
      ohmRun('f2', 'S', 'M', ['L1', 'L2', 'L3', 'N'], 0.034, 0.029, { kind: 'feeder' }),
      ohmRun('g', 'T', 'U', ['L1', 'L2', 'L3', 'N'], 0.013, 0.008, { kind: 'feeder' }),
      ohmRun('r1', 'U', '1', ['L1', 'L2', 'N'], 0.031, 0.004),
      ohmRun('r2', '1', '2', ['L1', 'L2', 'N'], 0.052, 0.006),
      ohmRun('r3', '2', '3', ['L1', 'L2', 'N'], 0.043, 0.005),
      ohmRun('r4', '3', 'U', ['L1', 'L2', 'N'], 0.077, 0.009),
      ohmRun('m', 'M', 'motor', ['L1', 'L2', 'L3'], 0.12, 0.04),
      ohmRun('l', 'T', 'lamp', ['L3', 'N'], 0.18, 0.01),
    ],
    transformers: [
      {
        id: 'x',
        from: 'M',
        to: 'T',
        kva: 75,
        primaryVolts: 480,
        secondaryVolts: 208,
        connection: 'delta-wye',
        percentZ: 4.1,
        xOverR: 2.2,
        system: '3ph-4w',
      },
    ],
    loads: [
      { id: 'a', bus: '1', terminals: 'L1-N', amps: 9, powerFactor: 0.95, minimum: 0.3, class: 'lighting' },
      { id: 'b', bus: '2', terminals: 'L2-N', amps: 14, powerFactor: 0.9, demand: 0.6, minimum: 0.2 },
      { id: 'c', bus: '3', terminals: 'L1-L2', va: 2100, powerFactor: 0.85 },
      { id: 'd', bus: '3', terminals: 'L1-N', watts: 800, powerFactor: 1, behaviour: 'impedance' },
      {
        id: 'e',
        bus: 'motor',
        terminals: 'three-phase',
        amps: 34,
        powerFactor: 0.86,
        starting: { amps: 190, powerFactor: 0.3 },
      },
      { id: 'f', bus: 'lamp', terminals: 'L3-N', amps: 12, powerFactor: 1, quantity: 2, demand: 0.5 },
    ],
  });

describe('order and names', () => {
  const job = campus();
  it.each(SCENARIOS)('change no number and no verdict: %s', (scenario) => {
    const plain = solveProduct(job, scenario);
    const scale = Math.max(...numbers(plain.buses).map(Math.abs));
    for (let seed = 1; seed <= 12; seed++) {
      const random = randomFrom(seed);
      const names = relabelled(random, job);
      const other = solveProduct(reordered(random, names.job), scenario);
      const byId = <T extends { id: string }>(list: T[]) => new Map(list.map((each) => [each.id, each]));
      const buses = byId(other.buses);
      const loads = byId(other.loads);
      for (const bus of plain.buses)
        sameNumbers(bus, { ...buses.get(names.bus(bus.id))!, id: bus.id }, scale);
      for (const load of plain.loads) sameNumbers(load, loads.get(load.id)!, 1);
      const runs = names.job.runs!.map(({ id }) => other.runs.find((run) => run.id === id)!);
      const loss = plain.totals.lossWatts;
      for (const [k, run] of plain.runs.entries()) sameNumbers(run, { ...runs[k]!, id: run.id }, loss);
      expect(Math.abs(other.totals.lossWatts / loss - 1)).toBeLessThan(CLOSE);
    }
  });
});

describe('runs beside each other', () => {
  const twoWire = (runs: RunFile[], more: Partial<JobFile> = {}): Solution =>
    solveProduct(
      jobFile({
        sources: SPLIT,
        runs,
        loads: [{ id: 'l', bus: 'B', terminals: 'L1-N', amps: 40, powerFactor: 0.8 }],
        ...more,
      }),
      'design',
    );

  it('n alike are as one of n sets, and share alike', () => {
    for (const n of [2, 3, 7]) {
      const sized = { size: '1/0 AWG', ohms: null, length: 80 };
      const one: RunFile = { ...ohmRun('r', 'A', 'B', ['L1', 'N'], 0), ...sized };
      const many = twoWire(Array.from({ length: n }, (_, k) => ({ ...one, id: `r${k}` })));
      const sets = twoWire([{ ...one, sets: n }]);
      sameNumbers(many.loads, sets.loads, 1);
      for (const run of many.runs) expect(run.amps!.L1).toBeCloseTo(40 / n, 11);
      expect(sets.runs[0]!.amps!.L1).toBeCloseTo(40, 11);
    }
  });

  it('unlike ones share by their admittances, out of phase with each other', () => {
    // I_k = I·y_k/Σy. Amperes of the parts add up to more than the whole.
    const z = [
      [0.2, 0.01],
      [0.05, 0.1],
      [0.6, 0.02],
    ] as const;
    const y = z.map(([r, x]) => [r / (r * r + x * x), -x / (r * r + x * x)] as const);
    const whole = Math.hypot(
      y.reduce((sum, [g]) => sum + g, 0),
      y.reduce((sum, [, b]) => sum + b, 0),
    );
    const solution = twoWire(z.map(([r, x], k) => ohmRun(`r${k}`, 'A', 'B', ['L1', 'N'], r, x)));
    let sum = 0;
    for (const [k, [g, b]] of y.entries()) {
      const share = (40 * Math.hypot(g, b)) / whole;
      expect(solution.runs[k]!.amps!.L1).toBeCloseTo(share, 11);
      expect(solution.runs[k]!.amps!.N).toBeCloseTo(share, 11);
      sum += share;
    }
    expect(sum).toBeGreaterThan(41);
  });

  it('a line of one run and the neutral of another make a circuit', () => {
    // 40 A out through 0.2 and 0.3 Ω side by side, back through 0.05 Ω alone.
    const solution = twoWire(
      [
        ohmRun('lines', 'A', 'B', ['L1', 'N'], 0.2, 0, { neutral: { r: 0.05 } }),
        ohmRun('more', 'A', 'B', ['L1', 'L2'], 0.3),
      ],
      { loads: [{ id: 'l', bus: 'B', terminals: 'L1-N', amps: 40, powerFactor: 1 }] },
    );
    expect(solution.loads[0]!.volts).toBeCloseTo(120 - 40 * 0.12 - 40 * 0.05, 11);
    expect(solution.runs[1]!.amps).toEqual({ L1: expect.closeTo(16, 11), L2: expect.closeTo(0, 11) });
  });
});

describe('units', () => {
  /** One load at the end of 50 m of run, said in some way. */
  const one = (load: Partial<LoadFile>, run: Partial<RunFile> = {}, job: Partial<JobFile> = {}): Solution =>
    solveProduct(
      jobFile({
        sources: [{ id: 's', bus: 'A', system: '3ph-4w', volts: 208 }],
        limits: { branch: 3 },
        runs: [
          {
            id: 'r',
            kind: 'branch',
            from: 'A',
            to: 'B',
            length: 50,
            conductors: ['L1', 'L2', 'L3', 'N'],
            size: '12 AWG',
            ...run,
          },
        ],
        loads: [{ id: 'l', bus: 'B', terminals: 'L1-N', ...load }],
        ...job,
      }),
      'each-circuit',
    );
  const alike = (a: Solution, b: Solution) => {
    sameNumbers(a.loads, b.loads, 1);
    sameNumbers(a.buses, b.buses, 208);
    sameNumbers(a.runs, b.runs, 1);
  };

  it('of a load: amperes, volt-amperes, watts and kilowatts', () => {
    const phase = 208 / Math.sqrt(3);
    const amps = one({ amps: 15, powerFactor: 0.8 });
    alike(one({ va: 15 * phase, powerFactor: 0.8 }), amps);
    alike(one({ watts: 15 * phase * 0.8, powerFactor: 0.8 }), amps);
    alike(one({ kw: 0.015 * phase * 0.8, powerFactor: 0.8 }), amps);
    alike(one({ amps: 5, quantity: 3, powerFactor: 0.8 }), amps);
    const three = one({ terminals: 'three-phase', amps: 15, powerFactor: 0.8 });
    alike(one({ terminals: 'three-phase', va: 15 * 208 * Math.sqrt(3), powerFactor: 0.8 }), three);
    alike(one({ terminals: 'three-phase', kw: 0.015 * 208 * Math.sqrt(3) * 0.8, powerFactor: 0.8 }), three);
    alike(
      one({ terminals: 'L1-L2', va: 15 * 208, powerFactor: 0.8 }),
      one({ terminals: 'L1-L2', amps: 15, powerFactor: 0.8 }),
    );
  });

  it('of length: 50 m and 50/0.3048 ft', () => {
    alike(
      one({ amps: 15, powerFactor: 0.8 }, { length: 50 / 0.3048 }, { lengthUnit: 'ft' }),
      one({ amps: 15, powerFactor: 0.8 }),
    );
  });

  it.each([
    // NEC 2023 Chapter 9 Table 9, copper: ohm to neutral per 1000 ft, R in PVC and in steel, X_L in PVC and in steel.
    ['12 AWG', 'pvc', 2.0, 0.054],
    ['12 AWG', 'steel', 2.0, 0.068],
    ['1/0 AWG', 'pvc', 0.12, 0.044],
    ['1/0 AWG', 'steel', 0.12, 0.055],
  ] as const)('of ohms: %s in %s as its row of Table 9', (size, raceway, r, x) => {
    const load = { amps: 15, powerFactor: 0.8 };
    const sized = one(load, { size, raceway });
    alike(one(load, { size: null, ohms: { r, x, per: '1000ft' } }), sized);
    const perKm = 1000 / 304.8;
    alike(one(load, { size: null, ohms: { r: r * perKm, x: x * perKm, per: 'km' } }), sized);
  });
});
