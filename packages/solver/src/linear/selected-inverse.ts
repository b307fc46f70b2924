import { placeIn } from './elimination.ts';
import type { Factor } from './factor.ts';

/** Entries of the inverse of a factored matrix, ohm. */
export interface SelectedInverse {
  /** Entry (a, b) by unknown; `null` where the structure of L does not lead to it: then solve for it. */
  entry: (a: number, b: number) => readonly [re: number, im: number] | null;
}

/**
 * All entries of the inverse that lie in the structure of L, in one pass from the last column back (Takahashi, Fagan
 * and Chen 1973): every diagonal entry, which is what one ampere costs at its own place, in a small multiple of the
 * time of a solution. Entries between places of trees follow by their shares; unknowns of different trees of
 * elimination see nothing of each other.
 */
export function selectedInverse(factor: Factor): SelectedInverse {
  const { n, columns, rows, position, parent } = factor.symbolic;
  const { inverseRe, inverseIm, shareRe, shareIm } = factor;
  const diagonalRe = new Float64Array(n);
  const diagonalIm = new Float64Array(n);
  const zRe = new Float64Array(rows.length);
  const zIm = new Float64Array(rows.length);
  const root = new Int32Array(n);
  for (let k = n - 1; k >= 0; k--) {
    root[k] = parent[k]! < 0 ? k : root[parent[k]!]!;
    const first = columns[k]!;
    const end = columns[k + 1]!;
    let ownRe = inverseRe[k]!;
    let ownIm = inverseIm[k]!;
    for (let p = first; p < end; p++) {
      let re = 0;
      let im = 0;
      for (let q = first; q < end; q++) {
        const same = rows[q] === rows[p];
        const at = same ? rows[p]! : placeIn(columns, rows, rows[p]!, rows[q]!);
        const u = same ? diagonalRe[at]! : zRe[at]!;
        const v = same ? diagonalIm[at]! : zIm[at]!;
        re += shareRe[q]! * u - shareIm[q]! * v;
        im += shareRe[q]! * v + shareIm[q]! * u;
      }
      zRe[p] = re;
      zIm[p] = im;
      ownRe += shareRe[p]! * re - shareIm[p]! * im;
      ownIm += shareRe[p]! * im + shareIm[p]! * re;
    }
    diagonalRe[k] = ownRe;
    diagonalIm[k] = ownIm;
  }

  return {
    entry: (a, b) => {
      let low = Math.min(position[a]!, position[b]!);
      let high = Math.max(position[a]!, position[b]!);
      if (root[low] !== root[high]) return [0, 0];
      let gainRe = 1;
      let gainIm = 0;
      const times = (re: number, im: number): [number, number] => [
        gainRe * re - gainIm * im,
        gainRe * im + gainIm * re,
      ];
      while (low !== high) {
        const first = columns[low]!;
        const end = columns[low + 1]!;
        for (let p = first; p < end; p++) if (rows[p] === high) return times(zRe[p]!, zIm[p]!);
        if (end - first > 1) return null;
        [gainRe, gainIm] = times(shareRe[first]!, shareIm[first]!);
        const next = rows[first]!;
        low = Math.min(next, high);
        high = Math.max(next, high);
      }
      return times(diagonalRe[low]!, diagonalIm[low]!);
    },
  };
}
