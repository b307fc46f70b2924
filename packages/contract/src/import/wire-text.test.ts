import { describe, expect, test } from 'vitest';
import { readWire } from './wire-text.ts';

const none = { sets: null, material: null, neutral: null, ground: null, raceway: null };

describe('wire as schedules write it', () => {
  test.each([
    ['#12', { size: '12 AWG' }],
    ['12/2', { size: '12 AWG' }],
    ['2-#10', { size: '10 AWG' }],
    ['2#12, 1#12 G', { size: '12 AWG', ground: '12 AWG' }],
    ['3#8 + #10 G', { size: '8 AWG', ground: '10 AWG' }],
    ['3-#6, 1-#8 N, 1-#10 G', { size: '6 AWG', neutral: '8 AWG', ground: '10 AWG' }],
    ['#12, 3/4" EMT', { size: '12 AWG', raceway: '3/4" EMT' }],
    ['250 kcmil AL', { size: '250 kcmil', material: 'aluminum' }],
    ['2 sets 3/0', { size: '3/0 AWG', sets: 2 }],
    ['1,5 mm²', { size: '1.5 mm2' }],
    ['3x2.5 mm2', { size: '2.5 mm2' }],
    ['5G16 mm²', { size: '16 mm2' }],
    ['10 THHN', { size: '10 AWG' }],
  ])('%s', (text, expected) => {
    expect(readWire(text)).toEqual({ ...none, ...expected });
  });

  test('a bare number is mm² where the column says so', () => {
    expect(readWire('2.5', 'mm2')?.size).toBe('2.5 mm2');
  });

  test.each(['', 'see plan', '13 AWG', '3/4" EMT'])('“%s” holds no size', (text) => {
    expect(readWire(text)).toBeNull();
  });
});
