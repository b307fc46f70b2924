import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { orderKey } from '../rows/index.ts';
import { inOrder, orderKeyBetween, orderKeys } from './order-keys.ts';

describe('order keys', () => {
  test('stand between their neighbours, wherever rows are put in', () => {
    fc.assert(
      fc.property(fc.array(fc.nat({ max: 1000 }), { minLength: 1, maxLength: 200 }), (places) => {
        const keys: string[] = [];
        for (const place of places) {
          const at = place % (keys.length + 1);
          const key = orderKeyBetween(keys[at - 1] ?? null, keys[at] ?? null);
          keys.splice(at, 0, key);
        }
        expect(keys).toEqual([...keys].sort((a, b) => (a < b ? -1 : 1)));
        expect(new Set(keys).size).toBe(keys.length);
        for (const key of keys) expect(orderKey.safeParse(key).success).toBe(true);
      }),
    );
  });

  test('stay short where thousands are added at an end, and where 300 are put into one gap', () => {
    const longest = (keys: string[]) => Math.max(...keys.map((key) => key.length));
    expect(longest(orderKeys(5000))).toBeLessThanOrEqual(6);
    let first = orderKeyBetween(null, null);
    for (let i = 0; i < 5000; i++) first = orderKeyBetween(null, first);
    expect(first.length).toBeLessThanOrEqual(6);
    const low = orderKeyBetween(null, null);
    let high = orderKeyBetween(low, null);
    for (let i = 0; i < 300; i++) high = orderKeyBetween(low, high);
    expect(high.length).toBeLessThanOrEqual(64);
  });

  test('that two people gave out at once are kept apart by the id', () => {
    const rows = [
      { orderKey: 'V', id: 'b' },
      { orderKey: 'V', id: 'a' },
      { orderKey: 'U', id: 'c' },
    ];
    expect(inOrder(rows).map((row) => row.id)).toEqual(['c', 'a', 'b']);
    expect(orderKeyBetween('V', 'V') > 'V').toBe(true);
  });
});
