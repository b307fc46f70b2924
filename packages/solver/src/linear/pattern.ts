/**
 * The graph of a symmetric matrix: n unknowns and the pairs of them that are coupled.
 * CSR adjacency without diagonal and without repeated pairs; `slot[k]` says at which stored edge the k-th
 * given pair ended up, so that values can be added up without another search.
 */
export interface Pattern {
  n: number;
  /** Stored edges, each once, as (a, b) with a < b. */
  edgeCount: number;
  edgeA: Int32Array;
  edgeB: Int32Array;
  /** Given pair → stored edge. */
  slot: Int32Array;
  /** CSR: neighbours of i are neighbour[start[i] … start[i + 1] − 1], reached over edge[same]. */
  start: Int32Array;
  neighbour: Int32Array;
  edge: Int32Array;
}

/**
 * Builds the pattern of an n × n symmetric matrix from coupled pairs (a[k], b[k]), a ≠ b, in any order, with
 * repetitions. O(n + pairs).
 */
export function patternOf(n: number, a: ArrayLike<number>, b: ArrayLike<number>): Pattern {
  const pairs = a.length;
  const bucket = new Int32Array(n + 1);
  for (let k = 0; k < pairs; k++) bucket[Math.min(a[k]!, b[k]!) + 1]!++;
  for (let i = 0; i < n; i++) bucket[i + 1]! += bucket[i]!;
  const order = new Int32Array(pairs);
  const fill = bucket.slice(0, n);
  for (let k = 0; k < pairs; k++) order[fill[Math.min(a[k]!, b[k]!)]!++] = k;

  const slot = new Int32Array(pairs);
  const edgeA = new Int32Array(pairs);
  const edgeB = new Int32Array(pairs);
  const seenFrom = new Int32Array(n).fill(-1);
  const seenEdge = new Int32Array(n);
  let edgeCount = 0;
  for (let i = 0; i < n; i++)
    for (let p = bucket[i]!; p < bucket[i + 1]!; p++) {
      const k = order[p]!;
      const j = Math.max(a[k]!, b[k]!);
      if (seenFrom[j] !== i) {
        seenFrom[j] = i;
        seenEdge[j] = edgeCount;
        edgeA[edgeCount] = i;
        edgeB[edgeCount] = j;
        edgeCount++;
      }
      slot[k] = seenEdge[j]!;
    }

  const start = new Int32Array(n + 1);
  for (let e = 0; e < edgeCount; e++) {
    start[edgeA[e]! + 1]!++;
    start[edgeB[e]! + 1]!++;
  }
  for (let i = 0; i < n; i++) start[i + 1]! += start[i]!;
  const next = start.slice(0, n);
  const neighbour = new Int32Array(2 * edgeCount);
  const edge = new Int32Array(2 * edgeCount);
  for (let e = 0; e < edgeCount; e++) {
    const i = edgeA[e]!;
    const j = edgeB[e]!;
    const p = next[i]!++;
    neighbour[p] = j;
    edge[p] = e;
    const q = next[j]!++;
    neighbour[q] = i;
    edge[q] = e;
  }
  return {
    n,
    edgeCount,
    edgeA: edgeA.slice(0, edgeCount),
    edgeB: edgeB.slice(0, edgeCount),
    slot,
    start,
    neighbour,
    edge,
  };
}
