import type { Job } from '@farlug/solver/job';
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

const NEVER = 1e9;

/** The largest amps for which `trips` is false, by doubling and bisection; `null` where it never trips. */
export const largestBefore = (trips: (amps: number) => boolean): number | null => {
  const over = (amps: number): boolean => {
    try {
      return trips(amps);
    } catch (error) {
      if (error instanceof NotServed) return true;
      throw error;
    }
  };
  if (over(0)) return 0;
  let high = 1e-3;
  let low = 0;
  while (!over(high)) {
    low = high;
    high *= 2;
    if (high > NEVER) return null;
  }
  while (high - low > 1e-12 * high) {
    const middle = (low + high) / 2;
    if (middle === low || middle === high) break;
    if (over(middle)) high = middle;
    else low = middle;
  }
  return low;
};

export const isLinear = (job: Job): boolean =>
  job.angle === 'nominal' &&
  job.loads.every((load) => load.behaviour !== 'power') &&
  job.runs.every((run) => run.temperature !== 'operating');
