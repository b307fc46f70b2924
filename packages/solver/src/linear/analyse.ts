import { leafFirstOrder } from './ordering.ts';
import type { Pattern } from './pattern.ts';

/**
 * What depends on the pattern alone, in elimination order ("position" 0 … n − 1):
 * the structure of L by columns (row positions ascending) and the elimination tree.
 */
export interface Symbolic {
  pattern: Pattern;
  n: number;
  /** position → unknown, and back. */
  order: Int32Array;
  position: Int32Array;
  /** Elimination tree: the first row of each column of L, −1 at a root. Always larger than the column. */
  parent: Int32Array;
  /** Column k of L has rows rows[columns[k] … columns[k + 1] − 1]. */
  columns: Int32Array;
  rows: Int32Array;
  /** Stored edge of the pattern → its place in `rows`. */
  place: Int32Array;
}

/**
 * Symbolic analysis: once per topology; any set of values can be factored on it. In the time of the entries of L: for
 * each row, the columns that reach it are those on the paths of the elimination tree from its earlier neighbours up
 * to it (Liu 1986; Davis, Algorithm 849, 2005).
 */
export function analyse(pattern: Pattern, order: Int32Array = leafFirstOrder(pattern)): Symbolic {
  const { n, start, neighbour, edge } = pattern;
  const position = new Int32Array(n);
  for (let k = 0; k < n; k++) position[order[k]!] = k;

  const parent = new Int32Array(n).fill(-1);
  const mark = new Int32Array(n).fill(-1);
  const columns = new Int32Array(n + 1);
  for (let k = 0; k < n; k++) {
    mark[k] = k;
    const i = order[k]!;
    for (let p = start[i]!; p < start[i + 1]!; p++)
      for (let c = position[neighbour[p]!]!; c < k && mark[c] !== k; c = parent[c]!) {
        if (parent[c] === -1) parent[c] = k;
        mark[c] = k;
        columns[c + 1]!++;
      }
  }
  for (let k = 0; k < n; k++) columns[k + 1]! += columns[k]!;

  // Rows arrive in ascending order, so each column's newest one is its last.
  const rows = new Int32Array(columns[n]!);
  const next = columns.slice(0, n);
  const place = new Int32Array(pattern.edgeCount);
  mark.fill(-1);
  for (let k = 0; k < n; k++) {
    mark[k] = k;
    const i = order[k]!;
    for (let p = start[i]!; p < start[i + 1]!; p++) {
      const from = position[neighbour[p]!]!;
      if (from >= k) continue;
      for (let c = from; mark[c] !== k; c = parent[c]!) {
        mark[c] = k;
        rows[next[c]!++] = k;
      }
      place[edge[p]!] = next[from]! - 1;
    }
  }
  return { pattern, n, order, position, parent, columns, rows, place };
}
