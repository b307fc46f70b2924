import type { Complex } from './complex.ts';

/** A full complex matrix and its factors: Gaussian elimination with partial pivoting, nothing else. */
export interface Factors {
  readonly n: number;
  readonly re: Float64Array;
  readonly im: Float64Array;
  readonly rows: number[];
}

/** Factors `matrix` (n × n, row by row) in place; throws where it is singular. */
export const factor = (n: number, re: Float64Array, im: Float64Array): Factors => {
  const rows = Array.from({ length: n }, (_, k) => k);
  for (let k = 0; k < n; k++) {
    let best = k;
    for (let i = k + 1; i < n; i++) {
      if (size(re, im, rows[i]! * n + k) > size(re, im, rows[best]! * n + k)) best = i;
    }
    [rows[k], rows[best]] = [rows[best]!, rows[k]!];
    const pivot = rows[k]! * n;
    const pr = re[pivot + k]!;
    const pi = im[pivot + k]!;
    const square = pr * pr + pi * pi;
    if (!(square > 0)) throw new Error(`singular at column ${k}`);
    for (let i = k + 1; i < n; i++) {
      const row = rows[i]! * n;
      const ar = re[row + k]!;
      const ai = im[row + k]!;
      if (ar === 0 && ai === 0) continue;
      const lr = (ar * pr + ai * pi) / square;
      const li = (ai * pr - ar * pi) / square;
      re[row + k] = lr;
      im[row + k] = li;
      for (let j = k + 1; j < n; j++) {
        const ur = re[pivot + j]!;
        const ui = im[pivot + j]!;
        re[row + j] = re[row + j]! - (lr * ur - li * ui);
        im[row + j] = im[row + j]! - (lr * ui + li * ur);
      }
    }
  }
  return { n, re, im, rows };
};

const size = (re: Float64Array, im: Float64Array, at: number): number => Math.hypot(re[at]!, im[at]!);

export const backSolve = ({ n, re, im, rows }: Factors, right: readonly Complex[]): Complex[] => {
  const xr = new Float64Array(n);
  const xi = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    const row = rows[i]! * n;
    let sr = right[rows[i]!]!.re;
    let si = right[rows[i]!]!.im;
    for (let j = 0; j < i; j++) {
      sr -= re[row + j]! * xr[j]! - im[row + j]! * xi[j]!;
      si -= re[row + j]! * xi[j]! + im[row + j]! * xr[j]!;
    }
    xr[i] = sr;
    xi[i] = si;
  }
  for (let i = n - 1; i >= 0; i--) {
    const row = rows[i]! * n;
    let sr = xr[i]!;
    let si = xi[i]!;
    for (let j = i + 1; j < n; j++) {
      sr -= re[row + j]! * xr[j]! - im[row + j]! * xi[j]!;
      si -= re[row + j]! * xi[j]! + im[row + j]! * xr[j]!;
    }
    const dr = re[row + i]!;
    const di = im[row + i]!;
    const square = dr * dr + di * di;
    xr[i] = (sr * dr + si * di) / square;
    xi[i] = (si * dr - sr * di) / square;
  }
  return Array.from({ length: n }, (_, k) => ({ re: xr[k]!, im: xi[k]! }));
};
