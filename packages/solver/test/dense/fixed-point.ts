import { type Decimal, largest, NIL, sumOf } from './decimal.ts';

/** Rounds end where no entry moves by more than this share of the largest. */
const STILL = '1e-26';
const MOST_ROUNDS = 80;
/** How many earlier rounds a guess is drawn from. */
const DEPTH = 6;

type Vector = readonly Decimal[];
const dot = (a: Vector, b: Vector): Decimal => sumOf(a.map((each, k) => each.times(b[k]!)));
const less = (a: Vector, b: Vector): Decimal[] => a.map((each, k) => each.minus(b[k]!));

interface Change {
  /** How g(x) and g(x) − x changed from one round to the next. */
  value: Decimal[];
  miss: Decimal[];
  square: Decimal;
}

/**
 * x = g(x) from `start`: rounds of g, each begun where a straight line through the last ones would meet (D. G. Anderson,
 * J. ACM 12(4), 1965). `null` where it does not settle.
 */
export const fixedPoint = (start: Vector, g: (x: Vector) => Decimal[]): Decimal[] | null => {
  let x = start;
  let before: { value: Vector; miss: Vector } | null = null;
  let changes: Change[] = [];
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const value = g(x);
    const miss = less(value, x);
    const missed = largest([NIL, ...miss.map((each) => each.abs())]);
    if (!missed.isFinite()) return null;
    if (missed.lte(largest([NIL, ...value.map((each) => each.abs())]).times(STILL))) return value;
    if (before) {
      const change = { value: less(value, before.value), miss: less(miss, before.miss) };
      changes = [...changes, { ...change, square: dot(change.miss, change.miss) }].slice(-DEPTH);
    }
    before = { value, miss };
    const shares = leastSquares(changes, miss);
    x = value.map((each, k) =>
      each.minus(sumOf(changes.map((change, j) => change.value[k]!.times(shares[j]!)))),
    );
  }
  return null;
};

/** The shares of `changes` that take most of `miss` away: normal equations, elimination from the newest. */
const leastSquares = (changes: readonly Change[], miss: Vector): Decimal[] => {
  const m = changes.length;
  const rows = changes.map((a, i) => [
    ...changes.map((b, j) => (i === j ? a.square : dot(a.miss, b.miss))),
    dot(a.miss, miss),
  ]);
  const shares = changes.map(() => NIL);
  const kept: number[] = [];
  for (let k = m - 1; k >= 0; k--) {
    const pivot = rows[k]!;
    // A change that says nothing new would only carry rounding.
    if (!pivot[k]!.gt(changes[k]!.square.times('1e-20'))) continue;
    kept.push(k);
    for (let i = 0; i < k; i++) {
      const share = rows[i]![k]!.div(pivot[k]!);
      for (let j = 0; j <= m; j++) rows[i]![j] = rows[i]![j]!.minus(share.times(pivot[j]!));
    }
  }
  for (const k of kept.reverse()) {
    const known = sumOf(shares.slice(0, k).map((share, j) => share.times(rows[k]![j]!)));
    shares[k] = rows[k]![m]!.minus(known).div(rows[k]![k]!);
  }
  return shares;
};
