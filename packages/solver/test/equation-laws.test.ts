import { type Equations, nodalEquations } from '@farlug/solver/equations';
import { type Job, type Phasor, parseJob } from '@farlug/solver/job';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { runs, seeds } from './support/against-dense.ts';
import { randomJob, type Wanted } from './support/random-job.ts';

/** The equations of a random job in design demand, or null where the network has no solution. */
function written(seed: number, wanted: Wanted): { job: Job; equations: Equations } | null {
  const parsed = parseJob(randomJob(seed, wanted));
  if (!parsed.ok) throw new Error(`refused: ${JSON.stringify(parsed.problems)}`);
  const equations = nodalEquations(parsed.job);
  if (equations.ok) return { job: parsed.job, equations };
  if (/cannot be served|do not settle/.test(equations.reason)) return null;
  throw new Error(`${equations.at}: ${equations.reason}`);
}
const size = ([re, im]: Phasor): number => Math.hypot(re, im);

describe('laws of the written equations, over random jobs of every supply system', () => {
  it('Y is symmetric to the last bit, and Y·V is the right side', () => {
    fc.assert(
      fc.property(seeds, (seed) => {
        const { matrix, solution } = written(seed, {})?.equations ?? { matrix: null, solution: [] };
        if (!matrix) return;
        for (const [r, row] of matrix.y.entries()) {
          let [re, im] = matrix.right[r]!;
          let scale = size(matrix.right[r]!);
          for (const [c, y] of row.entries()) {
            expect(y).toEqual(matrix.y[c]![r]);
            const [vRe, vIm] = solution[c]!;
            re -= y[0] * vRe - y[1] * vIm;
            im -= y[0] * vIm + y[1] * vRe;
            scale = Math.max(scale, size(y) * size(solution[c]!));
          }
          // Products as large as |y|·|V| are added up: what is left of them is rounding, some 1e-15 of each.
          expect(Math.hypot(re, im)).toBeLessThanOrEqual(1e-9 * Math.max(scale, 1e-6));
        }
      }),
      runs(30),
    );
  });

  it('Kirchhoff’s current law closes at every node, summed over branch currents', () => {
    fc.assert(
      fc.property(seeds, (seed) => {
        const result = written(seed, { iterated: false });
        if (!result || result.equations.currents.every(({ value }) => size(value) < 1e-6)) return;
        expect(result.equations.kclResidual).toBeLessThan(1e-9);
      }),
      runs(30),
    );
  });

  it('resistance alone, no transformer: positive diagonal, no positive entry beside it, rows weakly dominant', () => {
    fc.assert(
      fc.property(seeds, (seed) => {
        const result = written(seed, {
          basis: 'resistance',
          transformers: false,
          iterated: false,
          impedanceLoads: false,
        });
        if (!result) return;
        for (const { own, terms, given } of result.equations.equations) {
          if (given) continue;
          expect(own[1]).toBe(0);
          expect(own[0]).toBeGreaterThan(0);
          let sum = 0;
          for (const { y } of terms) {
            expect(y[1]).toBe(0);
            expect(y[0]).toBeLessThanOrEqual(0);
            sum -= y[0];
          }
          // Equal but for the rounding of the sum on the diagonal.
          expect(own[0]).toBeGreaterThanOrEqual(sum * (1 - 1e-12));
        }
      }),
      runs(30),
    );
  });
});
