import { applyEdit } from '@farlug/contract/edit';
import { scheduleView } from '@farlug/contract/schedule';
import { expect, test } from 'vitest';
import { FIELD_COLUMNS } from './columns.ts';
import { placeBlock, readBlock } from './grid-block.ts';
import { openDemoRows, panelOf } from './testing/open-demo.ts';
import { typeCellsEdit } from './type-cells.ts';

const rows = openDemoRows();
const lp2 = panelOf(rows, 'LP-2');
const ids = lp2.circuits.map((circuit) => circuit.id);
const length = FIELD_COLUMNS.findIndex((column) => column.field === 'length');

test('a block from a spreadsheet goes in as one step, which one undo takes back', () => {
  const cells = placeBlock(
    readBlock('52 ft\t10 A\r\n36m\t1.5 kW\r\n'),
    { row: 2, column: length },
    ids,
    FIELD_COLUMNS,
  );
  expect(cells).toHaveLength(4);
  const { edit, problem } = typeCellsEdit(rows, cells);
  expect(problem).toBeNull();
  expect(edit!.label).toBe('Paste into 4 cells');
  const outcome = applyEdit(rows, edit!);
  const circuits = outcome.ok ? scheduleView(outcome.rows).panels.flatMap((panel) => panel.circuits) : [];
  const typed = (id: string) => circuits.find((one) => one.id === id)!.fields;
  expect([typed(ids[2]!).length.text, typed(ids[2]!).load.text]).toEqual(['52 ft', '10 A']);
  expect([typed(ids[3]!).length.text, typed(ids[3]!).load.text]).toEqual(['36 m', '1.5 kW']);
});

test('text that is not understood is kept as it was typed, and said', () => {
  const { edit, problem } = typeCellsEdit(rows, [
    { circuitId: ids[0]!, field: 'length', text: 'far away' },
    { circuitId: ids[2]!, field: 'length', text: '40 ft' },
  ]);
  expect(problem).toMatch(/^1 cell not understood, kept as typed\. The first: must be a length/);
  const outcome = applyEdit(rows, edit!);
  const after = outcome.ok ? panelOf(outcome.rows, 'LP-2').circuits : [];
  expect(after[0]!.fields.length).toEqual({ text: 'far away', assumed: false, draft: true });
  expect(after[2]!.fields.length.text).toBe('40 ft');
});

test('a block that reaches beyond the grid or over computed columns leaves those out', () => {
  const last = ids.length - 1;
  expect(placeBlock([['a'], ['b']], { row: last, column: length }, ids, FIELD_COLUMNS)).toHaveLength(1);
  expect(placeBlock([['1', '2', '3']], { row: 0, column: 0 }, ids, FIELD_COLUMNS)).toEqual([
    { circuitId: ids[0], field: 'spaces', text: '1' },
    { circuitId: ids[0], field: 'description', text: '3' },
  ]);
});
