import type { ReportDigest } from '@farlug/contract/routes';
import { expect, test } from 'vitest';
import { type Finding, reasonsOf, verdictOf } from './finding-words.ts';

const digest = (counts: Partial<ReportDigest['counts']>): ReportDigest => ({
  counts: { over: 0, rise: 0, near: 0, within: 0, unjudged: 0, unserved: 0, ...counts },
  findings: [],
});

test('the verdict counts what exceeds among what is judged, and says the rest apart', () => {
  expect(verdictOf(digest({ over: 2, rise: 1, near: 4, within: 5, unjudged: 6 }))).toEqual({
    exceed: 3,
    lead: '3 of 12 exceed.',
    rest: '4 near a limit, 6 without a limit.',
  });
  expect(verdictOf(digest({ within: 9 }))).toEqual({
    exceed: 0,
    lead: 'None of 9 exceeds a limit.',
    rest: '',
  });
});

test('a circuit without supply exceeds as well', () => {
  expect(verdictOf(digest({ within: 1, unserved: 1 }))).toMatchObject({
    exceed: 1,
    rest: '1 circuit without supply.',
  });
});

test('what is near says how near, and what exceeds says by what', () => {
  const finding: Finding = {
    place: 'LP-2-3',
    serves: '',
    load: 'LP-2-3',
    shown: 'near',
    feederPercent: 2.08,
    branchPercent: 2.74,
    totalPercent: 4.82,
    limitPercent: 5,
    reasons: [],
  };
  expect(reasonsOf(finding)).toEqual([expect.stringMatching(/^total 4\.82\s% of 5\s%$/)]);
  expect(reasonsOf({ ...finding, shown: 'over', reasons: ['branch 3.38 % > 3 %'] })).toEqual([
    'branch 3.38 % against 3 %',
  ]);
  expect(reasonsOf({ ...finding, totalPercent: null })).toEqual([]);
});
