import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { workshop } from '../../test/workshop.ts';
import { applyEdit } from '../edit/index.ts';
import { jobFromRows } from '../job/index.ts';
import type { JobRows } from '../rows/index.ts';
import { scheduleView } from '../schedule/index.ts';
import type { Cells } from './cells.ts';
import { previewImport } from './preview-import.ts';
import { recogniseColumns } from './recognise-columns.ts';

const sheet = (file: string, separator = ','): Cells => {
  const text = readFileSync(new URL(`../../../../fixtures/uploads/${file}`, import.meta.url), 'utf8');
  const cell = new RegExp(`("(?:[^"]|"")*"|[^${separator}]*)(?:${separator}|$)`, 'g');
  return text
    .trimEnd()
    .split('\n')
    .map((line) =>
      [...line.matchAll(cell)]
        .map((match) => match[1]!)
        .slice(0, -1)
        .map((field) => (field.startsWith('"') ? field.slice(1, -1).replaceAll('""', '"') : field)),
    );
};
const preview = (cells: Cells, rows: JobRows, code: string) => {
  const feed = { panelId: scheduleView(rows).panels.find((panel) => panel.code === 'LP-1')!.id };
  return previewImport(rows, cells, recogniseColumns(cells), { newPanel: { code, feed } }, code);
};

describe('sample uploads', () => {
  test('a schedule from drawings comes in whole; its missing lengths are the next thing to do', () => {
    const rows = workshop();
    const { edit, problems, circuits } = preview(sheet('loft-panel.csv'), rows, 'LP-5');
    expect(problems.filter((problem) => problem.severity !== 'remark')).toEqual([]);
    expect(circuits).toHaveLength(16);
    const outcome = applyEdit(rows, edit!);
    if (!outcome.ok) throw new Error(JSON.stringify(outcome));
    const panel = scheduleView(outcome.rows).panels.find((one) => one.code === 'LP-5')!;
    const shown = panel.circuits.map(({ spaces, fields, lines }) => [
      spaces.join(','),
      fields.breaker.text,
      fields.load.text,
      fields.class.text,
      lines.join(''),
      fields.length.text,
    ]);
    expect(shown.slice(0, 8)).toEqual([
      ['1', '20', '620 VA', 'lighting', 'L1', ''],
      ['2', '20', '16 A', 'receptacle', 'L1', '64 ft'],
      ['3', '20', '540 VA', 'lighting', 'L2', ''],
      ['4', '20', '16 A', 'receptacle', 'L2', '71 ft'],
      ['5', '20', '1500 VA', 'heat', 'L3', ''],
      ['6', '20', '16 A', 'receptacle', 'L3', '96 ft'],
      ['7,9', '30/2', '4500 VA', 'heat', 'L1L2', '48 ft'],
      ['8', '20', '1200 VA', 'equipment', 'L1', ''],
    ]);
    expect(shown).toContainEqual(['13,15,17', '40/3', '7560 VA', 'cooling', 'L1L2L3', '118 ft']);
    const open = panel.circuits.filter((circuit) => circuit.next?.field === 'length');
    expect(open).toHaveLength(7);
    // The feeder of the new panel is open too, and with it everything behind it.
    expect(jobFromRows(outcome.rows).leftOutCount).toBe(13 + 1);
  });

  test('a German board in mm² and metres', () => {
    const rows = workshop();
    const job = [...rows.job.values()][0]!;
    const metric = {
      ...rows,
      job: new Map([[job.id, { ...job, lengthUnit: 'm' as const, wireUnit: 'mm2' as const }]]),
    };
    const { problems, circuits } = preview(sheet('hall-board-de.csv', ';'), metric, 'UV-3');
    expect(problems.filter((problem) => problem.severity === 'error')).toEqual([]);
    expect(
      circuits.map((one) => [one.spaces, one.kind, one.breaker, one.load, one.size, one.length]),
    ).toEqual([
      ['1', 'branch', '10', '540 W', '1.5 mm2', '38 m'],
      ['2', 'branch', '10', '540 W', '1.5 mm2', '44.5 m'],
      ['3', 'branch', '16', '12.8 A', '2.5 mm2', '27 m'],
      ['4', 'branch', '16', '1500 W', '2.5 mm2', '52 m'],
      ['5', 'branch', '16', '2000 W', '2.5 mm2', '19 m'],
      ['6', 'spare', '16', '', '', ''],
    ]);
  });

  test('mixed units are read and pointed out', () => {
    const { edit, problems, circuits } = preview(sheet('mixed-units.csv'), workshop(), 'LP-7');
    expect(edit).not.toBeNull();
    expect(circuits.map((one) => [one.load, one.length])).toEqual([
      ['620 VA', '42 ft'],
      ['9 A', '18 m'],
      ['1.2 kW', '75 ft'],
      ['0.5 hp', '0.02 mi'],
      ['540 VA', '88 ft'],
    ]);
    expect(problems.filter((one) => one.severity === 'warning').map((one) => [one.row, one.column])).toEqual([
      [3, 5],
      [3, 6],
      [4, 6],
      [5, 5],
      [5, 6],
    ]);
  });

  test('duplicate circuits and cells that say nothing are refused, each at its cell', () => {
    const { edit, problems } = preview(sheet('duplicate-circuits.csv'), workshop(), 'LP-8');
    expect(edit).toBeNull();
    expect(problems.filter((one) => one.severity === 'error').map((one) => [one.row, one.column])).toEqual([
      [4, 1],
      [6, 1],
      [7, 3],
      [8, 4],
      [9, 5],
    ]);
  });

  test('200 columns are refused as a whole', () => {
    const { edit, problems } = preview(sheet('two-hundred-columns.csv'), workshop(), 'LP-8');
    expect(edit).toBeNull();
    expect(problems).toMatchObject([{ row: 0, column: 0, severity: 'error' }]);
  });
});
