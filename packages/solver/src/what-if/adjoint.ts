import type { Phasor } from '../job/index.ts';
import { gmres } from '../judge/gmres.ts';
import { addScaled, size } from '../judge/vectors.ts';
import { type PathSolver, solve } from '../linear/index.ts';
import type { LoadState } from './load-states.ts';
import type { Follower } from './slopes.ts';

/** Share of the right side that may be left of the adjoint equations, and how often they are gone over for it. */
const LEFT = 1e-13;
const PASSES = 12;

/** By node: what one ampere into it does to the quantity, as the real part of the product. */
export type Adjoint = (node: number) => Phasor;

/** A quantity whose change is Re(g·(δV_a − δV_b)). */
export interface Gauge {
  a: number;
  b: number;
  g: Phasor;
}

/**
 * ν with Y·ν = g·(e_a − e_b), at the nodes given: the admittance matrix is symmetric, so that its own factor solves the
 * adjoint equations, along the paths of those nodes.
 */
export function fixedAdjoint(
  { stamped }: LoadState,
  solver: PathSolver,
  gauge: Gauge,
  nodes: readonly number[],
): Adjoint {
  const { unknownOf } = stamped.layout;
  const [a, b] = [unknownOf[gauge.a]!, unknownOf[gauge.b]!];
  solver.reach([...nodes.map((node) => unknownOf[node]!), a, b].filter((u) => u >= 0));
  solver.clear();
  if (a >= 0) solver.add(a, gauge.g[0], gauge.g[1]);
  if (b >= 0) solver.add(b, -gauge.g[0], -gauge.g[1]);
  solver.solve();
  return (node) => {
    const u = unknownOf[node]!;
    return u < 0 ? [0, 0] : [solver.re(u), solver.im(u)];
  };
}

/**
 * The same where currents follow the voltage with the slopes δI = S·δV (real 2 × 2): Y·ν + Σ w·conj(Sᵀ·conj(wᵀν)) =
 * g·e, the transposed Jacobian, by GMRES on the factor of Y. `null` where it does not close in: the state is about to
 * collapse, and no first-order change is left.
 */
export function followingAdjoint(
  { stamped }: LoadState,
  following: readonly Follower[],
  gauge: Gauge,
): Adjoint | null {
  const { unknownOf, nodeOf } = stamped.layout;
  const n = nodeOf.length;
  const re = new Float64Array(n);
  const im = new Float64Array(n);
  const ends = following.map(({ a, b }) => [unknownOf[a]!, unknownOf[b]!] as const);
  const put = (from: number, to: number, x: number, y: number): void => {
    if (from >= 0) {
      re[from]! += x;
      im[from]! += y;
    }
    if (to >= 0) {
      re[to]! -= x;
      im[to]! -= y;
    }
  };
  const part = (d: Float64Array, u: number, offset: number) => (u < 0 ? 0 : d[offset + u]!);
  const product = (d: Float64Array, into: Float64Array): void => {
    re.fill(0);
    im.fill(0);
    for (const [k, [from, to]] of ends.entries()) {
      const x = part(d, from, 0) - part(d, to, 0);
      const y = part(d, from, n) - part(d, to, n);
      const [p, q, r, s] = following[k]!.slope;
      put(from, to, p * x - q * y, s * y - r * x);
    }
    solve(stamped.factor, re, im);
    for (let u = 0; u < n; u++) {
      into[u] = d[u]! + re[u]!;
      into[n + u] = d[n + u]! + im[u]!;
    }
  };
  put(unknownOf[gauge.a]!, unknownOf[gauge.b]!, gauge.g[0], gauge.g[1]);
  solve(stamped.factor, re, im);
  const right = new Float64Array(2 * n);
  right.set(re);
  right.set(im, n);
  const x = new Float64Array(2 * n);
  const left = right.slice();
  const target = LEFT * size(right);
  for (let pass = 0; size(left) > target; pass++) {
    if (pass === PASSES) return null;
    addScaled(x, 1, gmres(product, left));
    product(x, left);
    for (let i = 0; i < left.length; i++) left[i] = right[i]! - left[i]!;
  }
  return (node) => {
    const u = unknownOf[node]!;
    return u < 0 ? [0, 0] : [x[u]!, x[n + u]!];
  };
}
