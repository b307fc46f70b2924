import { addProduct, addTimes, invert, type Values } from './blocks.ts';
import type { Elimination } from './elimination.ts';

/**
 * LDLᵀ of a complex symmetric matrix of 4 × 4 blocks, given as branch blocks and row sums, never as a diagonal:
 * a pivot is a row sum plus the branches left at it. Blocks are full, row by row, 16 values.
 */
export interface BlockFactor {
  elimination: Elimination;
  /** Per entry of `elimination.rows`: branch block W on entry, share pivot⁻¹·W on return. */
  shareRe: Values;
  shareIm: Values;
  /** Per position: row sum on entry, overwritten. */
  sumRe: Values;
  sumIm: Values;
  /** Per position: inverse of the pivot. */
  inverseRe: Values;
  inverseIm: Values;
}

export function blockFactor(elimination: Elimination): BlockFactor {
  const entries = 16 * elimination.rows.length;
  const nodes = 16 * elimination.n;
  return {
    elimination,
    shareRe: new Float64Array(entries),
    shareIm: new Float64Array(entries),
    sumRe: new Float64Array(nodes),
    sumIm: new Float64Array(nodes),
    inverseRe: new Float64Array(nodes),
    inverseIm: new Float64Array(nodes),
  };
}

/** Factors positions from … end − 1, which nothing outside them couples to; −1, or the position without a pivot. */
export function factorBlocks(factor: BlockFactor, from: number, end: number): number {
  const { columns, rows } = factor.elimination;
  const { shareRe, shareIm, sumRe, sumIm, inverseRe, inverseIm } = factor;
  const wRe = new Float64Array(16);
  const wIm = new Float64Array(16);
  for (let k = from; k < end; k++) {
    const first = columns[k]!;
    const last = columns[k + 1]!;
    const at = 16 * k;
    for (let i = 0; i < 16; i++) {
      let re = sumRe[at + i]!;
      let im = sumIm[at + i]!;
      for (let p = first; p < last; p++) {
        re += shareRe[16 * p + i]!;
        im += shareIm[16 * p + i]!;
      }
      inverseRe[at + i] = re;
      inverseIm[at + i] = im;
    }
    if (!invert(inverseRe, inverseIm, at)) return k;
    // share = D⁻¹·W. Row sums: R_r += shareᵣᵀ·R_k. Branches between r and s: W_rs += shareᵣᵀ·W_ks.
    for (let p = first; p < last; p++) {
      wRe.set(shareRe.subarray(16 * p, 16 * p + 16));
      wIm.set(shareIm.subarray(16 * p, 16 * p + 16));
      shareRe.fill(0, 16 * p, 16 * p + 16);
      shareIm.fill(0, 16 * p, 16 * p + 16);
      addProduct(false, inverseRe, inverseIm, at, wRe, wIm, 0, shareRe, shareIm, 16 * p);
      const r = rows[p]!;
      if (!isZero(sumRe, sumIm, at))
        addProduct(true, shareRe, shareIm, 16 * p, sumRe, sumIm, at, sumRe, sumIm, 16 * r);
      for (let q = p + 1, entry = columns[r]!; q < last; q++) {
        while (rows[entry] !== rows[q]) entry++;
        addProduct(true, shareRe, shareIm, 16 * p, shareRe, shareIm, 16 * q, shareRe, shareIm, 16 * entry);
      }
    }
  }
  return -1;
}

/** Most steps of a piece are tied to nothing but each other. */
function isZero(re: Values, im: Values, at: number): boolean {
  for (let i = at; i < at + 16; i++) if (re[i] !== 0 || im[i] !== 0) return false;
  return true;
}

/** Solves positions from … end − 1 in place; x has four values a position. */
export function solveBlocks(factor: BlockFactor, from: number, end: number, xRe: Values, xIm: Values): void {
  const { columns, rows } = factor.elimination;
  const { shareRe, shareIm, inverseRe, inverseIm } = factor;
  const bRe = new Float64Array(4);
  const bIm = new Float64Array(4);
  for (let k = from; k < end; k++)
    for (let p = columns[k]!; p < columns[k + 1]!; p++)
      addTimes(true, shareRe, shareIm, 16 * p, xRe, xIm, 4 * k, xRe, xIm, 4 * rows[p]!);
  for (let k = end - 1; k >= from; k--) {
    for (let i = 0; i < 4; i++) {
      bRe[i] = xRe[4 * k + i]!;
      bIm[i] = xIm[4 * k + i]!;
      xRe[4 * k + i] = 0;
      xIm[4 * k + i] = 0;
    }
    addTimes(false, inverseRe, inverseIm, 16 * k, bRe, bIm, 0, xRe, xIm, 4 * k);
    for (let p = columns[k]!; p < columns[k + 1]!; p++)
      addTimes(false, shareRe, shareIm, 16 * p, xRe, xIm, 4 * rows[p]!, xRe, xIm, 4 * k);
  }
}
