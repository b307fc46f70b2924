/**
 * Kernels on the blocks of four conductors. Complex numbers are split into real and imaginary arrays. A symmetric
 * block is its upper triangle row by row (10 values: 00 01 02 03 11 12 13 22 23 33), a full one has 16 row by row;
 * `at` is where the block starts. A vector has 4 values.
 */
export type Values = Float64Array;

/** Place of entry (i, j) in a symmetric block. */
export const PACKED: readonly number[] = [0, 1, 2, 3, 1, 4, 5, 6, 2, 5, 7, 8, 3, 6, 8, 9];

/** y += S·x for a symmetric block S. */
export function addSymmetric(
  sRe: Values,
  sIm: Values,
  at: number,
  xRe: Values,
  xIm: Values,
  from: number,
  yRe: Values,
  yIm: Values,
  to: number,
): void {
  const a = xRe[from]!;
  const b = xRe[from + 1]!;
  const c = xRe[from + 2]!;
  const d = xRe[from + 3]!;
  const e = xIm[from]!;
  const f = xIm[from + 1]!;
  const g = xIm[from + 2]!;
  const h = xIm[from + 3]!;
  const r1 = sRe[at + 1]!;
  const i1 = sIm[at + 1]!;
  const r2 = sRe[at + 2]!;
  const i2 = sIm[at + 2]!;
  const r3 = sRe[at + 3]!;
  const i3 = sIm[at + 3]!;
  const r5 = sRe[at + 5]!;
  const i5 = sIm[at + 5]!;
  const r6 = sRe[at + 6]!;
  const i6 = sIm[at + 6]!;
  const r8 = sRe[at + 8]!;
  const i8 = sIm[at + 8]!;
  const r0 = sRe[at]!;
  const i0 = sIm[at]!;
  const r4 = sRe[at + 4]!;
  const i4 = sIm[at + 4]!;
  const r7 = sRe[at + 7]!;
  const i7 = sIm[at + 7]!;
  const r9 = sRe[at + 9]!;
  const i9 = sIm[at + 9]!;
  yRe[to] = yRe[to]! + (r0 * a - i0 * e + (r1 * b - i1 * f) + (r2 * c - i2 * g) + (r3 * d - i3 * h));
  yIm[to] = yIm[to]! + (r0 * e + i0 * a + (r1 * f + i1 * b) + (r2 * g + i2 * c) + (r3 * h + i3 * d));
  yRe[to + 1] = yRe[to + 1]! + (r1 * a - i1 * e + (r4 * b - i4 * f) + (r5 * c - i5 * g) + (r6 * d - i6 * h));
  yIm[to + 1] = yIm[to + 1]! + (r1 * e + i1 * a + (r4 * f + i4 * b) + (r5 * g + i5 * c) + (r6 * h + i6 * d));
  yRe[to + 2] = yRe[to + 2]! + (r2 * a - i2 * e + (r5 * b - i5 * f) + (r7 * c - i7 * g) + (r8 * d - i8 * h));
  yIm[to + 2] = yIm[to + 2]! + (r2 * e + i2 * a + (r5 * f + i5 * b) + (r7 * g + i7 * c) + (r8 * h + i8 * d));
  yRe[to + 3] = yRe[to + 3]! + (r3 * a - i3 * e + (r6 * b - i6 * f) + (r8 * c - i8 * g) + (r9 * d - i9 * h));
  yIm[to + 3] = yIm[to + 3]! + (r3 * e + i3 * a + (r6 * f + i6 * b) + (r8 * g + i8 * c) + (r9 * h + i9 * d));
}

/** C += A·B (or Aᵀ·B) for full blocks; A and C may not overlap. */
export function addProduct(
  transpose: boolean,
  aRe: Values,
  aIm: Values,
  a: number,
  bRe: Values,
  bIm: Values,
  b: number,
  cRe: Values,
  cIm: Values,
  c: number,
): void {
  const down = transpose ? 4 : 1;
  const across = transpose ? 1 : 4;
  for (let i = 0; i < 4; i++) {
    const at = c + 4 * i;
    let r0 = cRe[at]!;
    let r1 = cRe[at + 1]!;
    let r2 = cRe[at + 2]!;
    let r3 = cRe[at + 3]!;
    let i0 = cIm[at]!;
    let i1 = cIm[at + 1]!;
    let i2 = cIm[at + 2]!;
    let i3 = cIm[at + 3]!;
    for (let k = 0, from = b; k < 4; k++, from += 4) {
      const re = aRe[a + across * i + down * k]!;
      const im = aIm[a + across * i + down * k]!;
      const u0 = bRe[from]!;
      const u1 = bRe[from + 1]!;
      const u2 = bRe[from + 2]!;
      const u3 = bRe[from + 3]!;
      const v0 = bIm[from]!;
      const v1 = bIm[from + 1]!;
      const v2 = bIm[from + 2]!;
      const v3 = bIm[from + 3]!;
      r0 += re * u0 - im * v0;
      i0 += re * v0 + im * u0;
      r1 += re * u1 - im * v1;
      i1 += re * v1 + im * u1;
      r2 += re * u2 - im * v2;
      i2 += re * v2 + im * u2;
      r3 += re * u3 - im * v3;
      i3 += re * v3 + im * u3;
    }
    cRe[at] = r0;
    cRe[at + 1] = r1;
    cRe[at + 2] = r2;
    cRe[at + 3] = r3;
    cIm[at] = i0;
    cIm[at + 1] = i1;
    cIm[at + 2] = i2;
    cIm[at + 3] = i3;
  }
}

