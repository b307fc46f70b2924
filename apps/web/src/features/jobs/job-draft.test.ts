import { applyEdit } from '@farlug/contract/edit';
import { jobRowLists, rowsFromLists } from '@farlug/contract/rows';
import { expect, test } from 'vitest';
import { draftErrors, presetErrors } from './check-draft.ts';
import { blankDraft, draftFromRows, type JobDraft } from './job-draft.ts';
import { editOfDraft, rowsOfDraft } from './rows-of-draft.ts';

function filled(changes: Partial<JobDraft> = {}): JobDraft {
  const draft = blankDraft({ lengthUnit: 'ft', wireUnit: 'awg' });
  const [service] = draft.sources;
  return {
    ...draft,
    name: ' Mill Lane loft ',
    sources: [{ ...service!, volts: '480 V', faultAmps: '22 kA', faultXOverR: '4' }],
    limits: { ...draft.limits, feeder: '3', branch: '3 %', total: '5' },
    byClass: [{ class: 'sensitive', feeder: '', branch: '1.5', total: '2.5' }],
    atVolts: [{ kind: 'lowest-volts', atVolts: '120', value: '110' }],
    ...changes,
  };
}

test('a filled form becomes rows that the contract takes, and the same form again', () => {
  const draft = filled();
  expect(draftErrors(draft)).toEqual({});
  const lists = rowsOfDraft(draft);
  expect(jobRowLists.safeParse(lists).success).toBe(true);
  expect(lists.source[0]).toMatchObject({
    system: '3ph-4w',
    volts: '480',
    faultAmps: '22000',
    faultXOverR: '4',
    impedanceR: null,
  });
  expect(lists.limit).toHaveLength(6);
  const again = draftFromRows(rowsFromLists(lists));
  expect(again).toMatchObject({ name: 'Mill Lane loft', byClass: draft.byClass, atVolts: draft.atVolts });
  expect(again.limits).toMatchObject({ feeder: '3', branch: '3', total: '5', rise: '' });
});

test('what is missing or wrong is said at its field, with what would be right', () => {
  const errors = draftErrors(
    filled({
      name: '  ',
      frequency: '0',
      limits: { ...filled().limits, total: '120', starting: 'much' },
      sources: [{ ...filled().sources[0]!, volts: '', faultAmps: 'strong' }],
      atVolts: [{ kind: 'lowest-volts', atVolts: '', value: '0' }],
    }),
  );
  expect(Object.keys(errors).sort()).toEqual([
    'atVolts.0.atVolts',
    'atVolts.0.value',
    'frequency',
    'limits.starting',
    'limits.total',
    'name',
    'sources.0.faultAmps',
    'sources.0.volts',
  ]);
  expect(errors['sources.0.faultAmps']).toMatch(/“strong” does not do.*22 kA/);
  expect(presetErrors({ ...filled(), name: '', limitBasis: '' })).toMatchObject({
    name: expect.any(String),
    limitBasis: expect.any(String),
  });
});

test('direct current has no frequency to enter, and is not mixed with alternating', () => {
  const direct = { ...filled().sources[0]!, system: 'dc-2w' as const, volts: '48' };
  const draft = filled({ sources: [direct], frequency: '' });
  expect(draftErrors(draft)).toEqual({});
  expect(rowsOfDraft(draft).job[0]?.frequency).toBe('0');
  expect(draftErrors(filled({ sources: [direct, filled().sources[0]!] })).frequency).toMatch(
    /cannot be mixed/,
  );
});

test('saving settings is one edit of what changed, and none where nothing did', () => {
  const rows = rowsFromLists(rowsOfDraft(filled()));
  const draft = draftFromRows(rows);
  expect(editOfDraft(rows, draft)).toBeNull();
  const edit = editOfDraft(rows, {
    ...draft,
    permitNumber: 'E-0417',
    byClass: [],
    limits: { ...draft.limits, total: '4', rise: '2' },
    sources: draft.sources.map((source) => ({ ...source, strength: 'stiff' as const })),
  });
  expect(edit).not.toBeNull();
  const outcome = applyEdit(rows, edit!);
  if (!outcome.ok) throw new Error(JSON.stringify(outcome));
  const after = draftFromRows(outcome.rows);
  expect(after).toMatchObject({
    permitNumber: 'E-0417',
    byClass: [],
    limits: { total: '4', rise: '2', feeder: '3' },
  });
  expect(after.sources[0]).toMatchObject({ strength: 'stiff', faultAmps: '' });
  expect(edit!.ops).toHaveLength(6);
});
