/**
 * Solves a small dense complex system in place by Gaussian elimination with partial pivoting.
 * `a` is k × k, row by row, interleaved (re, im); `b` is k × columns, likewise. Returns false where singular.
 */
export function solveSmall(a: Float64Array, b: Float64Array, k: number, columns: number): boolean {
  for (let c = 0; c < k; c++) {
    let best = -1;
    let bestSize = 0;
    for (let r = c; r < k; r++) {
      const at = 2 * (r * k + c);
      const size = a[at]! * a[at]! + a[at + 1]! * a[at + 1]!;
      if (size > bestSize) {
        best = r;
        bestSize = size;
      }
    }
    if (best < 0) return false;
    if (best !== c) {
      swapRows(a, best, c, k);
      swapRows(b, best, c, columns);
    }
    const pivot = 2 * (c * k + c);
    const iRe = a[pivot]! / bestSize;
    const iIm = -a[pivot + 1]! / bestSize;
    for (let r = 0; r < k; r++) {
      if (r === c) continue;
      const at = 2 * (r * k + c);
      const fRe = a[at]! * iRe - a[at + 1]! * iIm;
      const fIm = a[at]! * iIm + a[at + 1]! * iRe;
      if (fRe === 0 && fIm === 0) continue;
      subtractRow(a, r, c, k, fRe, fIm);
      subtractRow(b, r, c, columns, fRe, fIm);
    }
  }
  for (let r = 0; r < k; r++) {
    const pivot = 2 * (r * k + r);
    const dRe = a[pivot]!;
    const dIm = a[pivot + 1]!;
    const square = dRe * dRe + dIm * dIm;
    for (let c = 0; c < columns; c++) {
      const at = 2 * (r * columns + c);
      const re = b[at]!;
      const im = b[at + 1]!;
      b[at] = (re * dRe + im * dIm) / square;
      b[at + 1] = (im * dRe - re * dIm) / square;
    }
  }
  return true;
}

function swapRows(m: Float64Array, r: number, s: number, width: number): void {
  for (let c = 0; c < 2 * width; c++) {
    const kept = m[2 * r * width + c]!;
    m[2 * r * width + c] = m[2 * s * width + c]!;
    m[2 * s * width + c] = kept;
  }
}

function subtractRow(
  m: Float64Array,
  r: number,
  from: number,
  width: number,
  fRe: number,
  fIm: number,
): void {
  for (let c = 0; c < width; c++) {
    const at = 2 * (r * width + c);
    const by = 2 * (from * width + c);
    m[at]! -= fRe * m[by]! - fIm * m[by + 1]!;
    m[at + 1]! -= fRe * m[by + 1]! + fIm * m[by]!;
  }
}
