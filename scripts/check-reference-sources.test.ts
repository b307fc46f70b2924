import { expect, it } from 'vitest';
import { treeOf } from './audit.ts';
import { audit } from './check-reference-sources.ts';

const file = 'fixtures/reference/motors.json';

it('accepts a file with its source', () => {
  expect(audit.find(treeOf({ [file]: '{"source":"NEC 2023 Table 430.250","rows":[]}' }))).toEqual([]);
});

it.each(['{"rows":[]}', '{"source":"","rows":[]}', '{"source":"?","rows":[]}', '{"source":', 'null'])(
  'finds %s',
  (text) => {
    expect(audit.find(treeOf({ [file]: text }))).toHaveLength(1);
  },
);

it('finds that there is none', () => {
  expect(audit.find(treeOf({}))).toHaveLength(1);
});
