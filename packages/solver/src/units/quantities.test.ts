import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseBreaker } from './breaker.ts';
import { parseConductorSize } from './conductor-size.ts';
import { parseAmps, parsePercent, parseTemperature, parseVolts } from './electrical.ts';
import { lengthIn, metresOf, parseLength } from './length.ts';
import { parseNumber } from './number.ts';
import { loadSizeOf, parsePower } from './power.ts';
import { readQuantity } from './quantity.ts';

const text = (outcome: { ok: true; text: string } | { ok: false; message: string }) =>
  outcome.ok ? outcome.text : `refused: ${outcome.message}`;

describe('lengths', () => {
  it.each([
    ['120 ft', '120 ft'],
    ['120ft', '120 ft'],
    ["120'", '120 ft'],
    ['120′', '120 ft'],
    [`120' 6"`, '120.5 ft'],
    ['120 ft 6 in', '120.5 ft'],
    ['118½', '118.5 ft'],
    ['36m', '36 m'],
    ['36 metres', '36 m'],
    ['0.1 mi', '0.1 mi'],
    ['1,500', '1500 ft'],
    ['1,5 km', '1.5 km'],
    ['0', '0 ft'],
  ])('%s', (typed, kept) => expect(text(parseLength(typed, 'ft'))).toBe(kept));

  it.each([
    ['', 'is empty'],
    ['long', 'does not start with a number'],
    ['12 parsec', '"parsec" is not a unit'],
    ['-4 m', 'must be ≥ 0'],
    [`10' 14"`, 'must be ≤ 12 in'],
    ['400 km', 'must be ≤ 300 km'],
    ['1/0 ft', 'number'],
  ])('"%s" is refused', (typed, why) => expect(text(parseLength(typed, 'm'))).toContain(why));

  it('converts exactly: 1 ft = 0.3048 m, 1 mi = 5280 ft (international foot, 1959)', () => {
    expect(lengthIn({ value: '120', unit: 'ft' }, 'm')).toBe('36.576');
    expect(lengthIn({ value: '0.1', unit: 'mi' }, 'ft')).toBe('528');
    expect(lengthIn({ value: '36.576', unit: 'm' }, 'ft')).toBe('120');
    expect(metresOf({ value: '0.1', unit: 'mi' })).toBe(160.9344);
  });

  it('keeps what was typed, and goes from feet to metres and back without loss', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 9_999_999 }), (hundredths) => {
        const value = String(hundredths / 100);
        const typed = parseLength(`${value} ft`, 'm');
        expect(typed).toMatchObject({ ok: true, value, unit: 'ft' });
        const metres = lengthIn({ value, unit: 'ft' }, 'm');
        expect(lengthIn({ value: metres, unit: 'm' }, 'ft')).toBe(value);
      }),
    );
  });

  it('reads back what rows keep', () => {
    expect(readQuantity('120.5 ft', ['ft', 'm'])).toEqual({ value: '120.5', unit: 'ft' });
    expect(readQuantity('120.5 yd', ['ft', 'm'])).toBeNull();
    expect(readQuantity('120.5', ['ft'])).toBeNull();
  });
});

describe('loads', () => {
  it.each([
    ['16 A', '16 A'],
    ['16', '16 A'],
    ['180 VA', '180 VA'],
    ['2.4kVA', '2.4 kVA'],
    ['1,500 W', '1500 W'],
    ['1.5 kW', '1.5 kW'],
    ['3/4 hp', '0.75 hp'],
    ['¾ hp', '0.75 hp'],
    ['7 1/2 hp', '7.5 hp'],
    ['7½ hp', '7.5 hp'],
    ['1/3 HP', '0.333333333333 hp'],
    ['−800 W', '-800 W'],
  ])('%s', (typed, kept) => expect(text(parsePower(typed, 'A'))).toBe(kept));

  it('refuses a bare number where nothing says its unit, and generation in horsepower', () => {
    expect(text(parsePower('16'))).toContain('the unit is missing');
    expect(text(parsePower('-1 hp'))).toContain('must be > 0 hp');
    expect(text(parsePower('5 BTU'))).toContain('not a unit');
  });
  it('becomes the key of a job file', () => {
    expect(loadSizeOf({ value: '2.4', unit: 'kVA' })).toEqual({ key: 'va', value: 2400 });
    expect(loadSizeOf({ value: '0.75', unit: 'hp' })).toEqual({ key: 'hp', value: 0.75 });
  });
});

describe('breakers', () => {
  it.each([
    ['20', '20/1'],
    ['20A', '20/1'],
    ['20/2', '20/2'],
    ['20A/2P', '20/2'],
    ['20 A 2-pole', '20/2'],
    ['2P-30', '30/2'],
    ['3P 100A', '100/3'],
    ['B16', '16/1'],
    ['C20/2P', '20/2'],
  ])('%s', (typed, kept) => expect(text(parseBreaker(typed))).toBe(kept));
  it('takes the poles that the row already says', () => expect(text(parseBreaker('60 A', 3))).toBe('60/3'));
  it.each(['', '20/4', 'twenty', '0', '20/2/1', '99999'])('"%s" is refused', (typed) =>
    expect(parseBreaker(typed)).toEqual({ ok: false, message: expect.stringMatching(/must be/) }),
  );
});

describe('conductors', () => {
  it.each([
    ['12', '12 AWG', null],
    ['#12 Cu', '12 AWG', 'copper'],
    ['2 sets 3/0', '2 sets 3/0 AWG', null],
    ['(2) 250 kcmil', '2 sets 250 kcmil', null],
    ['2 x 3/0 AL', '2 sets 3/0 AWG', 'aluminum'],
    ['4/0 THWN-2 aluminium', '4/0 AWG', 'aluminum'],
    ['10 THHN', '10 AWG', null],
    ['16mm²', '16 mm2', null],
  ])('%s', (typed, kept, material) => {
    const size = parseConductorSize(typed);
    expect(text(size)).toBe(kept);
    expect(size.ok && size.material).toBe(material);
  });
  it.each(['11', '60 sets 3/0', '3 #12', 'wire'])('"%s" is refused', (typed) =>
    expect(parseConductorSize(typed).ok).toBe(false),
  );
});

describe('the rest', () => {
  it.each([
    [parsePercent('3'), '3 %'],
    [parsePercent('1.5 %'), '1.5 %'],
    [parseVolts('480 V'), '480 V'],
    [parseVolts('0.48 kV'), '480 V'],
    [parseAmps('22 kA'), '22000 A'],
    [parseTemperature('86 °F'), '30 °C'],
    [parseTemperature('40'), '40 °C'],
  ])('%#: %o', (outcome, kept) => expect(text(outcome)).toBe(kept));
  it('holds to bounds', () => {
    expect(text(parsePercent('130'))).toBe('refused: must be ≤ 100 %');
    expect(text(parseVolts('0'))).toContain('must be > 0');
    expect(text(parseTemperature('600 °F'))).toBe('refused: must be ≤ 250 °C');
  });
  it.each([
    ['1,500', '1500'],
    ['1,5', '1.5'],
    ['0,125', '0.125'],
    ['3/4', '0.75'],
    ['-2', '-2'],
    ['.5', '0.5'],
    ['1 500', '1500'],
  ])('number %s', (typed, value) => expect(parseNumber(typed)).toEqual({ ok: true, value }));
  it.each(['1.2.3', '1e5', '', 'NaN', '3/0'])('number "%s" is refused', (typed) =>
    expect(parseNumber(typed).ok).toBe(false),
  );
});
