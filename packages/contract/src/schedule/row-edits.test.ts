import { describe, expect, test } from 'vitest';
import { workshop } from '../../test/workshop.ts';
import { applyEdit } from '../edit/index.ts';
import { jobFromRows } from '../job/index.ts';
import type { JobRows, Row } from '../rows/index.ts';
import type { ScheduleChange } from './circuit-edits.ts';
import { changeRowFieldEdit, renamePointEdit } from './row-edits.ts';
import { ROW_FIELDS, type TypedTable } from './row-fields.ts';
import { scheduleView } from './schedule-view.ts';

const after = (rows: JobRows, { edit, problem }: ScheduleChange): JobRows => {
  if (!edit) throw new Error(problem ?? 'nothing to change');
  const outcome = applyEdit(rows, edit);
  if (!outcome.ok) throw new Error(JSON.stringify(outcome));
  return outcome.rows;
};
const first = <T extends TypedTable>(rows: JobRows, table: T, code: string): Row<T> => {
  const named = (row: Row<T>) =>
    table === 'panel' ? rows.bus.get((row as Row<'panel'>).busId)!.code : (row as Row<'run'>).code;
  return [...(rows[table].values() as Iterable<Row<T>>)].find((row) => named(row) === code)!;
};

describe('fields outside the grid', () => {
  test.each([
    ['panel', 'LP-1', 'mainAmps', '400 A', { mainAmps: '400' }],
    ['panel', 'LP-1', 'spaces', '54', { spaces: 54 }],
    ['panel', 'LP-1', 'mounting', 'flush', { mounting: 'flush' }],
    ['run', 'F2', 'length', '36 m', { length: '36 m' }],
    ['run', 'F2', 'size', '2 sets 3/0 Al', { size: '3/0 AWG', sets: 2, material: 'aluminum' }],
    ['run', 'F2', 'neutral', '1/0', { neutralSize: '1/0 AWG' }],
    ['run', 'F1', 'breaker', '110/3', { breakerAmps: '110', breakerPoles: 3 }],
    ['run', 'F2', 'temperature', 'operating', { temperatureOperating: true, temperature: null }],
    ['run', 'F2', 'temperature', '60 °C', { temperatureOperating: false, temperature: '60' }],
    ['run', 'F2', 'ambient', '104 °F', { ambient: '40' }],
    ['run', 'F2', 'insulation', '90', { insulation: 90 }],
    ['run', 'F2', 'demand', '80 %', { demand: '0.8' }],
    ['run', 'F2', 'open', 'yes', { open: true }],
    ['transformer', 'T1', 'kva', '112.5 kVA', { kva: '112.5' }],
    ['transformer', 'T1', 'percentZ', '4.2 %', { percentZ: '4.2' }],
    ['transformer', 'T1', 'primaryVolts', '0.6 kV', { primaryVolts: '600' }],
    ['load', 'LP-1-2/4b', 'size', '9.5 A', { size: '9.5 A' }],
    ['load', 'LP-1-2/4b', 'ratedVolts', '115', { ratedVolts: '115' }],
    ['load', 'LP-1-2/4b', 'behaviour', 'power', { behaviour: 'power' }],
    ['bus', 'LP-1', 'name', 'Shop floor, east', { name: 'Shop floor, east' }],
  ] as const)('%s %s %s understands “%s”', (table, code, field, typed, expected) => {
    const rows = workshop();
    const { id } = first(rows, table, code);
    const made = after(rows, changeRowFieldEdit(rows, table, id, field as never, typed));
    expect((made[table] as ReadonlyMap<string, object>).get(id)).toMatchObject(expected);
  });

  test.each([
    ['panel', 'LP-1', 'lines', 'L1, L1', /once each/],
    ['panel', 'LP-1', 'spaces', '400', /1 to 200/],
    ['run', 'F2', 'insulation', '80', /60, 70, 75, 90/],
    ['run', 'F2', 'demand', '1.2', /≤ 1/],
    ['transformer', 'T1', 'percentZ', '0', /> 0/],
    ['transformer', 'T1', 'connection', 'star', /one of/],
    ['load', 'LP-1-1', 'size', '16', /unit is missing/],
  ] as const)('%s %s %s keeps “%s” as a draft', (table, code, field, typed, message) => {
    const rows = workshop();
    const { id } = first(rows, table, code);
    const change = changeRowFieldEdit(rows, table, id, field as never, typed);
    expect(change.problem).toMatch(message);
    const kept = after(rows, change);
    expect([...kept.draft.values()]).toMatchObject([{ table, rowId: id, field, text: typed }]);
    expect(jobFromRows(kept).leftOutCount).toBeGreaterThan(0);
  });

  test('no reader throws, whatever is typed', () => {
    const rows = workshop();
    for (const table of Object.keys(ROW_FIELDS) as TypedTable[]) {
      const { id } = first(
        rows,
        table,
        table === 'load' ? 'LP-1-1' : table === 'transformer' ? 'T1' : table === 'run' ? 'F2' : 'LP-1',
      );
      for (const field of Object.keys(ROW_FIELDS[table]))
        for (const typed of ['', ' ', '%', '-1', '1e9', '½', 'L1-N', '=1+1', 'x'.repeat(500)]) {
          const { edit, problem } = changeRowFieldEdit(rows, table, id, field as never, typed);
          if (edit) expect(applyEdit(rows, edit).ok).toBe(true);
          else expect(problem === null || problem.length > 0).toBe(true);
        }
    }
  });

  test('another layout moves the circuits of a panel to the lines of their spaces', () => {
    const rows = workshop();
    const panel = first(rows, 'panel', 'LP-1');
    const made = after(rows, changeRowFieldEdit(rows, 'panel', panel.id, 'layout', 'sequential'));
    const lines = (of: JobRows) =>
      scheduleView(of)
        .panels.flatMap((one) => one.circuits)
        .find((one) => one.fields.description.text === 'Two taps')!;
    expect(lines(made).lines).toEqual(['L1']);
    const moved = scheduleView(made)
      .panels.flatMap((one) => one.circuits)
      .find((one) => one.fields.description.text === 'Lighting')!;
    expect(moved.lines).toEqual(['L3']);
    expect(moved.loads[0]?.terminals).toBe('L3-N');
  });

  test('a panel is renamed unless the name is taken', () => {
    const rows = workshop();
    const { busId } = first(rows, 'panel', 'LP-1');
    const made = after(rows, renamePointEdit(rows, busId, 'LP-7'));
    expect(scheduleView(made).panels.map((panel) => panel.code)).toEqual(['MDP', 'LP-7']);
    expect(jobFromRows(made).leftOut).toEqual([]);
    expect(renamePointEdit(rows, busId, 'MDP').problem).toMatch(/already/);
  });
});
