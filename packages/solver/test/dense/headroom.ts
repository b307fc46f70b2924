import { mul, polar, scale, unit } from './complex.ts';
import type { ServedLoad } from './sinks.ts';
import { type FixedSink, NotServed } from './solve.ts';

/** An extra current at a load's own power factor and nominal angle, `amps` per line, at one of its places. */
export const extraSinks = (item: ServedLoad, place: string, amps: number): FixedSink[] =>
  item.pieces
    .filter((piece) => piece.plus.startsWith(`${place}|`))
    .map((piece) => ({
      plus: piece.plus,
      minus: piece.minus,
      amps: mul(
        unit(piece.nominal),
        scale(polar(1, -item.size.lag), amps * piece.share * item.places.length),
      ),
    }));

const NEVER = 1e7;

/**
 * The amps at which `excess` first reaches zero, by doubling and false position (Illinois); 0 where it is above
 * already, `null` where it never gets there. A network that cannot be solved counts as over.
 */
export const largestBefore = (excess: (amps: number) => number): number | null => {
  const measure = (amps: number): number => {
    try {
      return excess(amps);
    } catch (error) {
      if (error instanceof NotServed) return Number.POSITIVE_INFINITY;
      throw error;
    }
  };
  let low = 0;
  let atLow = measure(0);
  if (atLow >= 0) return 0;
  let high = 1;
  let atHigh = measure(high);
  while (atHigh < 0) {
    [low, atLow] = [high, atHigh];
    high *= 2;
    if (high > NEVER) return null;
    atHigh = measure(high);
  }
  let side = 0;
  for (let round = 0; round < 200 && high - low > 1e-11 * high; round++) {
    const slope = Number.isFinite(atHigh) && round % 20 !== 19;
    const middle = slope ? low + ((high - low) * -atLow) / (atHigh - atLow) : (low + high) / 2;
    const value = measure(middle);
    if (Math.abs(value) < 1e-13) return middle;
    if (value >= 0) {
      [high, atHigh] = [middle, value];
      if (side === 1) atLow /= 2;
      side = 1;
    } else {
      [low, atLow] = [middle, value];
      if (side === -1 && Number.isFinite(atHigh)) atHigh /= 2;
      side = -1;
    }
  }
  return low;
};
