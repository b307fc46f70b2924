/**
 * An elimination order of a symmetric matrix and the structure of L, "positions" being places in that order.
 * For every column the rows ascend, so that its first row is its parent in the elimination tree.
 */
export interface Elimination {
  n: number;
  /** position → unknown, and back. */
  order: Int32Array;
  position: Int32Array;
  /** Column k of L has rows rows[columns[k] … columns[k + 1] − 1], by position. */
  columns: Int32Array;
  rows: Int32Array;
  /** Given pair → its place in `rows`. */
  place: Int32Array;
}

/**
 * Minimum degree on the explicit elimination graph: of the unknowns that are left, one with the fewest neighbours goes
 * next (Tinney and Walker 1967, scheme 2), which takes leaves first, then the insides of chains. `a` and `b` are the
 * coupled pairs, a ≠ b, repeated or not. In the time of the fill; rings of buildings are small.
 */
export function eliminate(n: number, a: ArrayLike<number>, b: ArrayLike<number>): Elimination {
  const graph = new EliminationGraph(n, a, b);
  const order = new Int32Array(n);
  const position = new Int32Array(n);
  const columns = new Int32Array(n + 1);
  let rows = new Int32Array(2 * a.length + 16);
  let size = 0;
  for (let k = 0; k < n; k++) {
    const unknown = graph.takeLowest();
    order[k] = unknown;
    position[unknown] = k;
    const degree = graph.eliminate(unknown);
    if (size + degree > rows.length) rows = grown(rows, 2 * (size + degree));
    for (let i = 0; i < degree; i++) rows[size++] = graph.around[i]!;
    columns[k + 1] = size;
  }
  rows = rows.slice(0, size);
  for (let p = 0; p < size; p++) rows[p] = position[rows[p]!]!;
  for (let k = 0; k < n; k++) sortAscending(rows, columns[k]!, columns[k + 1]!);
  const place = new Int32Array(a.length);
  for (let e = 0; e < a.length; e++) place[e] = placeIn(columns, rows, position[a[e]!]!, position[b[e]!]!);
  return { n, order, position, columns, rows, place };
}

/** Where the entry of L lies that joins two positions, which do meet in it. */
export function placeIn(columns: Int32Array, rows: Int32Array, a: number, b: number): number {
  const row = Math.max(a, b);
  let at = columns[Math.min(a, b)]!;
  while (rows[at] !== row) at++;
  return at;
}

const grown = (list: Int32Array, length: number): Int32Array<ArrayBuffer> => {
  const next = new Int32Array(length);
  next.set(list);
  return next;
};

/** Insertion sort: columns have a few rows. */
function sortAscending(list: Int32Array, from: number, end: number): void {
  for (let i = from + 1; i < end; i++) {
    const value = list[i]!;
    let j = i - 1;
    for (; j >= from && list[j]! > value; j--) list[j + 1] = list[j]!;
    list[j + 1] = value;
  }
}

/** Adjacency as linked half edges, and unknowns in linked lists by their number of neighbours. */
class EliminationGraph {
  /** Neighbours of the unknown eliminated last. */
  around: Int32Array = new Int32Array(16);
  private readonly head: Int32Array;
  private node: Int32Array;
  private next: Int32Array;
  private used = 0;
  private readonly degree: Int32Array;
  private readonly mark: Int32Array;
  private readonly first: Int32Array;
  private readonly after: Int32Array;
  private readonly before: Int32Array;
  private lowest = 0;

  constructor(n: number, a: ArrayLike<number>, b: ArrayLike<number>) {
    this.head = new Int32Array(n).fill(-1);
    this.node = new Int32Array(2 * a.length + 16);
    this.next = new Int32Array(2 * a.length + 16);
    this.degree = new Int32Array(n);
    this.mark = new Int32Array(n).fill(-1);
    this.first = new Int32Array(n + 1).fill(-1);
    this.after = new Int32Array(n);
    this.before = new Int32Array(n);
    for (let e = a.length - 1; e >= 0; e--) {
      this.join(a[e]!, b[e]!);
      this.join(b[e]!, a[e]!);
    }
    for (let i = n - 1; i >= 0; i--) {
      this.unlink(i, -1);
      this.put(i);
    }
    this.mark.fill(-1);
  }

  /** An unknown with the fewest neighbours, out of the lists. */
  takeLowest(): number {
    while (this.first[this.lowest]! < 0) this.lowest++;
    const unknown = this.first[this.lowest]!;
    this.take(unknown);
    return unknown;
  }

  /** Makes the neighbours of `unknown` neighbours of each other; they are left in `around`, their number returned. */
  eliminate(unknown: number): number {
    let count = 0;
    if (this.degree[unknown]! > this.around.length) this.around = new Int32Array(2 * this.degree[unknown]!);
    for (let h = this.head[unknown]!; h >= 0; h = this.next[h]!) this.around[count++] = this.node[h]!;
    for (let i = 0; i < count; i++) {
      const at = this.around[i]!;
      this.take(at);
      this.unlink(at, unknown);
      if (count > 1)
        for (let j = 0; j < count; j++) {
          const other = this.around[j]!;
          if (other !== at && this.mark[other] !== at) {
            this.join(at, other);
            this.degree[at]!++;
          }
        }
    }
    for (let i = 0; i < count; i++) {
      // Marks are by unknown, and an unknown can be a neighbour again: forget what this step marked.
      this.forget(this.around[i]!);
      this.put(this.around[i]!);
    }
    return count;
  }

  private join(from: number, to: number): void {
    if (this.used === this.node.length) {
      this.node = grown(this.node, 2 * this.used);
      this.next = grown(this.next, 2 * this.used);
    }
    this.node[this.used] = to;
    this.next[this.used] = this.head[from]!;
    this.head[from] = this.used++;
  }

  /** Takes `gone` and repetitions out of a list, marks who is left with the owner's number, and counts them. */
  private unlink(owner: number, gone: number): void {
    let last = -1;
    let count = 0;
    for (let h = this.head[owner]!; h >= 0; h = this.next[h]!) {
      const other = this.node[h]!;
      if (other === gone || this.mark[other] === owner) {
        if (last < 0) this.head[owner] = this.next[h]!;
        else this.next[last] = this.next[h]!;
        continue;
      }
      this.mark[other] = owner;
      last = h;
      count++;
    }
    this.degree[owner] = count;
  }

  private forget(owner: number): void {
    for (let h = this.head[owner]!; h >= 0; h = this.next[h]!) this.mark[this.node[h]!] = -1;
  }

  private put(unknown: number): void {
    const d = this.degree[unknown]!;
    const first = this.first[d]!;
    this.after[unknown] = first;
    this.before[unknown] = -1;
    if (first >= 0) this.before[first] = unknown;
    this.first[d] = unknown;
    if (d < this.lowest) this.lowest = d;
  }

  private take(unknown: number): void {
    const { before, after } = this;
    if (before[unknown]! >= 0) after[before[unknown]!] = after[unknown]!;
    else this.first[this.degree[unknown]!] = after[unknown]!;
    if (after[unknown]! >= 0) before[after[unknown]!] = before[unknown]!;
  }
}
