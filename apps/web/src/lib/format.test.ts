import { expect, test } from 'vitest';
import {
  formatBytes,
  formatCount,
  formatLimit,
  formatMoment,
  formatPercent,
  formatRecent,
  shortHash,
} from './format.ts';
import { revisionLetter } from './revision-letter.ts';

test('percents have a space before the sign and keep their digits', () => {
  expect(formatPercent(6.708)).toBe('6.71\u00a0%');
  expect(formatPercent(null)).toBe('');
  expect(formatLimit('3.0')).toBe('3\u00a0%');
  expect(formatLimit(1.5)).toBe('1.5\u00a0%');
});

test('moments are short, and today is said as today', () => {
  expect(formatMoment('2026-11-03T10:58:00Z')).toBe('3 Nov 2026, 10:58');
  const now = new Date('2026-11-03T18:00:00Z');
  expect(formatRecent('2026-11-03T10:58:00Z', now)).toBe('today, 10:58');
  expect(formatRecent('2026-11-02T10:58:00Z', now)).toBe('2 Nov 2026');
});

test('counts take the plural, sizes their unit, hashes eight digits', () => {
  expect([formatCount(1, 'job'), formatCount(0, 'job'), formatCount(1204, 'change')]).toEqual([
    '1 job',
    '0 jobs',
    '1,204 changes',
  ]);
  expect([formatBytes(900), formatBytes(20480), formatBytes(5 * 1024 * 1024)]).toEqual([
    '900 B',
    '20 kB',
    '5.0 MB',
  ]);
  expect(shortHash('af965f7bcab0deb6')).toBe('af965f7b');
});

test('revisions are lettered as on drawings', () => {
  expect([1, 3, 26, 27, 52, 53, 702, 703].map(revisionLetter)).toEqual([
    'A',
    'C',
    'Z',
    'AA',
    'AZ',
    'BA',
    'ZZ',
    'AAA',
  ]);
});