/** y += A·x, or Aᵀ·x, for a full block; x and y may not overlap. */
export function addTimes(
  transpose: boolean,
  aRe: Values,
  aIm: Values,
  a: number,
  xRe: Values,
  xIm: Values,
  from: number,
  yRe: Values,
  yIm: Values,
  to: number,
): void {
  const down = transpose ? 4 : 1;
  const across = transpose ? 1 : 4;
  for (let i = 0; i < 4; i++) {
    let re = 0;
    let im = 0;
    for (let k = 0; k < 4; k++) {
      const u = aRe[a + across * i + down * k]!;
      const v = aIm[a + across * i + down * k]!;
      re += u * xRe[from + k]! - v * xIm[from + k]!;
      im += u * xIm[from + k]! + v * xRe[from + k]!;
    }
    yRe[to + i]! += re;
    yIm[to + i]! += im;
  }
}

/** Adds the unit block. */
export function addUnit(aRe: Values, a: number): void {
  for (let i = 0; i < 16; i += 5) aRe[a + i]! += 1;
}

/** Inverts a full block in place (Gauss and Jordan, rows exchanged); false where it is singular. */
export function invert(aRe: Values, aIm: Values, a: number): boolean {
  let taken = 0;
  const rowOf = [0, 0, 0, 0];
  for (let c = 0; c < 4; c++) {
    let row = -1;
    let largest = 0;
    for (let r = 0; r < 4; r++) {
      const re = aRe[a + 4 * r + c]!;
      const im = aIm[a + 4 * r + c]!;
      const square = re * re + im * im;
      if (((taken >> r) & 1) === 0 && square > largest) {
        row = r;
        largest = square;
      }
    }
    if (row < 0) return false;
    taken |= 1 << row;
    rowOf[c] = row;
    clearColumn(aRe, aIm, a, row, c, largest);
  }
  unscramble(aRe, aIm, a, rowOf);
  return true;
}

/** One step of the inversion in place with pivot (row, c), whose square is given. */
function clearColumn(aRe: Values, aIm: Values, a: number, row: number, c: number, square: number): void {
  const at = a + 4 * row;
  const pRe = aRe[at + c]! / square;
  const pIm = -aIm[at + c]! / square;
  aRe[at + c] = 1;
  aIm[at + c] = 0;
  for (let j = 0; j < 4; j++) {
    const re = aRe[at + j]!;
    const im = aIm[at + j]!;
    aRe[at + j] = re * pRe - im * pIm;
    aIm[at + j] = re * pIm + im * pRe;
  }
  for (let r = 0; r < 4; r++) {
    if (r === row) continue;
    const re = aRe[a + 4 * r + c]!;
    const im = aIm[a + 4 * r + c]!;
    aRe[a + 4 * r + c] = 0;
    aIm[a + 4 * r + c] = 0;
    for (let j = 0; j < 4; j++) {
      const u = aRe[at + j]!;
      const v = aIm[at + j]!;
      aRe[a + 4 * r + j]! -= re * u - im * v;
      aIm[a + 4 * r + j]! -= re * v + im * u;
    }
  }
}

/** Column c was cleared with row rowOf[c]: entry (rowOf[c], j) belongs to (c, rowOf⁻¹ of j). */
function unscramble(aRe: Values, aIm: Values, a: number, rowOf: readonly number[]): void {
  if (rowOf[0] === 0 && rowOf[1] === 1 && rowOf[2] === 2 && rowOf[3] === 3) return;
  const re = aRe.slice(a, a + 16);
  const im = aIm.slice(a, a + 16);
  for (let c = 0; c < 4; c++)
    for (let j = 0; j < 4; j++) {
      aRe[a + 4 * c + rowOf[j]!] = re[4 * rowOf[c]! + j]!;
      aIm[a + 4 * c + rowOf[j]!] = im[4 * rowOf[c]! + j]!;
    }
}
