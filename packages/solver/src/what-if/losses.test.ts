import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { runs, seeds } from '../../test/support/against-dense.ts';
import { jobFile, ohmRun } from '../../test/support/job-file.ts';
import { randomJob } from '../../test/support/random-job.ts';
import { type Job, type JobFile, parseJob, SCENARIOS } from '../job/index.ts';
import { solveJob } from '../judge/index.ts';
import { lossFactorOf } from './loss-factor.ts';
import { type Losses, losses } from './losses.ts';

const parsed = (file: JobFile): Job => {
  const outcome = parseJob(file);
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.problems));
  return outcome.job;
};
const solved = (...args: Parameters<typeof losses>): Losses => {
  const outcome = losses(...args);
  if (outcome.kind !== 'losses') throw new Error(JSON.stringify(outcome));
  return outcome;
};

/** 240 V; 20 A through 0.1 Ω and back, 5 A of it on through 0.4 Ω and back. */
const shed = parsed(
  jobFile({
    sources: [{ id: 'service', bus: 'head', system: '1ph-2w', volts: 240, impedance: { r: 0.05 } }],
    runs: [
      ohmRun('F1', 'head', 'panel', ['L1', 'N'], 0.1, 0, { kind: 'feeder' }),
      ohmRun('C1', 'panel', 'end', ['L1', 'N'], 0.4),
      ohmRun('C2', 'panel', 'spare', ['L1', 'N'], 0.4, 0, { open: true }),
    ],
    loads: [
      { id: 'heater', bus: 'panel', terminals: 'L1-N', amps: 15 },
      { id: 'lamp', bus: 'end', terminals: 'L1-N', amps: 10, demand: 0.5 },
    ],
  }),
);

describe('losses', () => {
  it('are the squares of amps times ohms: by hand', () => {
    const result = solved(shed);
    expect(result.runs[0]!.lossWatts).toBeCloseTo(20 * 20 * 0.2, 9);
    expect(result.runs[1]!.lossWatts).toBeCloseTo(5 * 5 * 0.8, 9);
    expect(result.runs[2]!.lossWatts).toBeNull();
    expect(result.total.lossWatts).toBeCloseTo(100, 9);
    expect(result.sourceWatts).toBeCloseTo(20 * 20 * 0.05, 9);
    expect(result.total).toMatchObject({ kwhPerYear: null, costPerYear: null });
  });

  it('become kWh and money of a year: 100 W at load factor 0.5 and 0.1275 per kWh', () => {
    const { total, runs: rows, ...result } = solved(shed, { loadFactor: 0.5, pricePerKwh: '0.1275' });
    // 0.3·0.5 + 0.7·0.25 = 0.325; 0.1 kW · 0.325 · 8760 h = 284.7 kWh; · 0.1275 = 36.29925.
    expect(result.lossFactor).toBeCloseTo(0.325, 12);
    expect(total.kwhPerYear).toBeCloseTo(284.7, 9);
    expect(total.costPerYear).toBe(36.3);
    expect(rows[0]!.kwhPerYear).toBeCloseTo(227.76, 9);
    expect(rows[0]!.costPerYear).toBe(29.04);
    expect(result.pricePerKwh).toBe('0.1275');
    expect(result.lossFactorFrom).toMatch(/Buller and Woodrow/);
  });

  it('take a loss factor and hours of one’s own', () => {
    const { total, lossFactorFrom } = solved(shed, { loadFactor: 0.5, lossFactor: 0.3, hoursPerYear: 2000 });
    expect(total.kwhPerYear).toBeCloseTo(60, 9);
    expect([lossFactorFrom, total.costPerYear]).toEqual(['as given', null]);
  });

  // 80 kW at the peak and a loss factor of 0.15 are 12 kW on average and 105,120 kWh a year
  // (T. Gönen, Electric Power Distribution System Engineering, example 2.2).
  it('agree with a published year of 80 kW', () => {
    const job = parsed(
      jobFile({
        sources: [{ id: 'grid', bus: 'head', system: '1ph-2w', volts: 10_000 }],
        runs: [ohmRun('F1', 'head', 'end', ['L1', 'N'], 0.4)],
        loads: [{ id: 'town', bus: 'end', terminals: 'L1-N', amps: Math.sqrt(100_000) }],
      }),
    );
    const { total } = solved(job, { lossFactor: 0.15 });
    expect(total.lossWatts).toBeCloseTo(80_000, 6);
    expect(total.kwhPerYear).toBeCloseTo(105_120, 6);
  });

  it('count the windings of a transformer: %R of its rating at full load', () => {
    const job = parsed(
      jobFile({
        sources: [{ id: 'grid', bus: 'high', system: '3ph-3w', volts: 480 }],
        transformers: [
          {
            id: 'T1',
            from: 'high',
            to: 'low',
            kva: 75,
            primaryVolts: 480,
            secondaryVolts: 208,
            connection: 'delta-wye',
            percentZ: 5,
            xOverR: 0.75,
            system: '3ph-4w',
          },
        ],
        loads: [{ id: 'all', bus: 'low', terminals: 'three-phase', va: 75_000 }],
      }),
    );
    // Z 5 % with X/R 3/4 is 4 % resistance: 3 kW of 75 kVA.
    expect(solved(job).transformers[0]!.lossWatts).toBeCloseTo(3000, 6);
    expect(solved(job).total.lossWatts).toBeCloseTo(3000, 6);
  });

  it('are those of the runs of a solution, and with the sources those of its totals', () => {
    let compared = 0;
    fc.assert(
      fc.property(seeds, fc.constantFrom(...SCENARIOS), (seed, scenario) => {
        const job = parsed(randomJob(seed));
        const theirs = solveJob(job, { scenario, headroom: false });
        if (theirs.kind !== 'solved') return;
        const ours = solved(job, { scenario });
        const { totals } = theirs.solution;
        const close = (a: number | null, b: number | null) =>
          expect(Math.abs((a ?? -1) - (b ?? -1))).toBeLessThan(1e-7 * (1 + totals.lossWatts));
        for (const [i, run] of theirs.solution.runs.entries()) close(ours.runs[i]!.lossWatts, run.lossWatts);
        close(ours.total.lossWatts + ours.sourceWatts, totals.lossWatts);
        compared += ours.runs.length;
      }),
      runs(12),
    );
    expect(compared).toBeGreaterThan(50);
  });
});

