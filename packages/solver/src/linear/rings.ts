import { type Elimination, eliminate } from './elimination.ts';
import type { Forest } from './forest.ts';

/**
 * The rings of a network over its spanning forest, by pieces: two runs are in one piece where some ring leads through
 * both. A piece is a small system of its own, grounded at its top, the bus nearest to the source, which all that the
 * piece carries flows through; that bus may well be inside the next piece. An unknown is a step whose run is in a ring.
 */
export interface Rings {
  /** Unknown → step, ascending, and the step that tops its piece (`forest.count` for the source). */
  step: Int32Array;
  top: Int32Array;
  /**
   * Piece g has positions pieces[g] … pieces[g + 1] − 1 of the elimination, and firstStep[g] is its smallest step.
   * First steps descend: a piece comes after all that hang on it.
   */
  pieces: Int32Array;
  firstStep: Int32Array;
  elimination: Elimination;
  coupled: PieceRuns;
  tied: PieceRuns;
}

/** Runs of rings piece by piece: those of piece g are start[g] … start[g + 1] − 1. */
export interface PieceRuns {
  start: Int32Array;
  run: Int32Array;
  /** The unknowns that a run joins; for one that ends at its piece's top, `b` is −1. */
  a: Int32Array;
  b: Int32Array;
}

/** The pieces of a forest with its chords, near-linear in the steps that they hold; `null` where there is no ring. */
export function ringsOf(forest: Forest): Rings | null {
  const { count, near, run, chords, chordA, chordB } = forest;
  if (chords.length === 0) return null;
  const classes = new RunClasses(forest);
  for (let c = 0; c < chords.length; c++) classes.close(chordA[c]!, chordB[c]!);

  const unknown = new Int32Array(count + 1).fill(-1);
  let unknowns = 0;
  for (let k = 0; k < count; k++) if (classes.inRing(k)) unknown[k] = unknowns++;
  const step = new Int32Array(unknowns);
  const top = new Int32Array(unknowns);
  const piece = new Int32Array(unknowns);
  const numberOf = new Int32Array(count).fill(-1);
  const firsts: number[] = [];
  for (let k = 0; k < count; k++) {
    const u = unknown[k]!;
    if (u < 0) continue;
    const leader = classes.find(k);
    if (numberOf[leader]! < 0) numberOf[leader] = firsts.push(k) - 1;
    step[u] = k;
    top[u] = classes.topOf(leader);
    piece[u] = numberOf[leader]!;
  }
  for (let u = 0; u < unknowns; u++) piece[u] = firsts.length - 1 - piece[u]!;

  const coupled = new RunList(unknowns + chords.length);
  const tied = new RunList(unknowns + chords.length);
  const couple = (a: number, b: number, e: number) => {
    // The run belongs to the piece of its end farther out; whatever else the other end is in does not matter.
    const [u, other] = a < count && (b === count || a > b) ? [unknown[a]!, b] : [unknown[b]!, a];
    if (other === top[u]) tied.push(u, -1, e);
    else coupled.push(u, unknown[other]!, e);
  };
  for (let u = 0; u < unknowns; u++) couple(step[u]!, near[step[u]!]!, run ? run[step[u]!]! : step[u]!);
  for (let c = 0; c < chords.length; c++)
    if (chordA[c] !== chordB[c]) couple(chordA[c]!, chordB[c]!, chords[c]!);
  const inPieces = coupled.byPiece(piece, firsts.length);
  return {
    step,
    top,
    firstStep: Int32Array.from(firsts).reverse(),
    ...ordered(eliminate(unknowns, inPieces.a, inPieces.b), piece, firsts.length),
    coupled: inPieces,
    tied: tied.byPiece(piece, firsts.length),
  };
}

/**
 * Runs of the tree in classes that grow as chords close rings. A class is a connected piece of the tree with a top, and
 * leads from each of its steps to it, so that a ring passes it in one leap. (Fundamental rings that share a run
 * generate the pieces: Whitney 1935.)
 */
class RunClasses {
  private readonly leader: Int32Array;
  /** By leader; −1 at the steps that are in no ring. */
  private readonly top: Int32Array;
  private readonly near: Int32Array;
  private readonly count: number;

  constructor({ count, near }: Forest) {
    this.count = count;
    this.near = near;
    this.leader = new Int32Array(count);
    for (let k = 0; k < count; k++) this.leader[k] = k;
    this.top = new Int32Array(count).fill(-1);
  }

