import type { Beyond, Conductor, Job, Pair, Terminals } from '../job/index.ts';
import { loadRating } from '../job/load-rating.ts';
import type { Emfs } from '../job/systems.ts';
import { emfBetween, magnitude, pairConductors } from '../job/systems.ts';
import type { HandCurrent } from './formulas.ts';
import type { RunState } from './run-state.ts';
import { conjugate, difference, product } from './run-state.ts';

/** The current that a pencil would take for a run, and where it comes from. */
export interface PencilCurrent extends HandCurrent {
  /** `entered`: from the loads as typed; `solved`: mean of the lines out of the node equations. */
  from: 'entered' | 'solved';
  /** Terminals that all loads beyond share; `null` where they differ. */
  terminals: Terminals | null;
  /** Loads that it adds up. */
  loads: number;
}

/** Nominal volts across terminals: of the pair, or between lines. */
export const nominalAcross = (emfs: Emfs, terminals: Terminals): number => {
  const [a, b]: readonly Conductor[] =
    terminals === 'three-phase' ? ['L1', 'L2'] : pairConductors(terminals as Pair);
  return magnitude(emfBetween(emfs, a!, b!)!);
};

/**
 * Branch runs: the loads beyond, as entered, times their factor in this state, added as in-phase and quadrature
 * parts; half of what is spread along the run itself. `null` where they do not share their terminals, or where a
 * transformer lies between.
 */
export function enteredCurrent(job: Job, beyond: Beyond, emfs: Emfs, state: RunState): PencilCurrent | null {
  if (job.transformers.some((t) => beyond.buses.has(t.from))) return null;
  let [inPhase, quadrature, loads] = [0, 0, 0];
  let terminals: Terminals | null = null;
  for (const i of beyond.loads) {
    const load = job.loads[i]!;
    const factor = state.factor(i) * (beyond.along.includes(i) ? 0.5 : 1);
    if (factor === 0) continue;
    terminals ??= load.terminals;
    if (load.terminals !== terminals) return null;
    const rating = loadRating(load, nominalAcross(emfs, terminals), job.frequency);
    if (!rating) return null;
    const amps = rating.amps * factor;
    const sin = Math.sqrt(Math.max(0, 1 - rating.powerFactor ** 2));
    inPhase += amps * rating.powerFactor;
    quadrature += amps * sin * (rating.leading ? -1 : 1);
    loads++;
  }
  if (loads === 0 || inPhase < 0) return null;
  return { ...ofParts(inPhase, quadrature), from: 'entered', terminals, loads };
}

const ofParts = (inPhase: number, quadrature: number): HandCurrent => {
  const amps = Math.sqrt(inPhase * inPhase + quadrature * quadrature);
  return { amps, powerFactor: amps === 0 ? 1 : inPhase / amps, leading: quadrature < 0 };
};

/** Any other run: the mean of its line currents and their common power factor, out of the node equations. */
export function solvedCurrent(state: RunState): PencilCurrent | null {
  const lines = (['L1', 'L2', 'L3'] as const).filter((c) => state.currents[c] && state.near[c]);
  if (lines.length === 0) return null;
  const reference = state.near.N ?? [0, 0];
  let [watts, vars, sum] = [0, 0, 0];
  for (const line of lines) {
    const current = state.currents[line]!;
    const [p, q] = product(difference(state.near[line]!, reference), conjugate(current));
    watts += p;
    vars += q;
    sum += Math.sqrt(current[0] ** 2 + current[1] ** 2);
  }
  const va = Math.sqrt(watts * watts + vars * vars);
  if (va === 0 || watts < 0) return null;
  return {
    amps: sum / lines.length,
    powerFactor: watts / va,
    leading: vars < 0,
    from: 'solved',
    terminals: null,
    loads: 0,
  };
}
