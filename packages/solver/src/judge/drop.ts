import { LINE_LINE, LINE_NEUTRAL, PAIR_SLOTS } from '../network/index.ts';
import type { Core } from './core.ts';
import type { Volts } from './volts.ts';

/** Of two drops that differ by rounding alone, percent, the first counts: a later one must be larger by more than this. */
export const SAME_PERCENT = 1e-11;

/** Voltage and drop of one pair at one place. */
export interface PairDrop {
  pair: number;
  volts: number;
  /** |open-circuit EMF| − |V|. */
  dropVolts: number;
  /** 100 · dropVolts ÷ |nominal EMF|. */
  dropPercent: number;
}

/**
 * Drop of a pair at a bus, `null` where the bus does not have it. Worked out from the difference to the no-load
 * voltage, −(2·Re(E*·δ) + |δ|²) / (|E| + |V|), so that a small drop keeps its digits.
 */
export function dropAt(core: Core, volts: Volts, bus: number, pair: number): PairDrop | null {
  const { nodes, buses } = core.network;
  const emf = buses.system[bus]?.pairs[pair];
  const [s, t] = PAIR_SLOTS[pair]!;
  const a = nodes.at[4 * bus + s]!;
  const b = nodes.at[4 * bus + t]!;
  if (!emf || a < 0 || b < 0) return null;
  const dRe = nodes.referenceRe[a]! - nodes.referenceRe[b]! - emf.open[0] + (volts.re[a]! - volts.re[b]!);
  const dIm = nodes.referenceIm[a]! - nodes.referenceIm[b]! - emf.open[1] + (volts.im[a]! - volts.im[b]!);
  return dropOf(pair, emf, dRe, dIm);
}

/** Whether the voltage of a pair at a bus points away from its EMF. */
export function pointsAway(core: Core, volts: Volts, bus: number, pair: number): boolean {
  const { nodes, buses } = core.network;
  const { open } = buses.system[bus]!.pairs[pair]!;
  const [a, b] = PAIR_SLOTS[pair]!.map((slot) => nodes.at[4 * bus + slot]!) as [number, number];
  const re = nodes.referenceRe[a]! + volts.re[a]! - (nodes.referenceRe[b]! + volts.re[b]!);
  const im = nodes.referenceIm[a]! + volts.im[a]! - (nodes.referenceIm[b]! + volts.im[b]!);
  return re * open[0] + im * open[1] <= 0;
}

export function dropOf(
  pair: number,
  emf: { open: readonly [number, number]; openVolts: number; nominal: number },
  dRe: number,
  dIm: number,
): PairDrop {
  const vRe = emf.open[0] + dRe;
  const vIm = emf.open[1] + dIm;
  const volts = Math.sqrt(vRe * vRe + vIm * vIm);
  const twice = 2 * (emf.open[0] * dRe + emf.open[1] * dIm) + (dRe * dRe + dIm * dIm);
  const dropVolts = -twice / (emf.openVolts + volts);
  return { pair, volts, dropVolts, dropPercent: (100 * dropVolts) / emf.nominal };
}

/** The pair with the largest drop in percent, ties by order; `null` where the bus has none of them. */
export function worstPair(core: Core, volts: Volts, bus: number, pairs: readonly number[]): PairDrop | null {
  let worst: PairDrop | null = null;
  for (const pair of pairs) {
    const drop = dropAt(core, volts, bus, pair);
    if (drop && (worst === null || drop.dropPercent > worst.dropPercent + SAME_PERCENT)) worst = drop;
  }
  return worst;
}

/** Percent at a bus of another system: the mean over its line pairs, or line to neutral where it has one line. */
export function meanPercent(core: Core, volts: Volts, bus: number): number {
  const mean = (pairs: readonly number[]): number | null => {
    let sum = 0;
    let count = 0;
    for (const pair of pairs) {
      const drop = dropAt(core, volts, bus, pair);
      if (!drop) continue;
      sum += drop.dropPercent;
      count++;
    }
    return count === 0 ? null : sum / count;
  };
  return mean(LINE_LINE) ?? mean(LINE_NEUTRAL) ?? 0;
}
