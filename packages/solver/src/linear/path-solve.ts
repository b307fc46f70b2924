import type { Factor } from './factor.ts';

/**
 * Solves for a few unknowns from right sides that touch a few unknowns, in the time of their paths to the root
 * of the elimination tree instead of the whole job. The set of columns is closed once (`reach`) and used for any
 * number of right sides.
 */
export interface PathSolver {
  /** Closes `unknowns` over the elimination tree; returns the number of columns. */
  reach(unknowns: ArrayLike<number>): number;
  /** Sets the right side to zero on the columns reached. */
  clear(): void;
  /** Adds to the right side at an unknown that was reached. */
  add(unknown: number, re: number, im: number): void;
  /** After it `re` and `im` hold the solution at each unknown reached. */
  solve(): void;
  re(unknown: number): number;
  im(unknown: number): number;
}

export function pathSolver(factor: Factor): PathSolver {
  const { n, position, parent, columns, rows } = factor.symbolic;
  const { inverseRe, inverseIm, shareRe, shareIm } = factor;
  const bRe = new Float64Array(n);
  const bIm = new Float64Array(n);
  const marked = new Int32Array(n).fill(-1);
  let generation = 0;
  let path = new Int32Array(0);

  return {
    reach(unknowns) {
      generation++;
      const found: number[] = [];
      for (let u = 0; u < unknowns.length; u++)
        for (let k = position[unknowns[u]!]!; k >= 0 && marked[k] !== generation; k = parent[k]!) {
          marked[k] = generation;
          found.push(k);
        }
      path = Int32Array.from(found).sort();
      return path.length;
    },
    clear() {
      for (const k of path) {
        bRe[k] = 0;
        bIm[k] = 0;
      }
    },
    add(unknown, re, im) {
      const k = position[unknown]!;
      bRe[k]! += re;
      bIm[k]! += im;
    },
    solve() {
      for (const k of path) {
        const r = bRe[k]!;
        const i = bIm[k]!;
        if (r === 0 && i === 0) continue;
        for (let p = columns[k]!; p < columns[k + 1]!; p++) {
          bRe[rows[p]!]! += shareRe[p]! * r - shareIm[p]! * i;
          bIm[rows[p]!]! += shareRe[p]! * i + shareIm[p]! * r;
        }
      }
      for (let at = path.length - 1; at >= 0; at--) {
        const k = path[at]!;
        const r = bRe[k]!;
        const i = bIm[k]!;
        let xRe = inverseRe[k]! * r - inverseIm[k]! * i;
        let xIm = inverseRe[k]! * i + inverseIm[k]! * r;
        for (let p = columns[k]!; p < columns[k + 1]!; p++) {
          const row = rows[p]!;
          xRe += shareRe[p]! * bRe[row]! - shareIm[p]! * bIm[row]!;
          xIm += shareRe[p]! * bIm[row]! + shareIm[p]! * bRe[row]!;
        }
        bRe[k] = xRe;
        bIm[k] = xIm;
      }
    },
    re: (unknown) => bRe[position[unknown]!]!,
    im: (unknown) => bIm[position[unknown]!]!,
  };
}
