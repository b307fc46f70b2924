/**
 * An admittance of the network in the one form that all of them have: it carries the current
 * i = y·(Σ u_k·V_k − emf), and puts u_k·i onto node k (current that leaves the node).
 * A run's conductor: u = (1, −1). A winding pair: (1/a, −1/a, −1, 1) over (primary +, −, secondary +, −).
 * A source behind an impedance: u = (1) and its EMF. A floating delta's reference: (1, 1, 1) over its lines.
 */
export interface Element {
  kind: 'run' | 'source' | 'winding' | 'centroid';
  /** Index in `job.runs`, `job.sources` or `job.transformers`. */
  owner: number;
  /** Conductor of a run or source (0 … 3); −1 otherwise. */
  conductor: number;
  nodes: readonly number[];
  u: readonly number[];
  /** Impedance, ohm, and its inverse, siemens. */
  zRe: number;
  zIm: number;
  yRe: number;
  yIm: number;
  emfRe: number;
  emfIm: number;
}

export function element(
  kind: Element['kind'],
  owner: number,
  conductor: number,
  nodes: readonly number[],
  u: readonly number[],
  zRe: number,
  zIm: number,
  emfRe = 0,
  emfIm = 0,
): Element {
  const square = zRe * zRe + zIm * zIm;
  return { kind, owner, conductor, nodes, u, zRe, zIm, yRe: zRe / square, yIm: -zIm / square, emfRe, emfIm };
}
