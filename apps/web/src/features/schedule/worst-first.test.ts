import { jobFromRows } from '@farlug/contract/job';
import { beforeAll, expect, test } from 'vitest';
import { jobResult, prepareRows } from '../../workers/job-result.ts';
import type { JobResult } from '../../workers/results.ts';
import { openDemoRows } from './testing/open-demo.ts';
import { loadsWorstFirst, runsWorstFirst } from './worst-first.ts';

let result: JobResult;
beforeAll(() => {
  result = jobResult(prepareRows(jobFromRows(openDemoRows())), 'each-circuit', 1, () => 0);
});

const inOrder = (kinds: readonly string[]) => [...new Set(kinds)];

test('loads stand by verdict, then by what they drop', () => {
  const loads = loadsWorstFirst(result);
  expect(inOrder(loads.map(({ shown }) => shown))).toEqual(['over', 'near', 'within']);
  const over = loads.filter(({ shown }) => shown === 'over').map(({ totalPercent }) => totalPercent!);
  expect(over).toEqual([...over].sort((a, b) => b - a));
  expect(loads[0]!.row).toBe(result.worst!.worst.row);
});

test('runs stand by what lies beyond them, then by their own drop', () => {
  const runs = runsWorstFirst(result);
  expect(runs).toHaveLength(result.runs.size);
  const over = runs.filter(({ shown }) => shown === 'over').map(({ dropPercent }) => dropPercent!);
  expect(over.length).toBeGreaterThan(0);
  expect(over).toEqual([...over].sort((a, b) => b - a));
});
