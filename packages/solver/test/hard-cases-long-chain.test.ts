import { handChecks } from '@farlug/solver/hand-check';
import { type Job, type JobFile, parseJob, type Scenario, type Solution } from '@farlug/solver/job';
import { shownVerdicts, solveJob } from '@farlug/solver/judge';
import { describe, expect, it } from 'vitest';
import { DEEP } from './support/against-dense.ts';
import { jobFile, type LoadFile, ohmRun, type RunFile } from './support/job-file.ts';
import { solveProduct } from './support/solvers.ts';

/**
 * Chains of tens of thousands of buses: nothing may go down the stack bus by bus, keep a list for each pair of run and
 * load, or walk the whole way for every load. Sums of n terms round by up to n·10⁻¹⁶ of themselves.
 */
const E = 240;
const R = 1e-6;
const parsed = (file: JobFile): Job => {
  const outcome = parseJob(file);
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.problems.slice(0, 3)));
  return outcome.job;
};
const solved = (job: Job, scenario: Scenario, headroom = false): Solution => {
  const outcome = solveJob(job, { scenario, headroom });
  if (outcome.kind !== 'solved') throw new Error(outcome.reason);
  return outcome.solution;
};
const chain = (n: number, kind: RunFile['kind'], r = R): RunFile[] =>
  Array.from({ length: n }, (_, k) =>
    ohmRun(`r${k + 1}`, `b${k}`, `b${k + 1}`, ['L1', 'N'], r, 0, { kind, length: 1 }),
  ).map((run) => ({ ...run, ohms: { r: r * 1000, x: 0, per: 'km' as const } }));
const at = (k: number, more: Partial<LoadFile>): LoadFile => ({
  id: `l${k}`,
  bus: `b${k}`,
  terminals: 'L1-N',
  ...more,
});
const service: JobFile['sources'] = [{ id: 's', bus: 'b0', system: '1ph-2w', volts: E }];

describe('a circuit of 50,000 equal taps', () => {
  const n = 50_000;
  const amps = 1e-3;
  const job = parsed(
    jobFile({
      sources: service,
      // 1 % is reached where k·n − k(k − 1)/2 = 1.2·10⁹: at tap 40,000 or so.
      limits: { branch: 1, longRun: true, total: 3 },
      runs: chain(n, 'branch'),
      loads: Array.from({ length: n }, (_, k) => at(k + 1, { amps })),
    }),
  );
  /** 2·r·I·Σ min(j, k): at the end 2·r·I·n(n + 1)/2 = 2.50005 V. */
  const drop = (k: number) => 2 * R * amps * (k * n - (k * (k - 1)) / 2);
  const solution = solved(job, 'each-circuit');

  it('drops r·I·(k·n − k(k − 1)/2) in each wire up to tap k', () => {
    expect(drop(n)).toBeCloseTo(R * amps * n * (n + 1), 12);
    for (const k of [1, 2, 777, 25_000, n - 1, n])
      expect(Math.abs(solution.loads[k - 1]!.dropVolts! / drop(k) - 1), `tap ${k}`).toBeLessThan(n * 2e-16);
    for (const k of [1, 777, n])
      expect(Math.abs(solution.runs[k - 1]!.amps!.L1! / (amps * (n - k + 1)) - 1)).toBeLessThan(n * 1e-11);
    // Σ I²·r in both wires: 2·r·I²·n(n + 1)(2n + 1)/6.
    const loss = (2 * R * amps ** 2 * n * (n + 1) * (2 * n + 1)) / 6;
    expect(Math.abs(solution.totals.lossWatts / loss - 1)).toBeLessThan(1e-9);
  });

  it('is over from the tap where 1 % is exceeded, and so is every run before it', () => {
    const first = solution.loads.findIndex(({ verdict }) => verdict === 'over') + 1;
    expect(drop(first)).toBeGreaterThan(0.01 * E);
    expect(drop(first - 1)).toBeLessThan(0.01 * E);
    expect(new Set(solution.loads.slice(first - 1).map(({ verdict }) => verdict))).toEqual(new Set(['over']));
    expect(new Set(solution.runs.map(({ verdict }) => verdict))).toEqual(new Set(['over']));
    // 0.005 % for each metre beyond 100 m, half a percent at most: 50 m beyond is a quarter.
    expect(solution.loads[99]!.limitPercent).toBeCloseTo(3, 12);
    expect(solution.loads[149]!.limitPercent).toBeCloseTo(3.25, 12);
    expect(solution.loads[n - 1]!.limitPercent).toBeCloseTo(3.5, 12);
    // Near from 0.9 % on.
    const shown = shownVerdicts(job, solution);
    const near = job.loads.findIndex(({ id }) => shown.loads.get(id) === 'near') + 1;
    expect(drop(near)).toBeGreaterThanOrEqual(0.009 * E * (1 - 1e-9));
    expect(drop(near - 1)).toBeLessThan(0.009 * E);
    expect(shown.runs.get('r1')).toBe('over');
  });

  it('warns of every power factor that is not stated, and has hand checks at both ends', () => {
    expect(solution.warnings).toHaveLength(n);
    const hand = handChecks(job, new Set(['r1', `r${n}`]));
    if (!hand.ok) throw new Error(hand.reason);
    const [first, last] = hand.checks;
    if (!first?.ok || !last?.ok) throw new Error('no hand check');
    expect(first.nodal.volts / (2 * R * amps * n)).toBeCloseTo(1, 7);
    expect(last.nodal.volts / (2 * R * amps)).toBeCloseTo(1, 3);
  });
});

