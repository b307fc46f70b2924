import { type Complex, inverse, isZero, mul, neg, sub, ZERO } from './complex.ts';
import { type Decimal, largest, NIL } from './decimal.ts';

/** A full square matrix, row by row; what is missing is zero and costs nothing. */
export type Matrix = (Complex | undefined)[][];

/** Gaussian elimination: `order` holds the rows as they were taken, `pivots` one over each diagonal entry. */
export interface Factors {
  readonly rows: Matrix;
  readonly order: number[];
  readonly pivots: Complex[];
}

/** A diagonal entry is taken unless another of its column is so many times as large: it keeps zeros where they are. */
const MUCH_LARGER = 1000;
/** Below this share of the largest entry nothing is left of fifty digits. */
const NOTHING = '1e-40';

const size = (a: Complex | undefined): Decimal => (a ? a.re.abs().plus(a.im.abs()) : NIL);

/** Factors `rows` in place; throws where they are singular. */
export const factor = (rows: Matrix): Factors => {
  const n = rows.length;
  const order = rows.map((_, k) => k);
  const pivots: Complex[] = [];
  const top = n === 0 ? NIL : largest(rows.flat().map(size));
  for (let k = 0; k < n; k++) {
    let best = k;
    let most = size(rows[order[k]!]![k]).times(MUCH_LARGER);
    for (let i = k + 1; i < n; i++) {
      const here = size(rows[order[i]!]![k]);
      if (here.gt(most)) [best, most] = [i, here];
    }
    [order[k], order[best]] = [order[best]!, order[k]!];
    const pivot = rows[order[k]!]!;
    if (!size(pivot[k]).gt(top.times(NOTHING))) throw new Error(`singular at column ${k}`);
    const each = inverse(pivot[k]!);
    pivots.push(each);
    for (let i = k + 1; i < n; i++) {
      const row = rows[order[i]!]!;
      const entry = row[k];
      if (!entry || isZero(entry)) continue;
      const share = mul(entry, each);
      row[k] = share;
      for (let j = k + 1; j < n; j++) {
        const above = pivot[j];
        if (above) row[j] = row[j] ? sub(row[j]!, mul(share, above)) : neg(mul(share, above));
      }
    }
  }
  return { rows, order, pivots };
};

export const backSolve = ({ rows, order, pivots }: Factors, right: readonly Complex[]): Complex[] => {
  const n = rows.length;
  const x: Complex[] = Array.from({ length: n }, () => ZERO);
  const without = (row: Matrix[number], from: number, to: number, start: Complex): Complex => {
    let sum = start;
    for (let j = from; j < to; j++) if (row[j] && !isZero(x[j]!)) sum = sub(sum, mul(row[j]!, x[j]!));
    return sum;
  };
  for (let i = 0; i < n; i++) x[i] = without(rows[order[i]!]!, 0, i, right[order[i]!]!);
  for (let i = n - 1; i >= 0; i--) x[i] = mul(without(rows[order[i]!]!, i + 1, n, x[i]!), pivots[i]!);
  return x;
};
