import { magnitude } from '../job/systems.ts';
import { addScaled, dot, size } from './vectors.ts';

/** Directions of one solve, and the share of its right side that may be left. */
const DIRECTIONS = 40;
const LEFT = 1e-4;
/** The same where it is not the solution that is asked for. */
const FINE = 1e-10;
/** A direction this small beside the others is rounding: the space is closed. */
const CLOSED = 1e-12;

/** A Krylov space of A from b: orthonormal directions, and A in it as a triangle after rotations of (cos, sin). */
interface Krylov {
  basis: Float64Array[];
  columns: number[][];
  cos: number[];
  /** b in the rotated directions; what the last one holds is left over. */
  right: number[];
}

type Product = (d: Float64Array, out: Float64Array) => void;

/** Arnoldi's process until `left` of |b| is left, the space holds all that A makes of it, or it has 40 directions. */
function krylov(product: Product, b: Float64Array, left: number): Krylov {
  const whole = size(b);
  const first = new Float64Array(b.length);
  addScaled(first, 1 / whole, b);
  const basis = [first];
  const columns: number[][] = [];
  const cos: number[] = [];
  const sin: number[] = [];
  const right = [whole];
  for (let k = 0; k < DIRECTIONS && Math.abs(right[k]!) > left * whole; k++) {
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
    const pivot = magnitude([column[k]!, below]);
    if (!(pivot > 0)) break;
    cos.push(column[k]! / pivot);
    sin.push(below / pivot);
    column[k] = pivot;
    columns.push(column);
    right.push(-sin[k]! * right[k]!);
    right[k]! *= cos[k]!;
    if (!(below > CLOSED * pivot)) break;
    for (let i = 0; i < next.length; i++) next[i]! /= below;
    basis.push(next);
  }
  return { basis, columns, cos, right };
}

/**
 * x with A·x ≈ b for a real matrix that is known by its products alone, the least |b − A·x| over a Krylov space
 * (Saad and Schultz 1986): until a ten-thousandth of |b| is left, or 40 directions.
 */
export function gmres(product: Product, b: Float64Array): Float64Array {
  const x = new Float64Array(b.length);
  if (!(size(b) > 0)) return x;
  const { basis, columns, right } = krylov(product, b, LEFT);
  for (let k = columns.length - 1; k >= 0; k--) {
    let share = right[k]!;
    for (let j = k + 1; j < columns.length; j++) share -= columns[j]![k]! * right[j]!;
    right[k] = share / columns[k]![k]!;
    addScaled(x, right[k]!, basis[k]!);
  }
  return x;
}

/**
 * Whether the determinant of A is positive in the Krylov space that b opens. Rotations keep it: of the triangle all but
 * the last entry of the diagonal are positive, and that one has the sign of its cosine before it was rotated.
 */
export function hasPositiveDeterminant(product: Product, b: Float64Array): boolean {
  if (!(size(b) > 0)) return true;
  return (krylov(product, b, FINE).cos.at(-1) ?? 1) > 0;
}
