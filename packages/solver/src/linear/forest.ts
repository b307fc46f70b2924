/**
 * A spanning forest of a network, from its source outwards. Step k lays one bus upon an earlier one, so that a loop
 * over the steps meets parents before children, and the same loop backwards meets children first.
 */
export interface Forest {
  /** Steps, that is buses that a source reaches. */
  count: number;
  /** Step → step of its parent, `count` for the source itself: always the smaller but for the source. */
  near: Int32Array;
  /** Step → bus and step → run; `null` where they are the same numbers. */
  bus: Int32Array | null;
  run: Int32Array | null;
  /** Runs left over, each closing a ring between two steps (`count` for the source). */
  chords: Int32Array;
  chordA: Int32Array;
  chordB: Int32Array;
}

/**
 * Roots the network of `buses` buses and runs from[e]–to[e] at the source, which is the bus numbered `buses`.
 * O(buses + runs). A network whose runs are numbered like their far ends, parents before children, is taken as it
 * is; any other is peeled from its leaves. Buses that no source reaches have no step.
 */
export function forestOf(buses: number, from: Int32Array, to: Int32Array): Forest {
  return isGrown(buses, from, to) ? grownForest(buses, from, to) : peeledForest(buses, from, to);
}

function isGrown(buses: number, from: Int32Array, to: Int32Array): boolean {
  if (from.length < buses) return false;
  for (let e = 0; e < buses; e++) {
    const near = from[e]!;
    if (to[e] !== e || (near >= e && near !== buses)) return false;
  }
  return true;
}

function grownForest(buses: number, from: Int32Array, to: Int32Array): Forest {
  return {
    count: buses,
    near: from.subarray(0, buses),
    bus: null,
    run: null,
    chords: Int32Array.from({ length: from.length - buses }, (_, k) => buses + k),
    chordA: from.subarray(buses),
    chordB: to.subarray(buses),
  };
}

/**
 * Leaves are taken one after the other: the only run left at a leaf is the xor of its runs' numbers, so that no
 * adjacency is stored. What no leaf leads into (rings, and what joins them to the source) is searched breadth first.
 */
function peeledForest(buses: number, from: Int32Array, to: Int32Array): Forest {
  const degree = new Int32Array(buses + 1);
  const mixed = new Int32Array(buses + 1);
  for (let e = 0; e < from.length; e++) {
    const a = from[e]!;
    const b = to[e]!;
    degree[a]!++;
    degree[b]!++;
    mixed[a]! ^= e;
    mixed[b]! ^= e;
  }
  const bus = new Int32Array(buses);
  const run = new Int32Array(buses);
  const parent = new Int32Array(buses);
  // Leaves fill the lists from the end, so that the first bus to be peeled is the last step.
  let low = buses;
  for (let i = 0; i < buses; i++)
    for (let at = i; at < buses && degree[at] === 1; ) {
      const e = mixed[at]!;
      const next = from[e] === at ? to[e]! : from[e]!;
      bus[--low] = at;
      run[low] = e;
      parent[low] = next;
      degree[at] = 0;
      degree[next]!--;
      mixed[next]! ^= e;
      // A higher neighbour is met by the outer loop anyway.
      if (next > i) break;
      at = next;
    }
  const core = searchCore(buses, from, to, degree, bus, run, parent);
  return numbered(buses, from, to, { bus, run, parent, core, low });
}

/** Breadth first from the source over the buses that still have a degree; their steps come first. Returns how many. */
function searchCore(
  buses: number,
  from: Int32Array,
  to: Int32Array,
  degree: Int32Array,
  bus: Int32Array,
  run: Int32Array,
  parent: Int32Array,
): number {
  if (degree[buses] === 0) return 0;
  const start = new Int32Array(buses + 2);
  for (let i = 0; i <= buses; i++) start[i + 1] = start[i]! + degree[i]!;
  const fill = start.slice(0, buses + 1);
  const runs = new Int32Array(start[buses + 1]!);
  for (let e = 0; e < from.length; e++)
    if (degree[from[e]!]! > 0 && degree[to[e]!]! > 0) {
      runs[fill[from[e]!]!++] = e;
      runs[fill[to[e]!]!++] = e;
    }
  let found = 0;
  const seen = new Uint8Array(buses + 1);
  seen[buses] = 1;
  for (let head = -1; head < found; head++) {
    const at = head < 0 ? buses : bus[head]!;
    for (let p = start[at]!; p < start[at + 1]!; p++) {
      const e = runs[p]!;
      const next = from[e] === at ? to[e]! : from[e]!;
      if (seen[next]) continue;
      seen[next] = 1;
      bus[found] = next;
      run[found] = e;
      parent[found++] = at;
    }
  }
  return found;
}

interface Found {
  bus: Int32Array;
  run: Int32Array;
  parent: Int32Array;
  /** Steps 0 … core − 1 and low … buses − 1 are filled. */
  core: number;
  low: number;
}

/** Closes the gap between core and leaves, drops what hangs on no source, and turns parents into steps. */
function numbered(buses: number, from: Int32Array, to: Int32Array, found: Found): Forest {
  const { bus, run, parent, core, low } = found;
  const stepOf = new Int32Array(buses + 1).fill(-1);
  const near = new Int32Array(buses);
  const inForest = new Uint8Array(from.length);
  let count = 0;
  const source = buses;
  for (let k = 0; k < buses; k++) {
    if (k === core) k = low;
    if (k >= buses) break;
    const above = parent[k]!;
    inForest[run[k]!] = 1;
    if (above !== source && stepOf[above]! < 0) continue;
    near[count] = above === source ? source : stepOf[above]!;
    bus[count] = bus[k]!;
    run[count] = run[k]!;
    stepOf[bus[k]!] = count++;
  }
  if (count < buses) for (let k = 0; k < count; k++) if (near[k] === source) near[k] = count;
  stepOf[source] = count;
  const chords: number[] = [];
  for (let e = 0; e < from.length; e++)
    if (!inForest[e] && stepOf[from[e]!]! >= 0 && stepOf[to[e]!]! >= 0) chords.push(e);
  return {
    count,
    near: near.subarray(0, count),
    bus: bus.subarray(0, count),
    run: run.subarray(0, count),
    chords: Int32Array.from(chords),
    chordA: Int32Array.from(chords, (e) => stepOf[from[e]!]!),
    chordB: Int32Array.from(chords, (e) => stepOf[to[e]!]!),
  };
}
