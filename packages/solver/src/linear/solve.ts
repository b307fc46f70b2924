import type { Factor } from './factor.ts';

/**
 * Solves A·x = b in place: `re` and `im` hold b on entry and x on return, numbered like the unknowns.
 * Several right sides lie one after the other (length = count · n). No allocation beyond one work vector.
 */
export function solve(factor: Factor, re: Float64Array, im: Float64Array, count = 1): void {
  const { n, order, columns, rows } = factor.symbolic;
  const { inverseRe, inverseIm, shareRe, shareIm } = factor;
  const bRe = new Float64Array(n);
  const bIm = new Float64Array(n);
  for (let c = 0; c < count; c++) {
    const base = c * n;
    for (let k = 0; k < n; k++) {
      bRe[k] = re[base + order[k]!]!;
      bIm[k] = im[base + order[k]!]!;
    }
    for (let k = 0; k < n; k++) {
      const r = bRe[k]!;
      const i = bIm[k]!;
      if (r === 0 && i === 0) continue;
      for (let p = columns[k]!; p < columns[k + 1]!; p++) {
        bRe[rows[p]!]! += shareRe[p]! * r - shareIm[p]! * i;
        bIm[rows[p]!]! += shareRe[p]! * i + shareIm[p]! * r;
      }
    }
    for (let k = n - 1; k >= 0; k--) {
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
    for (let k = 0; k < n; k++) {
      re[base + order[k]!] = bRe[k]!;
      im[base + order[k]!] = bIm[k]!;
    }
  }
}
