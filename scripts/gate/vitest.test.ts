import path from 'node:path';
import { expect, it } from 'vitest';
import { root } from './stage.ts';
import { summarise } from './vitest.ts';

const projects = [{ name: 'solver', folder: 'packages/solver' }];
const fileOf = (...statuses: string[]) => ({
  name: path.join(root, 'packages/solver/src/sum.test.ts'),
  status: statuses.includes('failed') ? 'failed' : 'passed',
  message: '',
  assertionResults: statuses.map((status) => ({ status, fullName: status })),
});
const counts = (...given: Parameters<typeof summarise>) =>
  summarise(...given).map(({ name, passed, failed }) => [name, passed, failed]);

it('adds up what passed and failed, and takes a skipped test for a failure', () => {
  expect(counts(projects, [fileOf('passed', 'failed', 'skipped'), fileOf('passed')], 1, '')).toEqual([
    ['solver', 2, 2],
  ]);
});

it('counts a file that could not be loaded', () => {
  expect(counts(projects, [{ ...fileOf(), status: 'failed' }], 1, '')).toEqual([['solver', 0, 1]]);
});

it('counts a project without tests', () => {
  expect(counts(projects, [], 0, '')).toEqual([['solver', 0, 1]]);
});

it('counts an end that no test explains', () => {
  expect(counts(projects, [fileOf('passed')], 1, 'an error outside of tests')).toEqual([
    ['solver', 1, 0],
    ['vitest itself', 0, 1],
  ]);
});
