import type { Conductor, Pair, Phasor } from '../job/index.ts';
import { PAIRS } from '../job/index.ts';
import { pairConductors } from '../job/systems.ts';

export type Phasors = Partial<Record<Conductor, Phasor>>;

/** What the node equations say of one run: solved volts of its conductors at both ends, amperes from near to far. */
export interface RunState {
  near: Phasors;
  far: Phasors;
  currents: Phasors;
  /** Factor on each load's rated size in this state, by index in `job.loads`. */
  factor: (load: number) => number;
}

export const difference = (a: Phasor, b: Phasor): Phasor => [a[0] - b[0], a[1] - b[1]];
export const size = ([re, im]: Phasor): number => Math.sqrt(re * re + im * im);
export const product = (a: Phasor, b: Phasor): Phasor => [
  a[0] * b[0] - a[1] * b[1],
  a[0] * b[1] + a[1] * b[0],
];
export const conjugate = ([re, im]: Phasor): Phasor => [re, -im];
export const quotient = (a: Phasor, b: Phasor): Phasor => {
  const square = b[0] * b[0] + b[1] * b[1];
  const top = product(a, conjugate(b));
  return [top[0] / square, top[1] / square];
};
/** The part of `a` that lies along the unit phasor `unit`. */
export const along = (a: Phasor, unit: Phasor): number => a[0] * unit[0] + a[1] * unit[1];

export const across = (phasors: Phasors, pair: Pair): Phasor | null => {
  const [a, b] = pairConductors(pair);
  const from = phasors[a];
  const to = phasors[b];
  return from && to ? difference(from, to) : null;
};

/** The pairs that a run's drop is judged by: line to neutral where it has N, else line to line (model: judging). */
export const runPairs = (conductors: readonly Conductor[]): readonly Pair[] =>
  PAIRS.filter((pair) => {
    const [a, b] = pairConductors(pair);
    return conductors.includes(a) && conductors.includes(b) && (b === 'N') === conductors.includes('N');
  });

/** |V near| − |V far| of a pair, volts. */
export const pairDrop = (state: RunState, pair: Pair): number => {
  const near = across(state.near, pair);
  const far = across(state.far, pair);
  return near && far ? size(near) - size(far) : 0;
};
