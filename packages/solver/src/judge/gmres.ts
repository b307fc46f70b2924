import { addScaled, dot, size } from './vectors.ts';

/** Directions of one solve, and the share of its right side that may be left. */
const DIRECTIONS = 40;
const LEFT = 1e-4;

/**
 * x with A·x ≈ b for a real matrix that is known by its products alone, the least |b − A·x| over a Krylov space
 * (Saad and Schultz 1986): until a ten-thousandth of |b| is left, or 40 directions.
 */
export function gmres(product: (d: Float64Array, out: Float64Array) => void, b: Float64Array): Float64Array {
  const x = new Float64Array(b.length);
  const whole = size(b);
  if (!(whole > 0)) return x;
  const first = new Float64Array(b.length);
  addScaled(first, 1 / whole, b);
  const basis = [first];
  /** Columns of the Hessenberg matrix, made triangular by rotations (cos, sin) as they come. */
  const columns: number[][] = [];
  const cos: number[] = [];
  const sin: number[] = [];
  const right = [whole];
  for (let k = 0; k < DIRECTIONS && Math.abs(right[k]!) > LEFT * whole; k++) {
    const next = new Float64Array(b.length);
    product(basis[k]!, next);
    const column: number[] = [];
    for (const direction of basis) {
      const part = dot(next, direction);
      column.push(part);
      addScaled(next, -part, direction);
    }
    const below = size(next);
    for (let j = 0; j < k; j++) {
      const [upper, lower] = [column[j]!, column[j + 1]!];
      column[j] = cos[j]! * upper + sin[j]! * lower;
      column[j + 1] = cos[j]! * lower - sin[j]! * upper;
    }
    const pivot = Math.hypot(column[k]!, below);
    if (!(pivot > 0)) break;
    cos.push(column[k]! / pivot);
    sin.push(below / pivot);
    column[k] = pivot;
    columns.push(column);
    right.push(-sin[k]! * right[k]!);
    right[k]! *= cos[k]!;
    if (below === 0) break;
    for (let i = 0; i < next.length; i++) next[i]! /= below;
    basis.push(next);
  }
  for (let k = columns.length - 1; k >= 0; k--) {
    let share = right[k]!;
    for (let j = k + 1; j < columns.length; j++) share -= columns[j]![k]! * right[j]!;
    right[k] = share / columns[k]![k]!;
    addScaled(x, right[k]!, basis[k]!);
  }
  return x;
}
