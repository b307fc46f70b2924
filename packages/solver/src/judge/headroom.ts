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
 * A step goes a little beyond what the last two values point to, and at most this many times as far as the last: past
 * no volts at all they grow again, and a longer step could leap over everything between.
 */
const BEYOND = 1.05;
const LONGEST = 4;

/**
 * The amperes at which `excess` reaches zero, from `atZero`, its value at 0: steps that follow its slope until it is
 * passed, then false position with scaled ends (Anderson and Björck 1973) and a bisection now and then. 0 where it is
 * above already, `null` where it never gets there. `excess` gives infinity where the network cannot be solved.
 */
export function largestBefore(atZero: number, excess: (amps: number) => number): number | null {
  if (atZero >= 0) return 0;
  let low = 0;
  let atLow = atZero;
  let high = 1;
  let atHigh = excess(high);
  while (atHigh < 0) {
    const pointed = low + (BEYOND * (high - low) * -atLow) / (atHigh - atLow);
    low = high;
    atLow = atHigh;
    high = pointed > 2 * low ? Math.min(pointed, LONGEST * low) : 2 * low;
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
      if (side > 0) atLow *= scaled(value, atHigh);
      high = middle;
      atHigh = value;
      side = 1;
    } else {
      if (side < 0 && Number.isFinite(atHigh)) atHigh *= scaled(value, atLow);
      low = middle;
      atLow = value;
      side = -1;
    }
  }
  return low;
}

/** How much the end that stays is scaled when the other one moves a second time, from `was` to `value`. */
function scaled(value: number, was: number): number {
  const share = 1 - value / was;
  return share > 0 ? share : 0.5;
}
