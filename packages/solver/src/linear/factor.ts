import type { Symbolic } from './analyse.ts';

/**
 * Values of a complex symmetric matrix in branch form, split into real and imaginary parts.
 * `branch` has one entry per given pair: the admittance that joins the two unknowns, that is minus its part of the
 * off-diagonal entry. `shunt` has one per unknown: its row sum, that is the admittance to ground and
 * to fixed unknowns. The diagonal follows (`shunt` + all branches) and is never given: a short thick run beside
 * a long thin one would wash the thin one out of the sum.
 */
export interface BranchValues {
  branchRe: Float64Array;
  branchIm: Float64Array;
  shuntRe: Float64Array;
  shuntIm: Float64Array;
}

export interface Factor {
  symbolic: Symbolic;
  values: BranchValues;
  /** Per column: 1 / pivot. */
  inverseRe: Float64Array;
  inverseIm: Float64Array;
  /** Per entry of `symbolic.rows`: branch left at elimination ÷ pivot, that is −L. */
  shareRe: Float64Array;
  shareIm: Float64Array;
}

/** A pivot that is not there: the matrix is singular at this unknown, to working precision. */
export interface MissingPivot {
  ok: false;
  unknown: number;
}
export type FactorOutcome = { ok: true; factor: Factor } | MissingPivot;

/** A pivot below this share of the largest admittance that ever met at its unknown counts as missing. */
const MISSING_SHARE = 1e-18;

/**
 * LDLᵀ without pivoting, column by column, on branches and shunts instead of diagonals: eliminating unknown k
 * with pivot d = s + Σw turns each pair of its neighbours into a branch w_i·w_j/d and leaves s·w_i/d as shunt.
 * For real positive admittances nothing is ever subtracted (Grassmann, Taksar and Heyman 1985); passive
 * networks have accretive leading blocks, so complex ones need no pivoting either.
 */
export function factor(symbolic: Symbolic, values: BranchValues): FactorOutcome {
  const { n, order, columns, rows, place } = symbolic;
  const size = rows.length;
  const wRe = new Float64Array(size);
  const wIm = new Float64Array(size);
  const sRe = new Float64Array(n);
  const sIm = new Float64Array(n);
  const largest = new Float64Array(n);
  const inverseRe = new Float64Array(n);
  const inverseIm = new Float64Array(n);
  for (let e = 0; e < place.length; e++) {
    wRe[place[e]!]! += values.branchRe[e]!;
    wIm[place[e]!]! += values.branchIm[e]!;
  }
  for (let k = 0; k < n; k++) {
    sRe[k] = values.shuntRe[order[k]!]!;
    sIm[k] = values.shuntIm[order[k]!]!;
    largest[k] = Math.max(largest[k]!, Math.abs(sRe[k]!) + Math.abs(sIm[k]!));
    for (let p = columns[k]!; p < columns[k + 1]!; p++) {
      const size1 = Math.abs(wRe[p]!) + Math.abs(wIm[p]!);
      if (size1 > largest[k]!) largest[k] = size1;
      if (size1 > largest[rows[p]!]!) largest[rows[p]!] = size1;
    }
  }
  const placeOfRow = new Int32Array(n);

  for (let k = 0; k < n; k++) {
    const first = columns[k]!;
    const end = columns[k + 1]!;
    let dRe = sRe[k]!;
    let dIm = sIm[k]!;
    for (let p = first; p < end; p++) {
      dRe += wRe[p]!;
      dIm += wIm[p]!;
    }
    const square = dRe * dRe + dIm * dIm;
    if (!(Math.sqrt(square) > MISSING_SHARE * largest[k]!)) return { ok: false, unknown: order[k]! };
    const iRe = dRe / square;
    const iIm = -dIm / square;
    inverseRe[k] = iRe;
    inverseIm[k] = iIm;
    const shuntRe = sRe[k]!;
    const shuntIm = sIm[k]!;
    for (let p = first; p < end; p++) {
      const a = wRe[p]!;
      const b = wIm[p]!;
      const shareRe = a * iRe - b * iIm;
      const shareIm = a * iIm + b * iRe;
      const row = rows[p]!;
      sRe[row]! += shareRe * shuntRe - shareIm * shuntIm;
      sIm[row]! += shareRe * shuntIm + shareIm * shuntRe;
      if (end - first > 1) {
        for (let q = columns[row]!; q < columns[row + 1]!; q++) placeOfRow[rows[q]!] = q;
        for (let q = p + 1; q < end; q++) {
          const target = placeOfRow[rows[q]!]!;
          wRe[target]! += shareRe * wRe[q]! - shareIm * wIm[q]!;
          wIm[target]! += shareRe * wIm[q]! + shareIm * wRe[q]!;
        }
      }
      wRe[p] = shareRe;
      wIm[p] = shareIm;
    }
  }
  return { ok: true, factor: { symbolic, values, inverseRe, inverseIm, shareRe: wRe, shareIm: wIm } };
}
