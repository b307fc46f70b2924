import { type Elimination, eliminate } from './elimination.ts';
import type { Forest } from './forest.ts';

/**
 * The rings of a network over its spanning forest. Steps that some chord closes a ring through form pieces without
 * bridges; each is a small system of its own, grounded at its top: the step nearest to the source, which all that the
 * piece carries flows through.
 */
export interface Rings {
  /** Unknown → step, ascending. */
  step: Int32Array;
  /** Unknown → step of its piece's top (`forest.count` for the source), which is not in the piece's system. */
  top: Int32Array;
  /**
   * Piece g has positions pieces[g] … pieces[g + 1] − 1 of the elimination, and firstStep[g] is its smallest step.
   * First steps descend: a piece comes after all that hang on it.
   */
  pieces: Int32Array;
  firstStep: Int32Array;
  /** Pairs of coupled unknowns and the run between them. */
  elimination: Elimination;
  pairA: Int32Array;
  pairB: Int32Array;
  pairRun: Int32Array;
  /** Runs between an unknown and its top. */
  tied: Int32Array;
  tiedRun: Int32Array;
}

/** The pieces of a forest with its chords, near-linear in the steps that they hold; `null` where there is no ring. */
export function ringsOf({ count, near, run, chords, chordA, chordB }: Forest): Rings | null {
  if (chords.length === 0) return null;
  // above[x]: some step of x's piece nearer to the source, itself where none is known (a forest with path halving).
  const above = new Int32Array(count + 1);
  for (let k = 0; k <= count; k++) above[k] = k;
  const topOf = (k: number): number => {
    let at = k;
    while (above[at] !== at) {
      above[at] = above[above[at]!]!;
      at = above[at]!;
    }
    return at;
  };
  const depth = (k: number) => (k === count ? -1 : k);
  for (let c = 0; c < chords.length; c++) {
    let a = topOf(chordA[c]!);
    let b = topOf(chordB[c]!);
    while (a !== b) {
      // Parents come first, so the later step cannot be an ancestor of the other.
      if (depth(a) < depth(b)) [a, b] = [b, a];
      above[a] = near[a]!;
      a = topOf(a);
    }
  }
  const unknown = new Int32Array(count + 1).fill(-1);
  let unknowns = 0;
  for (let k = 0; k < count; k++) if (above[k] !== k) unknown[k] = unknowns++;
  const step = new Int32Array(unknowns);
  const top = new Int32Array(unknowns);
  for (let k = 0; k < count; k++)
    if (above[k] !== k) {
      step[unknown[k]!] = k;
      top[unknown[k]!] = topOf(k);
    }
  const coupled = new Runs(unknowns + chords.length);
  const tied = new Runs(unknowns + chords.length);
  const couple = (a: number, b: number, e: number) => {
    const i = unknown[a]!;
    const j = unknown[b]!;
    // The top of one piece is an unknown of no other: pieces that share a bus are one piece.
    if (i < 0 || j < 0) tied.push(i < 0 ? j : i, -1, e);
    else if (i !== j) coupled.push(i, j, e);
  };
  for (let u = 0; u < unknowns; u++) {
    const k = step[u]!;
    couple(k, near[k]!, run ? run[k]! : k);
  }
  for (let c = 0; c < chords.length; c++)
    if (chordA[c] !== chordB[c]) couple(chordA[c]!, chordB[c]!, chords[c]!);
  const pairA = coupled.a.subarray(0, coupled.count);
  const pairB = coupled.b.subarray(0, coupled.count);
  return {
    step,
    top,
    ...byPiece(eliminate(unknowns, pairA, pairB), step, top, count),
    pairA,
    pairB,
    pairRun: coupled.run.subarray(0, coupled.count),
    tied: tied.a.subarray(0, tied.count),
    tiedRun: tied.run.subarray(0, tied.count),
  };
}

/** The same elimination piece by piece: pieces are not coupled, so that their columns may be taken in any order. */
function byPiece(
  mixed: Elimination,
  step: Int32Array,
  top: Int32Array,
  count: number,
): Pick<Rings, 'elimination' | 'pieces' | 'firstStep'> {
  const { n, order, position, columns, rows, place } = mixed;
  const pieceOfTop = new Int32Array(count + 1).fill(-1);
  const firsts: number[] = [];
  for (let u = 0; u < n; u++) if (pieceOfTop[top[u]!]! < 0) pieceOfTop[top[u]!] = firsts.push(step[u]!) - 1;
  const pieceCount = firsts.length;
  const firstStep = Int32Array.from(firsts).reverse();
  const pieceOf = (u: number) => pieceCount - 1 - pieceOfTop[top[u]!]!;
  const pieces = new Int32Array(pieceCount + 1);
  for (let u = 0; u < n; u++) pieces[pieceOf(u) + 1]!++;
  for (let g = 0; g < pieceCount; g++) pieces[g + 1]! += pieces[g]!;
  const next = pieces.slice(0, pieceCount);
  const moved = new Int32Array(n);
  for (let k = 0; k < n; k++) moved[k] = next[pieceOf(order[k]!)]!++;
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
  const shift = new Int32Array(rows.length);
  for (let k = 0; k < n; k++) {
    const by = sorted.columns[moved[k]!]! - columns[k]!;
    for (let p = columns[k]!; p < columns[k + 1]!; p++) {
      sorted.rows[p + by] = moved[rows[p]!]!;
      shift[p] = p + by;
    }
  }
  for (let e = 0; e < place.length; e++) sorted.place[e] = shift[place[e]!]!;
  return { elimination: sorted, pieces, firstStep };
}

/** Runs between unknowns, in arrays as long as they can become. */
class Runs {
  count = 0;
  readonly a: Int32Array;
  readonly b: Int32Array;
  readonly run: Int32Array;
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
}