  inRing(k: number): boolean {
    return this.leader[k] !== k || this.top[k]! >= 0;
  }

  topOf(leader: number): number {
    return this.top[leader]!;
  }

  find(k: number): number {
    const { leader } = this;
    let at = k;
    while (leader[at] !== at) {
      leader[at] = leader[leader[at]!]!;
      at = leader[at]!;
    }
    return at;
  }

  /** All runs of the tree between two steps become one class. */
  close(from: number, to: number): void {
    let a = from;
    let b = to;
    let into = -1;
    while (a !== b) {
      // Parents come first, so that the later step cannot be an ancestor of the other.
      if (a === this.count || (b !== this.count && a < b)) [a, b] = [b, a];
      const found = this.find(a);
      if (this.top[found]! < 0) this.top[found] = this.near[a]!;
      a = this.top[found]!;
      into = into < 0 ? found : this.join(into, found);
    }
  }

  private join(a: number, b: number): number {
    if (a === b) return a;
    this.leader[b] = a;
    const { top, count } = this;
    if (top[a] !== count && (top[b] === count || top[b]! < top[a]!)) top[a] = top[b]!;
    return a;
  }
}

/** Runs between unknowns, in arrays as long as they can become. */
class RunList {
  private count = 0;
  private readonly a: Int32Array;
  private readonly b: Int32Array;
  private readonly run: Int32Array;
  constructor(most: number) {
    this.a = new Int32Array(most);
    this.b = new Int32Array(most);
    this.run = new Int32Array(most);
  }
  push(a: number, b: number, run: number): void {
    this.a[this.count] = a;
    this.b[this.count] = b;
    this.run[this.count++] = run;
  }
  byPiece(piece: Int32Array, pieceCount: number): PieceRuns {
    const { a, b, run, count } = this;
    const start = new Int32Array(pieceCount + 1);
    for (let i = 0; i < count; i++) start[piece[a[i]!]! + 1]!++;
    for (let g = 0; g < pieceCount; g++) start[g + 1]! += start[g]!;
    const next = start.slice(0, pieceCount);
    const sorted = { start, run: new Int32Array(count), a: new Int32Array(count), b: new Int32Array(count) };
    for (let i = 0; i < count; i++) {
      const at = next[piece[a[i]!]!]!++;
      sorted.a[at] = a[i]!;
      sorted.b[at] = b[i]!;
      sorted.run[at] = run[i]!;
    }
    return sorted;
  }
}

/** The same elimination piece by piece: pieces are not coupled, so that their columns may be taken in any order. */
function ordered(
  mixed: Elimination,
  piece: Int32Array,
  pieceCount: number,
): Pick<Rings, 'elimination' | 'pieces'> {
  const { n, order, position, columns, rows, place } = mixed;
  const pieces = new Int32Array(pieceCount + 1);
  for (let u = 0; u < n; u++) pieces[piece[u]! + 1]!++;
  for (let g = 0; g < pieceCount; g++) pieces[g + 1]! += pieces[g]!;
  const next = pieces.slice(0, pieceCount);
  const moved = new Int32Array(n);
  for (let k = 0; k < n; k++) moved[k] = next[piece[order[k]!]!]!++;
  const sorted: Elimination = {
    n,
    order: new Int32Array(n),
    position: new Int32Array(n),
    columns: new Int32Array(n + 1),
    rows: new Int32Array(rows.length),
    place: new Int32Array(place.length),
  };
  for (let k = 0; k < n; k++) {
    sorted.order[moved[k]!] = order[k]!;
    sorted.columns[moved[k]! + 1] = columns[k + 1]! - columns[k]!;
  }
  for (let k = 0; k < n; k++) sorted.columns[k + 1]! += sorted.columns[k]!;
  for (let u = 0; u < n; u++) sorted.position[u] = moved[position[u]!]!;
  const entry = new Int32Array(rows.length);
  for (let k = 0; k < n; k++) {
    const by = sorted.columns[moved[k]!]! - columns[k]!;
    for (let p = columns[k]!; p < columns[k + 1]!; p++) {
      sorted.rows[p + by] = moved[rows[p]!]!;
      entry[p] = p + by;
    }
  }
  for (let e = 0; e < place.length; e++) sorted.place[e] = entry[place[e]!]!;
  return { elimination: sorted, pieces };
}
