import { type Elimination, eliminate } from './elimination.ts';

/** What depends on the pattern of a symmetric matrix alone; any set of values can be factored on it. */
export interface Symbolic extends Elimination {
  /** The coupled pairs as given. */
  pairA: Int32Array;
  pairB: Int32Array;
  /** Elimination tree by position: the first row of each column of L, −1 at a root. Always larger than the column. */
  parent: Int32Array;
}

/**
 * Symbolic analysis of an n × n matrix from its coupled pairs (a[k], b[k]), a ≠ b, in any order, repeated or not: once
 * per topology. Radial networks get no fill-in.
 */
export function analyse(n: number, a: ArrayLike<number>, b: ArrayLike<number>): Symbolic {
  const elimination = eliminate(n, a, b);
  const { columns, rows } = elimination;
  const parent = new Int32Array(n);
  for (let k = 0; k < n; k++) parent[k] = columns[k] === columns[k + 1] ? -1 : rows[columns[k]!]!;
  return { ...elimination, pairA: Int32Array.from(a), pairB: Int32Array.from(b), parent };
}
