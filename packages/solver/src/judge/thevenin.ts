import type { Phasor } from '../job/index.ts';
import { type PathSolver, pathSolver, type SelectedInverse, selectedInverse } from '../linear/index.ts';
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

/** One ampere in at the first terminal and out at the second. */
const POLES: readonly Phasor[] = [
  [1, 0],
  [-1, 0],
];

/**
 * Driving-point impedance between the terminals of a load at a bus, ohm: volts that one ampere costs there, on the
 * factor of `state` (impedance loads as stamped, others absent). Three-phase: the positive-sequence value per line.
 * All loads share one pass over the factor; the few whose entries it does not hold are solved along their paths.
 */
export function theveninAt(core: Core, state: State): (load: number, bus: number, pair: number) => Phasor {
  const { factor, layout } = state.stamped;
  const { at } = core.network.nodes;
  let inverse: SelectedInverse | null = null;
  let solver: PathSolver | null = null;
  const unknownAt = (bus: number, slot: number): number => {
    const node = at[4 * bus + slot]!;
    return node < 0 ? -1 : layout.unknownOf[node]!;
  };

  return (load, bus, pair) => {
    const threePhase = core.job.loads[load]!.terminals === 'three-phase';
    const terminals = threePhase
      ? [0, 1, 2].map((slot, k): Terminal => ({ unknown: unknownAt(bus, slot), amps: SEQUENCE[k]! }))
      : PAIR_SLOTS[pair]!.map((slot, k): Terminal => ({ unknown: unknownAt(bus, slot), amps: POLES[k]! }));
    const free = terminals.filter(({ unknown }) => unknown >= 0);
    inverse ??= selectedInverse(factor);
    let across = acrossBy(inverse, free);
    if (!across) {
      solver ??= pathSolver(factor);
      across = acrossAlongPaths(solver, free);
    }
    return threePhase ? [across[0] / 3, across[1] / 3] : across;
  };
}

/** A free terminal and the current that is put in there; the volts across are weighed by its conjugate. */
interface Terminal {
  unknown: number;
  amps: Phasor;
}

/** Σ conj(iₐ)·Z(a, b)·i_b from entries of the inverse; `null` where one of them is not held. */
function acrossBy(inverse: SelectedInverse, terminals: readonly Terminal[]): Phasor | null {
  let re = 0;
  let im = 0;
  for (const a of terminals)
    for (const b of terminals) {
      const z = inverse.entry(a.unknown, b.unknown);
      if (!z) return null;
      const wRe = a.amps[0] * b.amps[0] + a.amps[1] * b.amps[1];
      const wIm = a.amps[0] * b.amps[1] - a.amps[1] * b.amps[0];
      re += wRe * z[0] - wIm * z[1];
      im += wRe * z[1] + wIm * z[0];
    }
  return [re, im];
}

function acrossAlongPaths(solver: PathSolver, terminals: readonly Terminal[]): Phasor {
  solver.reach(terminals.map(({ unknown }) => unknown));
  solver.clear();
  for (const { unknown, amps } of terminals) solver.add(unknown, amps[0], amps[1]);
  solver.solve();
  let re = 0;
  let im = 0;
  for (const { unknown, amps } of terminals) {
    re += amps[0] * solver.re(unknown) + amps[1] * solver.im(unknown);
    im += amps[0] * solver.im(unknown) - amps[1] * solver.re(unknown);
  }
  return [re, im];
}
