import type { Phasor } from '../job/index.ts';
import { type PathSolver, pathSolver } from '../linear/index.ts';
import { PAIR_SLOTS } from '../network/index.ts';
import type { Core } from './core.ts';
import type { State } from './solve-state.ts';

const HALF_SQRT3 = Math.sqrt(3) / 2;
/** One ampere out of each line in positive sequence. */
const SEQUENCE: readonly Phasor[] = [
  [1, 0],
  [-0.5, -HALF_SQRT3],
  [-0.5, HALF_SQRT3],
];

/**
 * Driving-point impedance between the terminals of a load at a bus, ohm: volts that one ampere costs there, on the
 * factor of `state` (impedance loads as stamped, others absent). Three-phase: the positive-sequence value per line.
 */
export function theveninAt(core: Core, state: State): (load: number, bus: number, pair: number) => Phasor {
  const { unknownOf } = state.stamped.layout;
  const { at } = core.network.nodes;
  const solver: PathSolver = pathSolver(state.stamped.factor);
  const unknownAt = (bus: number, slot: number): number => {
    const node = at[4 * bus + slot]!;
    return node < 0 ? -1 : unknownOf[node]!;
  };
  const read = (unknown: number): Phasor => (unknown < 0 ? [0, 0] : [solver.re(unknown), solver.im(unknown)]);

  return (load, bus, pair) => {
    const threePhase = core.job.loads[load]!.terminals === 'three-phase';
    const slots = threePhase ? [0, 1, 2] : PAIR_SLOTS[pair]!;
    const unknowns = slots.map((slot) => unknownAt(bus, slot));
    solver.reach(unknowns.filter((u) => u >= 0));
    solver.clear();
    for (const [k, u] of unknowns.entries()) {
      const [re, im] = threePhase ? SEQUENCE[k]! : ([k === 0 ? 1 : -1, 0] as const);
      if (u >= 0) solver.add(u, -re, -im);
    }
    solver.solve();
    const volts = unknowns.map(read);
    if (!threePhase) return [volts[1]![0] - volts[0]![0], volts[1]![1] - volts[0]![1]];
    let re = 0;
    let im = 0;
    for (const [k, [vRe, vIm]] of volts.entries()) {
      // Conjugates of the sequence bring the three lines back onto the first.
      const [sRe, sIm] = SEQUENCE[k]!;
      re -= (vRe * sRe + vIm * sIm) / 3;
      im -= (vIm * sRe - vRe * sIm) / 3;
    }
    return [re, im];
  };
}