it.each(DEEP ? [50_000] : [6000])('%d feeders in a row: loads far apart, panels on the way', (n) => {
  const every = n / 10;
  const amps = 2;
  const places = Array.from({ length: 10 }, (_, k) => (k + 1) * every);
  const job = parsed(
    jobFile({
      sources: service,
      buses: places.map((k) => ({ id: `b${k}`, kind: 'panel' })),
      limits: { feeder: 5, total: 8 },
      runs: chain(n, 'feeder', 1 / n),
      loads: places.map((k) => at(k, { amps, powerFactor: 1 })),
    }),
  );
  const solution = solved(job, 'each-circuit', true);
  for (const [k, load] of solution.loads.entries()) {
    // In tenths of the way: 2·(1/10 Ω)·2 A·Σ min(j, k) over ten.
    const tenths = (k + 1) * 10 - ((k + 1) * k) / 2;
    const drop = 0.2 * amps * tenths;
    expect(Math.abs(load.dropVolts! / drop - 1)).toBeLessThan(n * 2e-16);
    expect(load.feederPercent).toBeCloseTo((100 * drop) / E, 9);
    expect(Math.abs(load.thevenin![0] / (0.2 * (k + 1)) - 1)).toBeLessThan(n * 2e-16);
    // 5 % of 240 V is 12 V: what is left of it, over the ohms on the way.
    const left = Math.max(0, (12 - drop) / (0.2 * (k + 1)));
    expect(Math.abs(load.headroomAmps! - left)).toBeLessThan(1e-8);
    const panel = solution.buses.find(({ id }) => id === load.id.replace('l', 'b'))!;
    expect(panel.feederPercent).toBeCloseTo((100 * drop) / E, 9);
    expect(panel.verdict).toBe(drop > 12 ? 'over' : 'within');
  }
});

it.each(DEEP ? [50_000] : [4000])(
  '%d impedance loads on one circuit: a ladder of hyperbolic cosines',
  (n) => {
    // Alike sections, z in series and y across: 2·cosh θ = 2 + z·y, V_k = E·cosh((n − k + ½)θ)/cosh((n + ½)θ).
    const ohms = n * 40;
    const job = parsed(
      jobFile({
        sources: service,
        runs: chain(n, 'branch', 20 / n),
        loads: Array.from({ length: n }, (_, k) =>
          at(k + 1, { behaviour: 'impedance', amps: E / ohms, powerFactor: 1 }),
        ),
      }),
    );
    const { loads } = solved(job, 'design');
    const zy = (2 * (20 / n)) / ohms;
    const θ = 2 * Math.asinh(Math.sqrt(zy) / 2);
    for (const k of [1, n / 2, n]) {
      const right = (E * Math.cosh((n - k + 0.5) * θ)) / Math.cosh((n + 0.5) * θ);
      expect(Math.abs(loads[k - 1]!.volts! / right - 1)).toBeLessThan(n * 2e-16);
    }
  },
);

it.each(DEEP ? [50_000] : [1500])(
  '%d constant-power loads on one circuit, worked backwards, and their collapse',
  (n) => {
    // From the volts at the end follow those before each run, up to the source (see the cases of collapse).
    const watts = 20_000 / n;
    const line = 0.4 / n;
    const sourceVolts = (end: number): number => {
      let [v, amps] = [end, 0];
      for (let k = 0; k < n; k++) {
        amps += watts / v;
        v += 2 * line * amps;
      }
      return v;
    };
    const job = (volts: number): JobFile =>
      jobFile({
        frequency: 0,
        sources: [{ id: 's', bus: 'b0', system: 'dc-2w', volts }],
        runs: chain(n, 'branch', line),
        loads: Array.from({ length: n }, (_, k) => at(k + 1, { behaviour: 'power', watts })),
      });
    let [low, high] = [1, 1000];
    for (let k = 0; k < 100; k++) {
      const [a, b] = [low + (high - low) / 3, high - (high - low) / 3];
      if (sourceVolts(a) < sourceVolts(b)) high = b;
      else low = a;
    }
    for (const times of [2, 1.01]) {
      const end = solved(parsed(job(sourceVolts(times * low))), 'design').loads[n - 1]!.volts!;
      expect(Math.abs(end / (times * low) - 1)).toBeLessThan((n * 1e-15) / (times - 1));
    }
    expect(() => solveProduct(job(sourceVolts(low) * 0.9999), 'design')).toThrow(
      /no solution at bus b\d+: with all/,
    );
  },
);
