import { applyEdit } from '@farlug/contract/edit';
import type { JobRows } from '@farlug/contract/rows';
import { changeRowFieldEdit, scheduleView } from '@farlug/contract/schedule';
import { expect, test } from 'vitest';
import { demoRows } from '../upload/testing/sample-sheet.ts';
import type { FeedValue } from './feed-choices.ts';
import { feederOf, newPanelDraft, panelDraft, type Settled, settlePanel } from './panel-draft.ts';

const rows = demoRows('tannery-row.json');
const panelOf = (now: JobRows, code: string) =>
  scheduleView(now).panels.find((panel) => panel.code === code)!;
const feedOf = (code: string): FeedValue => `panel:${panelOf(rows, code).id}`;
const after = (now: JobRows, { edit, errors }: Settled): JobRows => {
  expect(errors).toEqual({});
  const outcome = applyEdit(now, edit!);
  if (!outcome.ok) throw new Error(JSON.stringify(outcome));
  return outcome.rows;
};

test('a panel with its breaker and feeder is one edit', () => {
  const draft = newPanelDraft(rows, feedOf('DP-L'));
  const settled = settlePanel(rows, null, {
    ...draft,
    code: 'LP-7',
    name: 'Dye house',
    spaces: '30',
    mainAmps: '100 A',
    breaker: '100/3',
    run: {
      ...draft.run,
      length: '36m',
      lengthState: 'scaled',
      size: '2 sets 1/0 Al',
      ground: '6',
      raceway: '2" PVC',
      demand: '80 %',
    },
  });
  const now = after(rows, settled);
  const made = panelOf(now, 'LP-7');
  expect(made.id).toBe(settled.id);
  expect(made).toMatchObject({
    system: '208Y/120 V',
    bus: { name: 'Dye house' },
    panel: { spaces: 30, mainAmps: '100' },
  });
  expect(feederOf(now, made.id)).toMatchObject({
    length: '36 m',
    lengthState: 'scaled',
    size: '1/0 AWG',
    sets: 2,
    material: 'aluminum',
    groundingSize: '6 AWG',
    raceway: 'pvc',
    racewaySize: '2" PVC',
    demand: '0.8',
    conductors: ['L1', 'L2', 'L3', 'N'],
  });
  const circuit = panelOf(now, 'DP-L').circuits.find((one) => one.feedsPanelId === made.id)!;
  expect(circuit.fields.breaker.text).toBe('100/3');
});

test('every field that is not understood is named, and nothing is written', () => {
  const draft = newPanelDraft(rows, feedOf('DP-L'));
  const { edit, errors } = settlePanel(rows, null, {
    ...draft,
    code: 'LP-7',
    spaces: 'many',
    mainAmps: 'x',
    run: { ...draft.run, length: 'far', size: '13', neutral: 'thick', demand: '3' },
  });
  expect(edit).toBeNull();
  expect(Object.keys(errors).sort()).toEqual([
    'mainAmps',
    'run.demand',
    'run.length',
    'run.neutral',
    'run.size',
    'spaces',
  ]);
  expect(errors.spaces).toBe('Spaces must be a whole number from 1 to 200.');
  expect(errors['run.length']).toMatch(/^Length must be/);
  expect(settlePanel(rows, null, { ...draft, code: 'LP-1' }).errors.code).toMatch(/already the name/);
});

test('what is left as it was changes nothing', () => {
  for (const { id, panel } of scheduleView(rows).panels)
    expect(settlePanel(rows, id, panelDraft(rows, panel))).toMatchObject({ edit: null, errors: {} });
});

test('a panel is renamed, fed otherwise and given another feeder in one step', () => {
  const { id, panel } = panelOf(rows, 'LP-3');
  const draft = panelDraft(rows, panel);
  const now = after(
    rows,
    settlePanel(rows, id, {
      ...draft,
      code: 'LP-3A',
      feed: feedOf('DP-L'),
      run: { ...draft.run, length: '90 ft', neutral: 'none' },
    }),
  );
  const moved = panelOf(now, 'LP-3A');
  expect(moved.fedFromText).toMatch(/^DP-L-/);
  expect(feederOf(now, id)).toMatchObject({ id: feederOf(rows, id)!.id, length: '90 ft' });
  expect(feederOf(now, id)!.conductors).not.toContain('N');
});

test('a panel does not become smaller than its circuits', () => {
  const { id, panel } = panelOf(rows, 'LP-2');
  expect(settlePanel(rows, id, { ...panelDraft(rows, panel), spaces: '12' }).errors.spaces).toMatch(
    /must be at least \d+: a circuit stands in space/,
  );
  expect(settlePanel(rows, id, { ...panelDraft(rows, panel), feed: feedOf('LP-3') }).errors.feed).toMatch(
    /lies beyond LP-2 itself/,
  );
});

test('text that was not understood before stands in its field until it is put right', () => {
  const { id, panel } = panelOf(rows, 'LP-2');
  const typed = changeRowFieldEdit(rows, 'panel', id, 'mainAmps', 'plenty');
  const drafted = applyEdit(rows, typed.edit!);
  if (!drafted.ok) throw new Error('draft');
  const draft = panelDraft(drafted.rows, panel);
  expect(draft.mainAmps).toBe('plenty');
  expect(settlePanel(drafted.rows, id, draft).errors.mainAmps).toMatch(/^Main breaker must be/);
  const right = after(drafted.rows, settlePanel(drafted.rows, id, { ...draft, mainAmps: '150' }));
  expect(right.draft.size).toBe(0);
});

test('the first panel of a job hangs on the service', () => {
  const empty = { ...rows, panel: new Map() };
  const draft = newPanelDraft(empty, '');
  expect(draft.feed).toBe(`bus:${[...rows.source.values()][0]!.busId}`);
  expect(newPanelDraft(rows, '').feed).toBe('');
});

test('a panel is fed by feed-through lugs, or by a breaker of two poles', () => {
  const draft = { ...newPanelDraft(rows, feedOf('DP-L')), code: 'LP-7' };
  const through = panelOf(after(rows, settlePanel(rows, null, { ...draft, feedThrough: true })), 'LP-7');
  expect(through.fedFromText).toBe('DP-L');
  const two = panelOf(after(rows, settlePanel(rows, null, { ...draft, breaker: '60/2' })), 'LP-7');
  expect(two.panel.lines).toHaveLength(2);
  expect(settlePanel(rows, null, { ...draft, breaker: 'sixty' }).errors.breaker).toMatch(/amps and poles/);
});
