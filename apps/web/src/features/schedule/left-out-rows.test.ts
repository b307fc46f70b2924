import type { LeftOut } from '@farlug/contract/job';
import { expect, test } from 'vitest';
import { leftOutRows } from './left-out-rows.ts';

const entry = (row: string, more: Partial<LeftOut>): LeftOut => ({
  table: 'run',
  row,
  code: null,
  circuitId: null,
  panelId: null,
  field: null,
  reason: 'The length is missing.',
  follows: false,
  ...more,
});

test('a circuit stands once with all of its reasons; what only follows comes last', () => {
  const rows = leftOutRows([
    entry('r1', { reason: 'Nothing feeds it.', follows: true, code: 'F9' }),
    entry('r2', { circuitId: 'c' }),
    entry('l2', { table: 'load', circuitId: 'c', reason: 'The load is missing.' }),
    entry('l3', { table: 'load', circuitId: 'c', reason: 'The load is missing.' }),
  ]);
  expect(rows.map(({ key, reasons }) => [key, reasons])).toEqual([
    ['c', ['The length is missing.', 'The load is missing.']],
    ['run r1', ['Nothing feeds it.']],
  ]);
});