it.each([
  [0, 0],
  [0.5, 0.325],
  [1, 1],
])('a load factor of %d is a loss factor of %d', (loadFactor, lossFactor) => {
  expect(lossFactorOf(loadFactor)).toBeCloseTo(lossFactor, 12);
});

describe('what it refuses', () => {
  it.each([
    [{ loadFactor: 1.2 }, 'loadFactor', 'must be 0 to 1, average load over peak load; is 1.2'],
    [{ loadFactor: Number.NaN }, 'loadFactor', /is NaN/],
    [{ lossFactor: -0.1 }, 'lossFactor', /must be 0 to 1/],
    [{ loadFactor: 0.5, lossFactor: 0.6 }, 'lossFactor', /0.25 to 0.5; is 0.6/],
    [{ loadFactor: 0.5, hoursPerYear: 9000 }, 'hoursPerYear', /0 to 8784/],
    [{ loadFactor: 0.5, pricePerKwh: -1 }, 'pricePerKwh', /such as 0.12; is -1/],
    [{ loadFactor: 0.5, pricePerKwh: '12 ct' }, 'pricePerKwh', /is 12 ct/],
    [{ pricePerKwh: 0.12 }, 'pricePerKwh', /beside a load factor/],
  ])('%j', (options, path, message) => {
    const outcome = losses(shed, options);
    if (outcome.kind !== 'refused') throw new Error('was not refused');
    expect(outcome.problems).toHaveLength(1);
    expect(outcome.problems[0]!.path).toBe(path);
    expect(outcome.problems[0]!.message).toMatch(message);
  });

  it('a network that cannot be solved', () => {
    const job = { ...shed, buses: [{ id: 'island', name: null, kind: 'junction' as const }] };
    expect(losses(job)).toMatchObject({ kind: 'unsolvable', at: 'bus island' });
  });
});
