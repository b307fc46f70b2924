import { D, type Decimal, largest, NIL, sumOf } from './decimal.ts';

/** Rounds end where no entry moves by more than this share of the largest, or of `LEAST` where all are smaller. */
const STILL = '1e-22';
const LEAST = D('1e-6');
const MOST_ROUNDS = 80;
/** How many earlier rounds a guess is drawn from. */
const DEPTH = 10;

type Vector = readonly Decimal[];
const dot = (a: Vector, b: Vector): Decimal => sumOf(a.map((each, k) => each.times(b[k]!)));
const less = (a: Vector, b: Vector): Decimal[] => a.map((each, k) => each.minus(b[k]!));

interface Change {
  /** How g(x) and g(x) − x changed from one round to the next. */
  value: Decimal[];
  miss: Decimal[];
  /** Of its miss with its own and those of the changes before it. */
  products: Map<Change, Decimal>;
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
    if (missed.lte(largest([LEAST, ...value.map((each) => each.abs())]).times(STILL))) return value;
    if (before) {
      const change: Change = {
        value: less(value, before.value),
        miss: less(miss, before.miss),
        products: new Map(),
      };
      changes = [...changes, change].slice(-DEPTH);
      for (const each of changes) change.products.set(each, dot(each.miss, change.miss));
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
  const rows = changes.map((a) => [
    ...changes.map((b) => (a.products.get(b) ?? b.products.get(a))!),
    dot(a.miss, miss),
  ]);
  const shares = changes.map(() => NIL);
  const kept: number[] = [];
  for (let k = m - 1; k >= 0; k--) {
    const pivot = rows[k]!;
    // A change that says nothing new would only carry rounding.
    if (!pivot[k]!.gt(changes[k]!.products.get(changes[k]!)!.times('1e-36'))) continue;
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
