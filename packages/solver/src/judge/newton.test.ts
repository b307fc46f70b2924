import { describe, expect, it } from 'vitest';
import { gmres, hasPositiveDeterminant } from './gmres.ts';
import { Mixer } from './mixer.ts';
import { type FixedPoint, newton } from './newton.ts';

const vector = (...values: number[]) => Float64Array.from(values);

/** g of one unknown, with its slope, as the loops upon voltages see it. */
const scalar = (
  g: (x: number) => number,
  slope: (x: number) => number,
): FixedPoint & { rounds: () => number } => {
  let at = 0;
  let rounds = 0;
  return {
    mismatch: (x, out) => {
      rounds++;
      out[0] = g(x[0]!) - x[0]!;
      return Math.abs(out[0]!) / Math.abs(g(x[0]!));
    },
    linearise: (x) => {
      at = x[0]!;
    },
    slope: (d, out) => {
      rounds++;
      out[0] = slope(at) * d[0]!;
    },
    rounds: () => rounds,
  };
};
/** V ↦ E − P·R/V: fixed at E/2 ± √(E²/4 − P·R). */
const load = (power: number) =>
  scalar(
    (v) => 1 - power / v,
    (v) => power / v ** 2,
  );

describe('GMRES', () => {
  const times = (m: number[][]) => (d: Float64Array, out: Float64Array) =>
    out.set(m.map((row) => row.reduce((sum, entry, k) => sum + entry * d[k]!, 0)));

  it('is exact after as many directions as there are unknowns', () => {
    // x = (1, −2, 3): worked forwards.
    const m = [
      [4, 1, 0],
      [-2, 5, 1],
      [0, 3, -6],
    ];
    const x = gmres(times(m), vector(2, -9, -24));
    for (const [k, right] of [1, -2, 3].entries()) expect(x[k]).toBeCloseTo(right, 3);
  });

  it('needs one direction for each distinct eigenvalue', () => {
    let products = 0;
    const size = 300;
    const twoValues = (d: Float64Array, out: Float64Array) => {
      products++;
      for (let i = 0; i < size; i++) out[i] = (i % 2 === 0 ? 1 : 0.01) * d[i]!;
    };
    const x = gmres(twoValues, new Float64Array(size).fill(1));
    expect(products).toBe(2);
    expect(x[0]).toBeCloseTo(1, 9);
    expect(x[1]).toBeCloseTo(100, 7);
  });

  it('has nothing to do for nothing, and gives up on a matrix of nothing', () => {
    expect([...gmres(times([[3]]), vector(0))]).toEqual([0]);
    expect([...gmres(times([[0]]), vector(2))]).toEqual([0]);
  });
});

describe('the sign of a determinant', () => {
  const turnedBy = (degrees: number, stretch: number) => (d: Float64Array, out: Float64Array) => {
    const [c, s] = [Math.cos((degrees * Math.PI) / 180), Math.sin((degrees * Math.PI) / 180)];
    out.set([c * d[0]! - s * d[1]!, s * d[0]! + c * d[1]!, stretch * d[2]!]);
  };
  it('is that of the product of eigenvalues: 1 of a turn, and the stretch beside it', () => {
    for (const degrees of [0, 30, 120, 200])
      for (const stretch of [3, 1e-3, -1e-3, -4])
        expect(hasPositiveDeterminant(turnedBy(degrees, stretch), vector(1, 0.5, 0.3))).toBe(stretch > 0);
  });
});

describe('Newton’s method on a fixed point', () => {
  it.each([0.1, 0.24, 0.2499, 0.249999])('finds the larger root for a power of %d', (power) => {
    const x = vector(1);
    const map = load(power);
    expect(newton(map, x, 1e-10).ok).toBe(true);
    const right = 0.5 + Math.sqrt(0.25 - power);
    // The root moves by 1/√(¼ − P) for a unit of the equation.
    expect(Math.abs(x[0]! - right)).toBeLessThan(1e-15 / Math.sqrt(0.25 - power));
    expect(map.rounds()).toBeLessThan(60);
  });

  it('stops where the mismatch does, at the fold: min (E − P/V − V) is 2√P − 1 away', () => {
    for (const beyond of [1e-3, 0.1, 2]) {
      const power = 0.25 * (1 + beyond);
      const found = newton(load(power), vector(1), 1e-10);
      expect(found.ok).toBe(false);
      // As a share of V after a round, which is √P or so of E at the fold; the last step ends near it, not on it.
      expect(found.mismatch).toBeGreaterThan(2 * Math.sqrt(power) - 1);
    }
  });

  it('does not take a root beyond the fold', () => {
    const power = 0.2;
    const lower = 0.5 - Math.sqrt(0.25 - power);
    expect(newton(load(power), vector(lower * (1 + 1e-6)), 1e-10).ok).toBe(false);
    expect(newton(load(power), vector(1 - lower * (1 + 1e-6)), 1e-10).ok).toBe(true);
  });

  it('is not fooled by what is no number', () => {
    expect(newton(load(0.2), vector(0), 1e-10).ok).toBe(false);
    expect(newton(load(Number.NaN), vector(1), 1e-10).ok).toBe(false);
  });
});

it('mixed rounds of a linear map end when the steps span what is left', () => {
  // Two unknowns with slopes 0.9 and −0.4: plain rounds need 220 for 1e-10, mixed ones four.
  const slopes = [0.9, -0.4];
  const right = slopes.map((s) => 1 / (1 - s));
  const x = vector(0, 0);
  const mixer = new Mixer();
  for (let round = 0; round < 4; round++)
    mixer.advance(x, vector(...slopes.map((s, k) => 1 + s * x[k]! - x[k]!)), false);
  for (const [k, each] of right.entries()) expect(Math.abs(x[k]! - each)).toBeLessThan(1e-10);
});
