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

/** Symbolic analysis: once per topology; any set of values can be factored on it. */
export function analyse(pattern: Pattern, order: Int32Array = leafFirstOrder(pattern)): Symbolic {
  const { n, start, neighbour } = pattern;
  const position = new Int32Array(n);
  for (let k = 0; k < n; k++) position[order[k]!] = k;

  const parent = new Int32Array(n).fill(-1);
  const children: number[][] = [];
  const structure: Int32Array[] = new Array(n);
  const mark = new Int32Array(n).fill(-1);
  const columns = new Int32Array(n + 1);
  for (let k = 0; k < n; k++) {
    mark[k] = k;
    const found: number[] = [];
    const i = order[k]!;
    for (let p = start[i]!; p < start[i + 1]!; p++) {
      const row = position[neighbour[p]!]!;
      if (row > k && mark[row] !== k) {
        mark[row] = k;
        found.push(row);
      }
    }
    for (const child of children[k] ?? [])
      for (const row of structure[child]!)
        if (mark[row] !== k) {
          mark[row] = k;
          found.push(row);
        }
    const rows = Int32Array.from(found).sort();
    structure[k] = rows;
    columns[k + 1] = columns[k]! + rows.length;
    if (rows.length > 0) {
      const up = rows[0]!;
      parent[k] = up;
      if (rows.length > 1) {
        const list = children[up];
        if (list) list.push(k);
        else children[up] = [k];
      }
    }
  }
  const rows = new Int32Array(columns[n]!);
  for (let k = 0; k < n; k++) rows.set(structure[k]!, columns[k]!);
  return {
    pattern,
    n,
    order,
    position,
    parent,
    columns,
    rows,
    place: edgePlaces(pattern, position, columns, rows),
  };
}

function edgePlaces(
  pattern: Pattern,
  position: Int32Array,
  columns: Int32Array,
  rows: Int32Array,
): Int32Array {
  const place = new Int32Array(pattern.edgeCount);
  for (let e = 0; e < pattern.edgeCount; e++) {
    const a = position[pattern.edgeA[e]!]!;
    const b = position[pattern.edgeB[e]!]!;
    const column = Math.min(a, b);
    const row = Math.max(a, b);
    let low = columns[column]!;
    let high = columns[column + 1]! - 1;
    while (low < high) {
      const middle = (low + high) >> 1;
      if (rows[middle]! < row) low = middle + 1;
      else high = middle;
    }
    place[e] = low;
  }
  return place;
}
