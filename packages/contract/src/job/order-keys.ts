/**
 * Order keys: the digits of a fraction in base 62, compared as bytes. A row is put between two others by a key
 * between theirs, so that no other row changes. Keys carry no trailing zero.
 */
const DIGITS = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz';
const BASE = 62n;
const GRID = 6;
const STEP = BASE * BASE;

const valueAt = (key: string, digits: number): bigint => {
  let value = 0n;
  for (let i = 0; i < digits; i++) {
    const digit = i < key.length ? Math.max(0, DIGITS.indexOf(key[i]!)) : 0;
    value = value * BASE + BigInt(digit);
  }
  return value;
};

const keyOf = (value: bigint, digits: number): string => {
  let key = '';
  for (let rest = value, i = 0; i < digits; i++, rest /= BASE) key = DIGITS[Number(rest % BASE)] + key;
  return key.replace(/0+$/, '');
};

/** A key after `before` and ahead of `after`; null is the open end. */
export function orderKeyBetween(before: string | null, after: string | null): string {
  if (before === null && after === null) return keyOf(BASE ** BigInt(GRID) / 2n, GRID);
  if (after === null) {
    const next = valueAt(before!, GRID) + STEP;
    if (next < BASE ** BigInt(GRID)) return keyOf(next, GRID);
  }
  if (before === null) {
    const previous = valueAt(after!, GRID) - STEP;
    if (previous > 0n) return keyOf(previous, GRID);
  }
  if (before !== null && after !== null && before >= after) return `${before}V`;
  const most = Math.max(before?.length ?? 0, after?.length ?? 0) + 1;
  for (let digits = 1; ; digits++) {
    const scale = BASE ** BigInt(Math.max(0, most - digits));
    const low = before === null ? 0n : valueAt(before, Math.max(most, digits)) / scale;
    const high = after === null ? BASE ** BigInt(digits) * scale : valueAt(after, Math.max(most, digits));
    const middle = (low + (high + scale - 1n) / scale) / 2n;
    if (middle > low && middle * scale < high) return keyOf(middle, digits);
  }
}

/** Keys of `count` rows in a row, after `before`. */
export function orderKeys(count: number, before: string | null = null): string[] {
  const keys: string[] = [];
  for (let i = 0, last = before; i < count; i++) {
    last = orderKeyBetween(last, null);
    keys.push(last);
  }
  return keys;
}

/** Rows in the order in which they are shown; ties go by id, so that every page has the same order. */
export function inOrder<R extends { orderKey: string; id: string }>(rows: Iterable<R>): R[] {
  return [...rows].sort((a, b) => compare(a.orderKey, b.orderKey) || compare(a.id, b.id));
}

const compare = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0);
