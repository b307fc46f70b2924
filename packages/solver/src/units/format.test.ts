import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  exceeds,
  formatFixed,
  formatLimit,
  formatNumber,
  formatPercentAgainst,
  formatQuantity,
  formatSize,
} from './format.ts';

describe('formatPercentAgainst', () => {
  it.each([
    [3.004, 3, '3.004 %'],
    [3, 3, '3.00 %'],
    [3.000000001, 3, '3.00 %'],
    [2.996, 3, '3.00 %'],
    [5.814, 5, '5.81 %'],
    [3.00004, 3, '3.00004 %'],
    [1.4, null, '1.40 %'],
    [-0.2, 3, '−0.20 %'],
  ])('%f against %s is %s', (value, limit, text) => expect(formatPercentAgainst(value, limit)).toBe(text));

  it('never contradicts the verdict', () => {
    const percent = fc.double({ min: 0, max: 20, noNaN: true });
    const near = fc.tuple(fc.constantFrom(1.5, 2.5, 3, 5), fc.double({ min: -1e-5, max: 1e-5, noNaN: true }));
    fc.assert(
      fc.property(
        fc.oneof(
          fc.tuple(percent, percent),
          near.map(([l, d]) => [l + d, l] as const),
        ),
        ([value, limit]) => {
          const shown = Number.parseFloat(formatPercentAgainst(value, limit));
          if (exceeds(value, limit) && value - limit > 1e-11) expect(shown).toBeGreaterThan(limit);
          if (!exceeds(value, limit)) expect(shown).toBeLessThanOrEqual(limit * (1 + 1e-9) + 1e-11);
        },
      ),
    );
  });
});

describe('figures', () => {
  it('have a true minus and no negative zero', () => {
    expect(formatFixed(-0.001, 2)).toBe('0.00');
    expect(formatFixed(-1.25, 1)).toMatch(/^−1\.[23]$/);
    expect(formatNumber(-0)).toBe('0');
    expect(formatNumber(12345.6789)).toBe('12,345.679');
  });
  it('show what was typed', () => {
    expect(formatQuantity({ value: '1500.25', unit: 'ft' })).toBe('1,500.25 ft');
    expect(formatLimit(1.5)).toBe('1.5 %');
    expect(formatSize('16 mm2')).toBe('16 mm²');
  });
});
