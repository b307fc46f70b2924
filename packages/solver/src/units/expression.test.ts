import { describe, expect, it } from 'vitest';
import { evaluateLength, evaluatePower } from './expression.ts';

const text = (outcome: { ok: true; text: string } | { ok: false; message: string }) =>
  outcome.ok ? outcome.text : `refused: ${outcome.message}`;

describe('lengths as sums of legs', () => {
  it.each([
    ['42 ft + 2 × 9 ft', '60 ft'],
    ['42 ft + 2 x 9 ft', '60 ft'],
    ['(30 + 12) ft', '42 ft'],
    ['40\' + 6"', '40.5 ft'],
    ['30 + 12 + 8.5', '50.5 ft'],
    ['3.048 m + 20 ft', '30 ft'],
    ['120 ft', '120 ft'],
  ])('%s is %s', (typed, kept) => expect(text(evaluateLength(typed, 'ft'))).toBe(kept));
  it('is exact in metres: 10 ft + 0.952 m = 4 m', () =>
    expect(text(evaluateLength('10 ft + 0.952 m', 'm'))).toBe('4 m'));
  it.each([
    '3 ft * 4 ft',
    '10 ft + 3',
    '10 ft - 40 ft',
    'sqrt(16) ft',
    'f(x)=x+1',
    'cos(0) + 1',
    '1 + import("fs")',
    '10 ft + 3 kg',
    '5 m + [1]',
    `1 ${'+ 1'.repeat(200)}`,
  ])('%s is refused', (typed) => expect(evaluateLength(typed, 'ft').ok).toBe(false));
});

describe('loads counted', () => {
  it.each([
    ['6 × 180 VA', '1080 VA'],
    ['2 × 1.5 kW + 300 W', '3.3 kW'],
    ['3 * 4 A', '12 A'],
    ['1.5 kW', '1.5 kW'],
  ])('%s is %s', (typed, kept) => expect(text(evaluatePower(typed))).toBe(kept));
  it('takes the field’s unit where none is written', () =>
    expect(text(evaluatePower('6 * 180', 'VA'))).toBe('1080 VA'));
  it.each(['6 × 180', '2 kW + 3 VA', '3 A + 2 W'])('%s is refused', (typed) =>
    expect(evaluatePower(typed).ok).toBe(false),
  );
});
