import type { Pattern } from './pattern.ts';

/**
 * Elimination order, leaves first: order[k] = unknown that is eliminated k-th.
 * Unknowns with at most one neighbour left are peeled in O(n): the only edge left at a leaf is the xor of its
 * edges' numbers. What remains (rings, transformers) goes by minimum degree on the explicit elimination graph;
 * in a building that core is small. Radial networks get no fill-in.
 */
export function leafFirstOrder(pattern: Pattern): Int32Array {
  const { n, edgeA, edgeB } = pattern;
  const order = new Int32Array(n);
  const degree = new Int32Array(n);
  const edges = new Int32Array(n);
  for (let e = 0; e < pattern.edgeCount; e++) {
    const a = edgeA[e]!;
    const b = edgeB[e]!;
    degree[a]!++;
    degree[b]!++;
    edges[a]! ^= e;
    edges[b]! ^= e;
  }
  const done = new Uint8Array(n);
  let filled = 0;
  for (let i = 0; i < n; i++) {
    let at = i;
    while (!done[at] && degree[at]! <= 1) {
      done[at] = 1;
      order[filled++] = at;
      if (degree[at] === 0) break;
      const e = edges[at]!;
      const parent = edgeA[e] === at ? edgeB[e]! : edgeA[e]!;
      degree[parent]!--;
      edges[parent]! ^= e;
      // A parent numbered higher is met later by the outer loop; a lower one must be followed now.
      if (parent > i) break;
      at = parent;
    }
  }
  if (filled < n) appendMinimumDegree(pattern, done, order, filled);
  return order;
}

/** Minimum degree on what the peel left; ties go to the lower number, so that the order is reproducible. */
function appendMinimumDegree(pattern: Pattern, done: Uint8Array, order: Int32Array, from: number): void {
  const { n, start, neighbour } = pattern;
  const adjacent = new Map<number, Set<number>>();
  for (let i = 0; i < n; i++) {
    if (done[i]) continue;
    const set = new Set<number>();
    for (let p = start[i]!; p < start[i + 1]!; p++) if (!done[neighbour[p]!]) set.add(neighbour[p]!);
    adjacent.set(i, set);
  }
  const buckets: number[][] = [];
  const put = (i: number) => {
    const degree = adjacent.get(i)!.size;
    while (buckets.length <= degree) buckets.push([]);
    buckets[degree]!.push(i);
  };
  for (const i of [...adjacent.keys()].reverse()) put(i);
  let filled = from;
  let low = 0;
  while (filled < n) {
    while (low < buckets.length && buckets[low]!.length === 0) low++;
    const i = buckets[low]!.pop()!;
    const around = adjacent.get(i);
    if (!around || around.size !== low) continue;
    order[filled++] = i;
    adjacent.delete(i);
    const members = [...around];
    for (const m of members) {
      const set = adjacent.get(m)!;
      set.delete(i);
      for (const other of members) if (other !== m) set.add(other);
    }
    for (const m of members) put(m);
    low = Math.max(0, low - 1);
  }
}
