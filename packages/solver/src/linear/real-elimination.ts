import { type Elimination, placeIn } from './elimination.ts';

/** LDLᵀ of a real symmetric M-matrix, given as branches and shunts, never as a diagonal. */
export interface RealFactor {
  elimination: Elimination;
  /** Per column: 1 / pivot. */
  inverse: Float64Array;
  /** Per entry of `elimination.rows`: branches on entry to `factorReal`, then branch ÷ pivot, that is −L. */
  share: Float64Array;
}

/**
 * Factors positions from … end − 1, which nothing outside them couples to: branches are in `factor.share`, `shunt` is
 * by position (siemens; overwritten). Nothing is subtracted, so that every pivot is good to a few units in the last
 * place (Grassmann, Taksar and Heyman 1985). Returns −1, or the unknown whose pivot is not there.
 */
export function factorReal(factor: RealFactor, shunt: Float64Array, from: number, end: number): number {
  const { order, columns, rows } = factor.elimination;
  const { inverse, share: w } = factor;
  for (let k = from; k < end; k++) {
    const first = columns[k]!;
    const last = columns[k + 1]!;
    const own = shunt[k]!;
    let pivot = own;
    for (let p = first; p < last; p++) pivot += w[p]!;
    if (!(pivot > 0)) return order[k]!;
    inverse[k] = 1 / pivot;
    for (let p = first; p < last; p++) {
      const part = w[p]! * inverse[k]!;
      const row = rows[p]!;
      shunt[row]! += part * own;
      // Rows ascend in both columns: one walk along the parent's finds all that the pair meets in.
      for (let q = p + 1, at = columns[row]!; q < last; q++) {
        while (rows[at] !== rows[q]) at++;
        w[at]! += part * w[q]!;
      }
      w[p] = part;
    }
  }
  return -1;
}

/** Solves positions from … end − 1 in place; `x` is by position on entry and on return. */
export function solveReal(factor: RealFactor, x: Float64Array, from: number, end: number): void {
  const { inverse, share } = factor;
  const { columns, rows } = factor.elimination;
  for (let k = from; k < end; k++)
    for (let p = columns[k]!; p < columns[k + 1]!; p++) x[rows[p]!]! += share[p]! * x[k]!;
  for (let k = end - 1; k >= from; k--) {
    let value = x[k]! * inverse[k]!;
    for (let p = columns[k]!; p < columns[k + 1]!; p++) value += share[p]! * x[rows[p]!]!;
    x[k] = value;
  }
}

/**
 * Diagonal of the inverse, by position: the resistance that each unknown sees. Only what lies in the structure of L is
 * worked out, from the last column back (Takahashi, Fagan and Chen 1973).
 */
export function inverseDiagonal({ elimination, inverse, share }: RealFactor): Float64Array {
  const { n, columns, rows } = elimination;
  const diagonal = new Float64Array(n);
  const z = new Float64Array(rows.length);
  const entry = (a: number, b: number): number => (a === b ? diagonal[a]! : z[placeIn(columns, rows, a, b)]!);
  for (let k = n - 1; k >= 0; k--) {
    const first = columns[k]!;
    const last = columns[k + 1]!;
    for (let p = first; p < last; p++) {
      let sum = 0;
      for (let q = first; q < last; q++) sum += share[q]! * entry(rows[q]!, rows[p]!);
      z[p] = sum;
    }
    let own = inverse[k]!;
    for (let p = first; p < last; p++) own += share[p]! * z[p]!;
    diagonal[k] = own;
  }
  return diagonal;
}
