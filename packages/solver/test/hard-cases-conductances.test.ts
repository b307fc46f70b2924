import Decimal from 'decimal.js';
import { describe, expect, it } from 'vitest';
import { jobFile, ohmRun, type SourceFile } from './support/job-file.ts';
import { solveProduct } from './support/solvers.ts';

/**
 * Runs of 10⁻⁶ … 10⁶ Ω in one job, each conductor alike. What is exact here is worked in 60 decimal digits; the solver
 * has 16. It keeps branches, never a diagonal, so that every drop keeps its own digits: relative errors of some
 * 10⁻¹⁶ for each run on the way, whatever its neighbours are.
 */
const exact = Decimal.clone({ precision: 60 });
const SOURCE: SourceFile = { id: 's', bus: 'b0', system: '1ph-2w', volts: 240 };
const DECADES = Array.from({ length: 13 }, (_, k) => k - 6);
const CLOSE = 1e-12;

const relative = (value: number, right: Decimal): number =>
  new exact(value).sub(right).div(right).abs().toNumber();

describe('conductances over twelve orders of magnitude', () => {
  const ohms = DECADES.map((decade) => Number(`1e${decade}`));
  /** Amperes at the end of each run, so that every run drops some hundredth of a volt. */
  const amps = DECADES.map((decade) => Number(`1.7e${-decade - 2}`));

  it.each(['thin to thick', 'thick to thin', 'mixed'])(
    'in series, %s: the drop is Σ 2·R·(amps beyond)',
    (name) => {
      const order = DECADES.map((_, k) => k);
      if (name === 'thin to thick') order.reverse();
      if (name === 'mixed') order.sort((a, b) => ((a * 5) % 13) - ((b * 5) % 13));
      const job = jobFile({
        sources: [SOURCE],
        runs: order.map((k, at) => ohmRun(`r${at}`, `b${at}`, `b${at + 1}`, ['L1', 'N'], ohms[k]!)),
        // In series the current of the last run flows in every one: only thick to thin may carry more near the source.
        loads: order.map((k, at) => ({
          id: `l${at}`,
          bus: `b${at + 1}`,
          terminals: 'L1-N',
          amps: name === 'thick to thin' ? amps[k]! : 1.7e-9 * (at + 1),
          powerFactor: 1,
        })),
      });
      const solution = solveProduct(job, 'design');
      let beyond = job.loads!.reduce((sum, load) => sum.add(load.amps!), new exact(0));
      let drop = new exact(0);
      for (const [at, k] of order.entries()) {
        const own = new exact(2).mul(ohms[k]!).mul(beyond);
        drop = drop.add(own);
        expect(relative(solution.loads[at]!.dropVolts!, drop), `load ${at}`).toBeLessThan(CLOSE);
        // Amperes are (V − V′)/R: of a run after a larger drop only the difference is left, with the digits of that drop.
        const digits = CLOSE * own.toNumber() + 2 ** -50 * drop.toNumber();
        expect(Math.abs(solution.runs[at]!.dropVolts! - own.toNumber()), `run ${at}`).toBeLessThan(digits);
        const apart = new exact(solution.runs[at]!.amps!.L1!).sub(beyond).abs().toNumber();
        expect(apart, `run ${at}`).toBeLessThan(digits / ohms[k]!);
        beyond = beyond.sub(job.loads![at]!.amps!);
      }
      // The residual is taken from volts too: what two volts that round leave through the thickest run.
      const largest = job.loads!.reduce((sum, load) => sum + load.amps!, 0);
      const rounded = (2 ** -50 * drop.toNumber()) / ohms[0]! / largest;
      expect(solution.totals.kclResidual).toBeLessThan(CLOSE + rounded);
    },
  );

  it('in parallel: amperes share by conductance, down to 10⁻¹² of the whole', () => {
    const solution = solveProduct(
      jobFile({
        sources: [SOURCE],
        runs: ohms.map((r, k) => ohmRun(`r${k}`, 'b0', 'b1', ['L1', 'N'], r)),
        loads: [{ id: 'l', bus: 'b1', terminals: 'L1-N', amps: 1e5, powerFactor: 1 }],
      }),
      'design',
    );
    const whole = ohms.reduce((sum, r) => sum.add(new exact(1).div(r)), new exact(0));
    expect(relative(solution.loads[0]!.dropVolts!, new exact(2e5).div(whole))).toBeLessThan(CLOSE);
    for (const [k, r] of ohms.entries()) {
      const share = new exact(1e5).div(whole).div(r);
      expect(relative(solution.runs[k]!.amps!.L1!, share), `${r} Ω`).toBeLessThan(CLOSE);
    }
  });

  it.each([
    [1e-6, 1e6, 1, 1e3, 1e-3],
    [1e6, 1e-6, 1e-6, 1e6, 1],
    [1e6, 1e6, 1e-6, 1e-6, 1e6],
    [1, 1e-6, 1e6, 1e-3, 1e-6],
  ])(
    'a bridge of %d, %d, %d, %d Ω with %d Ω across: two node equations by determinants',
    (ac, ad, bc, bd, cd) => {
      // One ampere out of d and half of one out of c and b; a is the source. In each conductor alike, so twice the drop.
      const out = { b: 0.5, c: 0.5, d: 1 };
      const solution = solveProduct(
        jobFile({
          sources: [{ ...SOURCE, bus: 'a' }],
          runs: (
            [
              ['ac', ac],
              ['ad', ad],
              ['bc', bc],
              ['bd', bd],
              ['cd', cd],
            ] as const
          ).map(([id, r]) => ohmRun(id, id[0]!, id[1]!, ['L1', 'N'], r)),
          loads: Object.entries(out).map(([bus, amperes]) => ({
            id: bus,
            bus,
            terminals: 'L1-N' as const,
            amps: amperes * 1e-6,
            powerFactor: 1,
          })),
        }),
        'design',
      );
      const g = (r: number) => new exact(1).div(r);
      const matrix = [
        [g(bc).add(g(bd)), g(bc).neg(), g(bd).neg()],
        [g(bc).neg(), g(ac).add(g(bc)).add(g(cd)), g(cd).neg()],
        [g(bd).neg(), g(cd).neg(), g(ad).add(g(bd)).add(g(cd))],
      ];
      const right = Object.values(out).map((amperes) => new exact(amperes).mul(1e-6));
      for (const [k, bus] of Object.keys(out).entries()) {
        const column = matrix.map((row, r) => row.map((entry, c) => (c === k ? right[r]! : entry)));
        const drop = determinant(column).div(determinant(matrix)).mul(2);
        const solved = solution.loads.find((load) => load.id === bus)!.dropVolts!;
        expect(relative(solved, drop), bus).toBeLessThan(CLOSE);
      }
    },
  );
});

const determinant = (m: Decimal[][]): Decimal => {
  const minor = (r: number, s: number, c: number, d: number) =>
    m[r]![c]!.mul(m[s]![d]!).sub(m[r]![d]!.mul(m[s]![c]!));
  return m[0]![0]!
    .mul(minor(1, 2, 1, 2))
    .sub(m[0]![1]!.mul(minor(1, 2, 0, 2)))
    .add(m[0]![2]!.mul(minor(1, 2, 0, 1)));
};
