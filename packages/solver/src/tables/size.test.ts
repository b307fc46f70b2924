import { describe, expect, it } from 'vitest';
import { parseSize, sizesOf } from './size.ts';

describe('parseSize', () => {
  it.each([
    ['12', '12 AWG'],
    ['#12', '12 AWG'],
    ['12 AWG', '12 AWG'],
    ['12awg', '12 AWG'],
    ['No. 6', '6 AWG'],
    ['3/0', '3/0 AWG'],
    ['#3/0', '3/0 AWG'],
    ['0000', '4/0 AWG'],
    ['250', '250 kcmil'],
    ['250 kcmil', '250 kcmil'],
    ['500 MCM', '500 kcmil'],
    ['16mm²', '16 mm2'],
    ['16 mm2', '16 mm2'],
    ['2,5 mm²', '2.5 mm2'],
    ['1.5 sq mm', '1.5 mm2'],
  ])('%s is %s', (text, size) => expect(parseSize(text)).toMatchObject({ ok: true, size }));

  it.each([
    ['11', '12 AWG and 10 AWG'],
    ['220 kcmil', '250 kcmil and 300 kcmil'],
    ['12 mm2', '10 mm2 and 16 mm2'],
    ['250 AWG', 'AWG'],
    ['thick', 'such as 12, 3/0, 250 kcmil or 16 mm2'],
    ['', 'such as'],
  ])('"%s" is refused, saying what would be right', (text, hint) =>
    expect(parseSize(text)).toEqual({ ok: false, message: expect.stringContaining(hint) }),
  );

  it('reads back every size of the tables', () => {
    const all = [...sizesOf('copper', 'awg'), ...sizesOf('copper', 'mm2')];
    for (const { size } of all) expect(parseSize(size)).toMatchObject({ ok: true, size });
    expect(all.length).toBe(30 + 24);
  });
});

describe('sizesOf', () => {
  it('goes from thin to thick', () => {
    for (const family of ['awg', 'mm2'] as const) {
      const areas = sizesOf('copper', family).map((row) => row.areaMm2);
      expect(areas).toEqual([...areas].sort((a, b) => a - b));
    }
  });
  it('has aluminium in mm² from 10 (IEC 60228)', () => {
    expect(sizesOf('aluminum', 'mm2')[0]!.size).toBe('10 mm2');
  });
  it('knows 12 AWG as 6530 cmil and 3.3088 mm² (Table 8; 1 cmil = 5.067075e-4 mm²)', () => {
    const row = parseSize('12');
    expect(row.ok && [row.cmil, Number(row.areaMm2.toFixed(4))]).toEqual([6530, 3.3088]);
  });
});
