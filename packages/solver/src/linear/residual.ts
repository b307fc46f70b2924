import type { Factor } from './factor.ts';
import { solve } from './solve.ts';

/**
 * b − A·x into `outRe`, `outIm`. Each branch enters through the difference of its two unknowns, never through the
 * diagonal. Arrays of length n, numbered like the unknowns.
 */
export function residual(
  factor: Factor,
  xRe: Float64Array,
  xIm: Float64Array,
  bRe: Float64Array,
  bIm: Float64Array,
  outRe: Float64Array,
  outIm: Float64Array,
): void {
  const { pairA, pairB, n } = factor.symbolic;
  const { branchRe, branchIm, shuntRe, shuntIm } = factor.values;
  for (let i = 0; i < n; i++) {
    outRe[i] = bRe[i]! - (shuntRe[i]! * xRe[i]! - shuntIm[i]! * xIm[i]!);
    outIm[i] = bIm[i]! - (shuntRe[i]! * xIm[i]! + shuntIm[i]! * xRe[i]!);
  }
  for (let e = 0; e < pairA.length; e++) {
    const a = pairA[e]!;
    const b = pairB[e]!;
    const dRe = xRe[a]! - xRe[b]!;
    const dIm = xIm[a]! - xIm[b]!;
    const re = branchRe[e]! * dRe - branchIm[e]! * dIm;
    const im = branchRe[e]! * dIm + branchIm[e]! * dRe;
    outRe[a]! -= re;
    outIm[a]! -= im;
    outRe[b]! += re;
    outIm[b]! += im;
  }
}

/** One step of iterative refinement on x; returns the largest correction in volts. */
export function refine(
  factor: Factor,
  xRe: Float64Array,
  xIm: Float64Array,
  bRe: Float64Array,
  bIm: Float64Array,
): number {
  const n = factor.symbolic.n;
  const rRe = new Float64Array(n);
  const rIm = new Float64Array(n);
  residual(factor, xRe, xIm, bRe, bIm, rRe, rIm);
  solve(factor, rRe, rIm);
  let largest = 0;
  for (let i = 0; i < n; i++) {
    xRe[i]! += rRe[i]!;
    xIm[i]! += rIm[i]!;
    largest = Math.max(largest, Math.sqrt(rRe[i]! * rRe[i]! + rIm[i]! * rIm[i]!));
  }
  return largest;
}
