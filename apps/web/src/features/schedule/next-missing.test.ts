import { scheduleView } from '@farlug/contract/schedule';
import { expect, test } from 'vitest';
import { missingCircuits, nextMissing } from './next-missing.ts';
import { openDemoRows } from './testing/open-demo.ts';

const { panels } = scheduleView(openDemoRows());
const missing = missingCircuits(panels);
const codes = missing.map(({ circuit }) => circuit.code);

test('the rows that lack a length are found, in the order of the schedule', () => {
  expect(missing.map(({ circuit }) => circuit.next!.field)).toEqual(codes.map(() => 'length'));
  expect(codes.length).toBeGreaterThan(1);
});

test('the next one is in the open panel, then after the chosen row, and after the last comes the first', () => {
  const second = missing.at(-1)!;
  expect(nextMissing(missing, null, second.panelId)!.panelId).toBe(second.panelId);
  expect(nextMissing(missing, null, null)!.circuit.code).toBe(codes[0]);
  expect(nextMissing(missing, missing[0]!.circuit.id, null)!.circuit.code).toBe(codes[1]);
  expect(nextMissing(missing, second.circuit.id, null)!.circuit.code).toBe(codes[0]);
  expect(nextMissing([], null, null)).toBeNull();
});
