import { expect, test } from 'vitest';
import {
  decimalOrNull,
  readAmps,
  readHertz,
  readOhms,
  readPercent,
  readRatio,
  readShare,
  readVolts,
} from './typed-number.ts';

test.each([
  ['480 V', readVolts, '480'],
  ['12.47 kV', readVolts, '12470'],
  ['22 kA', readAmps, '22000'],
  ['1,200', readAmps, '1200'],
  ['0,004 ohm', readOhms, '0.004'],
  ['0.004 Ω', readOhms, '0.004'],
  ['60 Hz', readHertz, '60'],
  ['3\u202f%', readPercent, '3'],
  ['110', readShare, '110'],
  ['0', readRatio, '0'],
  ['  ', readVolts, null],
])('%s is kept as a plain decimal', (text, read, value) => {
  expect(decimalOrNull(text, read)).toBe(value);
});

test.each([
  ['0', readVolts],
  ['480 A', readVolts],
  ['much', readAmps],
  ['101', readPercent],
  ['1001', readHertz],
  ['-1', readOhms],
  ['1e3', readRatio],
])('%s is not taken', (text, read) => {
  expect(read(text).ok).toBe(false);
  expect(decimalOrNull(text, read)).toBeNull();
});
