import { describe, expect, test } from 'vitest';
import { workshop } from '../../test/workshop.ts';
import { applyEdit } from '../edit/index.ts';
import { jobFromRows } from '../job/index.ts';
import type { JobRows } from '../rows/index.ts';
import { builtLength } from './built-length.ts';
import { addCircuitEdit, changeCircuitFieldEdit, type ScheduleChange } from './circuit-edits.ts';
import { assumeLoadEdit, assumeStartingEdit } from './proposal-edits.ts';
import { scheduleView } from './schedule-view.ts';

const after = (rows: JobRows, { edit, problem }: ScheduleChange): JobRows => {
  if (!edit) throw new Error(problem ?? 'nothing to change');
  const outcome = applyEdit(rows, edit);
  if (!outcome.ok) throw new Error(JSON.stringify(outcome));
  return outcome.rows;
};
const circuit = (rows: JobRows, code: string) =>
  scheduleView(rows)
    .panels.flatMap((panel) => panel.circuits)
    .find((one) => one.code === code)!;

describe('proposed values', () => {
  test('a length is built of its route', () => {
    // (14 + 16 + 9 + 10)·1.1 = 53.9 ft, up to the next 5 ft; (4 + 6.5 + 3 + 3)·1.1 = 18.15 m, up to the next metre.
    expect(builtLength({ across: '14', along: '16', drops: '9' }, 'ft')).toBe('55 ft');
    expect(builtLength({ across: '4', along: '6.5', drops: '3' }, 'm')).toBe('19 m');
    expect(builtLength({ across: '0', along: '0', drops: '0' }, 'ft')).toBe('15 ft');
  });

  test('an unknown load is 80 % of its breaker, and marked', () => {
    const before = workshop();
    const { panel } = circuit(before, 'LP-1-1');
    const rows = after(before, addCircuitEdit(before, panel.id, { amps: '20' }));
    const made = circuit(after(rows, assumeLoadEdit(rows, circuit(rows, 'LP-1-3').id)), 'LP-1-3');
    expect(made.loads[0]).toMatchObject({ size: '16 A', sizeAssumed: true });
    expect(made.fields.load).toEqual({ text: '16 A', assumed: true, draft: false });
    const bare = after(before, addCircuitEdit(before, panel.id));
    expect(assumeLoadEdit(bare, circuit(bare, 'LP-1-3').id).problem).toMatch(/breaker first/);
  });

  test('a motor starts at six times its full-load current', () => {
    const before = workshop();
    const { id } = circuit(before, 'LP-1-15/17/19');
    // 5 hp at 208 V draws 16.7 A (NEC Table 430.250): 6 × 16.7 = 100.2 A.
    const hp = after(before, changeCircuitFieldEdit(before, id, 'load', '5 hp'));
    const cleared = after(hp, changeCircuitFieldEdit(hp, id, 'starting', ''));
    const rows = after(cleared, assumeStartingEdit(cleared, id));
    expect(circuit(rows, 'LP-1-15/17/19').loads[0]).toMatchObject({
      startingAmps: '100.2',
      startingPowerFactor: '0.35',
    });
    expect(jobFromRows(rows).leftOut).toEqual([]);
    const empty = after(before, changeCircuitFieldEdit(before, id, 'load', ''));
    expect(assumeStartingEdit(empty, id).problem).toMatch(/load first/);
  });
});
