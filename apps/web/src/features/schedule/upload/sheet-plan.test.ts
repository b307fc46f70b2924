import { previewImport, recogniseColumns } from '@farlug/contract/import';
import { expect, test } from 'vitest';
import { chooseField, chooseUnit, samplesOf } from './column-mapping.ts';
import { previewRows } from './preview-rows.ts';
import { likeliestSheet, planOf, readTarget } from './sheet-plan.ts';
import { demoRows, sampleSheet } from './testing/sample-sheet.ts';

const rows = demoRows('tannery-row.json');
const loft = sampleSheet('loft-panel.csv');
const idOf = (code: string) =>
  [...rows.panel.values()].find((panel) => rows.bus.get(panel.busId)!.code === code)!.id;

test('a sheet starts as the panel that it names', () => {
  const { target, titled } = planOf(rows, loft, idOf('LP-1'));
  expect(titled).toBe('LP-5');
  expect(target).toEqual({ panelId: '', code: 'LP-5', spaces: '24', mainAmps: '225', feed: '' });
  const named = [['Panel LP-2'], ...loft.slice(2)];
  expect(planOf(rows, named, idOf('LP-1')).target.panelId).toBe(idOf('LP-2'));
  expect(planOf(rows, loft.slice(3), idOf('LP-1')).target.panelId).toBe(idOf('LP-1'));
});

test('the sheet with the schedule is opened first', () => {
  expect(likeliestSheet([{ cells: [['Cover'], ['Drawn by', 'M. O.']] }, { cells: loft }])).toBe(1);
});

test('the fields of a new panel say what is wrong', () => {
  const draft = planOf(rows, loft, null).target;
  expect(readTarget(rows, draft).errors).toEqual({});
  expect(readTarget(rows, { ...draft, code: 'LP-2', spaces: 'many', mainAmps: '-3' }).errors).toEqual({
    code: 'LP-2 is already the name of a point of this job.',
    spaces: 'Spaces must be a whole number from 1 to 200.',
    mainAmps: expect.stringMatching(/^Main breaker must be/),
  });
});

test('a field stands in one column; its unit goes with it', () => {
  const mapping = recogniseColumns(loft);
  const moved = chooseField(mapping, 13, 'length', 'm');
  expect(moved.columns[12]!.field).toBeNull();
  expect(moved.columns[13]).toMatchObject({ field: 'length', unit: 'm', unitGuessed: false });
  expect(chooseUnit(moved, 13, 'ft').columns[13]!.unit).toBe('ft');
  expect(chooseField(mapping, 13, 'load', 'ft').columns[13]).toMatchObject({ unit: 'VA', unitGuessed: true });
  expect(samplesOf(loft, mapping, 9)).toEqual(['#12', '#10', '#8']);
});

test('both halves of a row are told apart: one refused, the other new', () => {
  const cells = [
    ['Ckt', 'Description', 'Breaker', 'Breaker', 'Description', 'Ckt'],
    ['1', 'Kettle', '20', '2O', 'Oven', '2'],
    ['3', 'Lamp', '20', '20', 'Hob', '4'],
  ];
  const mapping = recogniseColumns(cells);
  const preview = previewImport(rows, cells, mapping, { newPanel: { code: 'X-1', feed: null } }, 'x');
  const read = previewRows(cells, mapping, preview, []);
  expect(read.rows[0]!.lines.map((line) => [line.state, line.texts.description])).toEqual([
    ['new', 'Kettle'],
    ['refused', 'Oven'],
  ]);
  expect(read.counts).toMatchObject({ new: 3, refused: 1 });
  expect(read.errorRows).toEqual([2]);
});
