import { type Conductor, PAIRS, type Pair, type Phasor } from '../job/index.ts';
import { type Emfs, magnitude, pairConductors } from '../job/systems.ts';

/** Position of a conductor in a bus's four slots. */
export const SLOT: Record<Conductor, number> = { L1: 0, L2: 1, L3: 2, N: 3 };
export const PAIR_INDEX = Object.fromEntries(PAIRS.map((pair, i) => [pair, i])) as Record<Pair, number>;
/** The two slots of each pair, in the order of `PAIRS`. */
export const PAIR_SLOTS: readonly (readonly [number, number])[] = PAIRS.map((pair) => {
  const [a, b] = pairConductors(pair);
  return [SLOT[a], SLOT[b]];
});
export const LINE_NEUTRAL: readonly number[] = [0, 1, 2];
export const LINE_LINE: readonly number[] = [3, 4, 5];

/** Nominal and open-circuit EMF of one pair, volts. */
export interface PairEmf {
  nominal: number;
  /** Unit phasor of the nominal EMF. */
  unit: Phasor;
  open: Phasor;
  openVolts: number;
}

/** By pair index; `null` where the system lacks one of the two conductors. */
export function pairTable(emfs: Emfs, openRatio: number): (PairEmf | null)[] {
  return PAIRS.map((pair) => {
    const [a, b] = pairConductors(pair);
    const first = emfs[a];
    const second = emfs[b];
    if (!first || !second) return null;
    const across: Phasor = [first[0] - second[0], first[1] - second[1]];
    const nominal = magnitude(across);
    return {
      nominal,
      unit: [across[0] / nominal, across[1] / nominal],
      open: [across[0] * openRatio, across[1] * openRatio],
      openVolts: nominal * openRatio,
    };
  });
}
