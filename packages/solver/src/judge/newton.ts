import { gmres, hasPositiveDeterminant } from './gmres.ts';
import { addScaled, size } from './vectors.ts';

/** x ↦ g(x) whose fixed point is wanted, in real vectors of one length. */
export interface FixedPoint {
  /** g(x) − x into `out`. Returns max|g(x) − x| as a share of the largest voltage. */
  mismatch: (x: Float64Array, out: Float64Array) => number;
  /** Takes the slope g′ at x from here on. */
  linearise: (x: Float64Array) => void;
  /** g′·d into `out`. */
  slope: (d: Float64Array, out: Float64Array) => void;
}

/** A step is halved, down to `SHORTEST`, until it brings the mismatch down by this share of itself. */
const FALL = 1e-4;
const SHORTEST = 1 / 64;
/** The mismatch has stopped falling when so many steps together do not halve it. */
const PATIENCE = 6;
/** Steps after the mismatch met its target, towards rounding. */
const SHARPENING = 3;
const SHARP = 1e-15;

/**
 * Newton's method on g(x) − x = 0 from `x`, in place, steps halved where they overshoot, each linear system solved by
 * GMRES. Near a collapse, where plain rounds need thousands, it needs a few dozen.
 * Gives up where the mismatch stops falling, as it does at a fold of the equations beyond which there is no solution,
 * and where what was found lies beyond the fold, where more load would come with more volts. Returns the mismatch that
 * was reached, as a share of the largest voltage.
 */
export function newton(map: FixedPoint, x: Float64Array, target: number): { ok: boolean; mismatch: number } {
  let f: Float64Array = new Float64Array(x.length);
  let spare: Float64Array = new Float64Array(x.length);
  const trial = new Float64Array(x.length);
  const jacobian = (d: Float64Array, out: Float64Array): void => {
    map.slope(d, out);
    for (let i = 0; i < d.length; i++) out[i] = d[i]! - out[i]!;
  };
  /** Whether x is on the near side of the fold: I − g′ has the sign of determinant that it has with no load. */
  const before = (towards: Float64Array): boolean => {
    map.linearise(x);
    return hasPositiveDeterminant(jacobian, towards);
  };
  let mismatch = map.mismatch(x, f);
  let left = size(f);
  let halved = left;
  let slow = 0;
  let sharpened = 0;
  let direction = f;
  while (Number.isFinite(left) && slow < PATIENCE && sharpened < SHARPENING && mismatch > SHARP) {
    map.linearise(x);
    direction = gmres(jacobian, f);
    const met = mismatch <= target;
    let step = 1;
    let share: number;
    let leaves: number;
    for (;;) {
      trial.set(x);
      addScaled(trial, step, direction);
      share = map.mismatch(trial, spare);
      leaves = size(spare);
      if (leaves <= (1 - FALL * step) * left) break;
      step /= 2;
      if (met || step < SHORTEST) return { ok: met && before(direction), mismatch };
    }
    x.set(trial);
    [f, spare] = [spare, f];
    mismatch = share;
    left = leaves;
    if (met) sharpened++;
    else if (left > halved / 2) slow++;
    else {
      halved = left;
      slow = 0;
    }
  }
  return { ok: mismatch <= target && before(direction), mismatch };
}
