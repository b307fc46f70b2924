import { beyondLimit, type Judged } from './verdict.ts';

/** How far the worst limit that more current can break is overstepped, ≤ 0 where none is; `null` without one. */
export function excessOf(judged: readonly Judged[]): number | null {
  let worst: number | null = null;
  for (const each of judged) {
    if (each.name === 'starting' || each.name === 'rise') continue;
    const beyond = beyondLimit(each);
    if (worst === null || beyond > worst) worst = beyond;
  }
  return worst;
}

/** Above this many amperes a load counts as without an end. */
const MOST_AMPS = 1e7;
const NARROW = 1e-12;
const ROUNDS = 200;

/**
 * The amperes at which `excess` first reaches zero: doubling, then false position with halved ends (the Illinois
 * rule, Dowell and Jarratt 1971) and a bisection now and then. 0 where it is above already, `null` where it never
 * gets there. `excess` gives infinity where the network cannot be solved.
 */
export function largestBefore(excess: (amps: number) => number): number | null {
  let low = 0;
  let atLow = excess(0);
  if (atLow >= 0) return 0;
  let high = 1;
  let atHigh = excess(high);
  while (atHigh < 0) {
    low = high;
    atLow = atHigh;
    high *= 2;
    if (high > MOST_AMPS) return null;
    atHigh = excess(high);
  }
  let side = 0;
  for (let round = 1; round <= ROUNDS && high - low > NARROW * high; round++) {
    const secant = low + ((high - low) * -atLow) / (atHigh - atLow);
    const useful = round % 16 !== 0 && secant > low && secant < high;
    const middle = useful ? secant : (low + high) / 2;
    const value = excess(middle);
    if (value === 0) return middle;
    if (value > 0) {
      high = middle;
      atHigh = value;
      if (side > 0) atLow /= 2;
      side = 1;
    } else {
      low = middle;
      atLow = value;
      if (side < 0 && Number.isFinite(atHigh)) atHigh /= 2;
      side = -1;
    }
  }
  return low;
}
