import { mul, scale } from './complex.ts';
import { D, type Decimal, NIL, UNITY } from './decimal.ts';
import type { Sink } from './equations.ts';
import type { ServedLoad } from './sinks.ts';

/** One ampere per line at a load's own power factor and nominal angle, at one of its places. */
export const extraSinks = (item: ServedLoad, place: string): Sink[] =>
  item.pieces
    .filter((piece) => piece.plus.startsWith(`${place}|`))
    .map(({ plus, minus, direction, share }) => ({
      plus,
      minus,
      amps: scale(mul(direction, item.size.lag), share.times(item.places.length)),
    }));

const NEVER = 1e7;
const MOST_ROUNDS = 300;
/** The amps are known to this share of themselves, or where the excess is as good as nothing. */
const CLOSE = '1e-16';
/** How often a step towards where the network can be served no more is halved. */
const HALVINGS = 12;

/** The largest extra current, and what ends it; `amps` of a collapse are the largest that were seen to be served. */
export type Headroom =
  | { edge: 'limit'; amps: Decimal }
  | { edge: 'collapse'; amps: Decimal; unserved: Decimal }
  | { edge: 'none' };

/**
 * The amps at which `excess` first reaches zero, by doubling and false position (Illinois); 0 where it is above already.
 * `excess` is `null` where the network cannot be served.
 */
export const largestBefore = (excess: (amps: Decimal) => Decimal | null): Headroom => {
  let low = NIL;
  let atLow = excess(low)!;
  if (atLow.gte(0)) return { edge: 'limit', amps: NIL };
  let high = UNITY;
  let atHigh = excess(high);
  while (atHigh?.lt(0)) {
    [low, atLow] = [high, atHigh];
    high = high.times(2);
    if (high.gt(NEVER)) return { edge: 'none' };
    atHigh = excess(high);
  }
  for (let halving = 0; atHigh === null || atHigh.lt(0); halving++) {
    if (halving === HALVINGS) return { edge: 'collapse', amps: low, unserved: high };
    const middle = low.plus(high).div(2);
    const value = excess(middle);
    if (value?.lt(0)) [low, atLow] = [middle, value];
    else [high, atHigh] = [middle, value];
  }
  return { edge: 'limit', amps: between(excess, low, atLow, high, atHigh) };
};

/** Where the excess changes its sign between two amps. */
const between = (
  excess: (amps: Decimal) => Decimal | null,
  from: Decimal,
  atFrom: Decimal,
  to: Decimal,
  atTo: Decimal,
): Decimal => {
  let [low, atLow, high, atHigh] = [from, atFrom, to, atTo];
  let side = 0;
  for (let round = 1; round < MOST_ROUNDS; round++) {
    const width = high.minus(low);
    if (width.lte(high.times(CLOSE))) break;
    const share = round % 8 === 0 ? D('0.5') : atLow.neg().div(atHigh.minus(atLow));
    const middle = low.plus(width.times(share));
    const value = excess(middle);
    if (value === null) throw new Error(`${middle} A cannot be served, ${high} A can`);
    if (value.abs().lte(CLOSE)) return middle;
    if (value.lt(0)) {
      [low, atLow] = [middle, value];
      if (side === -1) atHigh = atHigh.div(2);
      side = -1;
    } else {
      [high, atHigh] = [middle, value];
      if (side === 1) atLow = atLow.div(2);
      side = 1;
    }
  }
  return low;
};
