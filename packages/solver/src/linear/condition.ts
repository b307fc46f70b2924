import type { Factor } from './factor.ts';
import { solve } from './solve.ts';

const MOST_ROUNDS = 5;

/**
 * Estimate, from below, of the condition number ‖A‖₁·‖A⁻¹‖₁ of a factored matrix: how many times a relative change of
 * its admittances may grow in the volts. A few solutions (Hager 1984; Higham 1988, for complex matrices).
 */
export function conditionEstimate(factor: Factor): number {
  return norm(factor) * inverseNorm(factor);
}

/** Largest column sum of moduli; the diagonal is the shunt plus all branches. */
function norm({ symbolic, values }: Factor): number {
  const { n, pairA, pairB, order, columns, rows, place } = symbolic;
  const { branchRe, branchIm, shuntRe, shuntIm } = values;
  const ownRe = shuntRe.slice();
  const ownIm = shuntIm.slice();
  const jointRe = new Float64Array(rows.length);
  const jointIm = new Float64Array(rows.length);
  for (let e = 0; e < pairA.length; e++) {
    jointRe[place[e]!]! += branchRe[e]!;
    jointIm[place[e]!]! += branchIm[e]!;
    for (const i of [pairA[e]!, pairB[e]!]) {
      ownRe[i]! += branchRe[e]!;
      ownIm[i]! += branchIm[e]!;
    }
  }
  const others = new Float64Array(n);
  for (let k = 0; k < n; k++)
    for (let p = columns[k]!; p < columns[k + 1]!; p++) {
      const size = modulus(jointRe[p]!, jointIm[p]!);
      others[order[k]!]! += size;
      others[order[rows[p]!]!]! += size;
    }
  let most = 0;
  for (let i = 0; i < n; i++) most = Math.max(most, modulus(ownRe[i]!, ownIm[i]!) + others[i]!);
  return most;
}

const modulus = (re: number, im: number): number => Math.sqrt(re * re + im * im);

/** Climbs from corner to corner of the unit ball, each time towards the steepest; A is symmetric, so Aᴴ is its conjugate. */
function inverseNorm(factor: Factor): number {
  const { n } = factor.symbolic;
  if (n === 0) return 0;
  let re = new Float64Array(n).fill(1 / n);
  let im = new Float64Array(n);
  let best = 0;
  let corner = -1;
  for (let round = 0; round < MOST_ROUNDS; round++) {
    solve(factor, re, im);
    let sum = 0;
    for (let i = 0; i < n; i++) sum += modulus(re[i]!, im[i]!);
    if (sum <= best) break;
    best = sum;
    // The conjugate of sign(x), so that solving with A stands for solving with Aᴴ.
    for (let i = 0; i < n; i++) {
      const size = modulus(re[i]!, im[i]!);
      re[i] = size === 0 ? 1 : re[i]! / size;
      im[i] = size === 0 ? 0 : -im[i]! / size;
    }
    solve(factor, re, im);
    let steepest = 0;
    for (let i = 1; i < n; i++)
      if (modulus(re[i]!, im[i]!) > modulus(re[steepest]!, im[steepest]!)) steepest = i;
    if (steepest === corner) break;
    corner = steepest;
    re = new Float64Array(n);
    im = new Float64Array(n);
    re[corner] = 1;
  }
  return best;
}
