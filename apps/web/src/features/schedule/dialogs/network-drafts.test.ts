import { applyEdit } from '@farlug/contract/edit';
import { jobFromRows } from '@farlug/contract/job';
import type { JobRows } from '@farlug/contract/rows';
import { scheduleView } from '@farlug/contract/schedule';
import { expect, test } from 'vitest';
import { demoRows } from '../upload/testing/sample-sheet.ts';
import { type FeedValue, feedChoices } from './feed-choices.ts';
import { feederDraft, newFeederDraft, settleFeeder } from './feeder-draft.ts';
import type { Settled } from './panel-draft.ts';
import { whatGoesWith } from './panel-removal.ts';
import { followPoint, newSourceDraft, settleSource } from './source-draft.ts';
import {
  followFeed,
  newTransformerDraft,
  settleTransformer,
  transformerDraft,
  withConnection,
} from './transformer-draft.ts';

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

test('the list of feeds has panels and points of the distribution, not ends of branches', () => {
  const choices = feedChoices(rows);
  expect(choices.filter((one) => one.group === 'Panels')).toHaveLength(rows.panel.size);
  const points = choices.filter((one) => one.group === 'Other points').map((one) => one.label);
  expect(points.length).toBeGreaterThan(0);
  expect(points.some((label) => /-end/.test(label))).toBe(false);
  expect(choices.map((one) => one.label)).toContainEqual(expect.stringMatching(/^LP-2 .*, 208Y\/120 V$/));
});

test('a transformer off its nameplate, R over X turned over, is one edit', () => {
  const draft = newTransformerDraft(rows, feedOf('HP-1'));
  expect(draft).toMatchObject({ connection: 'delta-wye', system: '3ph-4w', primaryVolts: '480' });
  const settled = settleTransformer(rows, null, {
    ...draft,
    code: 'T9',
    kva: '45 kVA',
    secondaryVolts: '208 V',
    percentZ: '4.5 %',
    ratio: '0.5',
    ratioOf: 'R/X',
    tapPercent: '2.5',
    run: { ...draft.run, length: '12 ft', size: '4' },
  });
  const now = after(rows, settled);
  const made = now.transformer.get(settled.id!)!;
  expect(made).toMatchObject({
    kva: '45',
    primaryVolts: '480',
    secondaryVolts: '208',
    percentZ: '4.5',
    xOverR: '2',
    tapPercent: '2.5',
  });
  const { job } = jobFromRows(now);
  expect(job!.transformers.map((one) => one.id)).toContain('T9');
  const again = transformerDraft(now, made);
  expect(settleTransformer(now, made.id, again)).toMatchObject({ edit: null, errors: {} });
  const changed = after(now, settleTransformer(now, made.id, { ...again, kva: '75' }));
  expect(changed.transformer.get(made.id)!.kva).toBe('75');
});

test('a transformer says what does not fit', () => {
  const draft = { ...newTransformerDraft(rows, feedOf('HP-1')), code: 'T9' };
  const errorsOf = (fields: object) => settleTransformer(rows, null, { ...draft, ...fields }).errors;
  expect(errorsOf({ primaryVolts: '208' }).primaryVolts).toMatch(/within 10 % of the 480 V/);
  expect(errorsOf({ ratio: '0', ratioOf: 'R/X' }).ratio).toMatch(/R\/X must be a number above 0/);
  expect(errorsOf({ percentZ: 'low' }).percentZ).toMatch(/^Impedance must be/);
  expect(errorsOf({ feed: '' }).feed).toBe('Choose what feeds its primary.');
  expect(errorsOf({ code: 'T1' }).code).toMatch(/already the name of a transformer/);
});

test('a single-phase transformer sits on a pair', () => {
  expect(withConnection('single-phase', undefined)).toEqual({
    connection: 'single-phase',
    system: '1ph-3w',
    primary: 'L1-L2',
  });
  const cabin = demoRows('ridge-cabin.json');
  const first = scheduleView(cabin).panels[0]!;
  expect(followFeed(cabin, `panel:${first.id}`).primary).toBe('L1-N');
});

test('a run between two points with a breaker of the panel it leaves', () => {
  const draft = newFeederDraft(feedOf('DP-L'));
  const settled = settleFeeder(rows, null, {
    ...draft,
    code: 'F99',
    to: feedOf('LP-2'),
    breaker: '100/3',
    run: { ...draft.run, length: '152 ft', size: '1/0', insulation: '90', bundled: '6', notes: 'second' },
  });
  const now = after(rows, settled);
  const run = now.run.get(settled.id!)!;
  expect(run).toMatchObject({
    length: '152 ft',
    size: '1/0 AWG',
    insulation: 90,
    bundled: 6,
    notes: 'second',
  });
  expect(feederDraft(now, run)).toMatchObject({ breaker: '100/3', code: 'F99' });
  expect(settleFeeder(now, run.id, feederDraft(now, run))).toMatchObject({ edit: null, errors: {} });
});

test('a run says where it lacks an end, a name, or a number', () => {
  const draft = newFeederDraft('');
  expect(Object.keys(settleFeeder(rows, null, draft).errors).sort()).toEqual(['code', 'from', 'to']);
  const run = [...rows.run.values()].find((one) => one.kind === 'feeder')!;
  const own = feederDraft(rows, run);
  const wrong = settleFeeder(rows, run.id, {
    ...own,
    run: { ...own.run, ambient: '200', bundled: '0', sets: '1.5' },
  });
  expect(Object.keys(wrong.errors).sort()).toEqual(['run.ambient', 'run.bundled', 'run.sets']);
});

test('a generator takes system and volts from the point that it feeds', () => {
  expect(followPoint(rows, feedOf('LP-2'))).toEqual({ system: '3ph-4w', volts: '208' });
  const draft = {
    ...newSourceDraft(rows),
    code: 'Standby',
    to: feedOf('MDP'),
    faultAmps: '1.2 kA',
    faultXOverR: '8',
  };
  const now = after(rows, settleSource(rows, { ...draft, run: { ...draft.run, length: '40', size: '3/0' } }));
  const source = [...now.source.values()].find((one) => one.code === 'Standby')!;
  expect(source).toMatchObject({
    volts: '480',
    faultAmps: '1200',
    faultXOverR: '8',
    off: true,
    impedanceR: null,
  });
  expect(settleSource(rows, { ...draft, volts: '208' }).errors.volts).toMatch(/within 10 % of the 480 V/);
  expect(settleSource(rows, { ...draft, faultAmps: '' }).errors.faultAmps).toBe(
    'Fault current must be given.',
  );
  expect(settleSource(rows, { ...draft, to: '' }).errors.to).toMatch(/Choose the panel/);
});

test('deleting a panel says what goes with it and what is left without a feed', () => {
  const { goes, stays } = whatGoesWith(rows, panelOf(rows, 'LP-2').id);
  expect(goes[0]).toMatch(/^\d+ circuits$/);
  expect(goes.some((one) => /^the breaker DP-L-/.test(one))).toBe(true);
  expect(stays).toEqual(['LP-3']);
});
