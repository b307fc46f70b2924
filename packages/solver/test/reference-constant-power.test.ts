import type { JobFile } from '@farlug/solver/job';
import { describe, expect, it } from 'vitest';
import { jobFile, ohmRun } from './support/job-file.ts';
import './support/ledger.ts';
import { SOLVERS } from './support/solvers.ts';

/**
 * Two buses with a constant-power load have a closed form (any text on load flow, and fixtures/reference/formulas.md
 * section 2): with P + jQ at the far end behind R + jX from Vs,
 *   Vr⁴ + (2(PR + QX) − Vs²)·Vr² + (R² + X²)(P² + Q²) = 0,
 * the larger root is the operating point, and no real root means that there is none.
 * A two-wire circuit has the ohms of both conductors in R and X.
 */
const VS = 240;
const R = 0.4;
const X = 0.3;

const farVolts = (p: number, q: number): number | null => {
  const b = 2 * (p * R + q * X) - VS * VS;
  const c = (R * R + X * X) * (p * p + q * q);
  const root = b * b - 4 * c;
  return root < 0 ? null : Math.sqrt((-b + Math.sqrt(root)) / 2);
};

/** The VA at which the two roots meet, for a power factor: b² = 4c solved for S. */
const collapseVa = (cos: number, leading: boolean): number => {
  const sin = Math.sqrt(1 - cos * cos) * (leading ? -1 : 1);
  const along = R * cos + X * sin;
  return (VS * VS) / (2 * (Math.hypot(R, X) + along));
};

const twoBuses = (va: number, powerFactor: number, leading: boolean): JobFile =>
  jobFile({
    sources: [{ id: 's', bus: 'a', system: '1ph-2w', volts: VS }],
    runs: [ohmRun('r', 'a', 'b', ['L1', 'N'], R / 2, X / 2)],
    loads: [{ id: 'l', bus: 'b', terminals: 'L1-N', behaviour: 'power', va, powerFactor, leading }],
  });

const factors: [cos: number, leading: boolean][] = [
  [1, false],
  [0.9, false],
  [0.6, false],
  [0.9, true],
];
const shares = [0.01, 0.1, 0.5, 0.8, 0.9, 0.95];
const cases = factors.flatMap(([cos, leading]) => shares.map((share) => ({ cos, leading, share })));

describe.each(SOLVERS)('a constant-power load behind one run, by the %s solver', (_, solve) => {
  it.each(cases)(
    'power factor $cos (leading: $leading) at $share of the collapse',
    ({ cos, leading, share }) => {
      const va = share * collapseVa(cos, leading);
      const q = va * Math.sqrt(1 - cos * cos) * (leading ? -1 : 1);
      const exact = farVolts(va * cos, q)!;
      const volts = solve(twoBuses(va, cos, leading), 'design').loads[0]!.volts!;
      // The stop rule allows 1e-10 of the highest voltage in the last round; rounds go on to rounding, some 1e-13 V.
      expect(volts - exact).toBeWithin(1e-11, 'volts of the closed form');
    },
  );

  it.each(factors)('power factor %d (leading: %s) is refused beyond the collapse', (cos, leading) => {
    const va = 1.02 * collapseVa(cos, leading);
    expect(farVolts(va * cos, va * Math.sqrt(1 - cos * cos) * (leading ? -1 : 1))).toBeNull();
    expect(() => solve(twoBuses(va, cos, leading), 'design')).toThrow(/no solution/);
  });
});
