import { describe, expect, test } from 'vitest';
import { workshop } from '../../test/workshop.ts';
import { applyEdit, invertEdit } from '../edit/index.ts';
import { jobFromRows } from '../job/index.ts';
import type { JobRows } from '../rows/index.ts';
import { changeCircuitFieldEdit, type ScheduleChange } from './circuit-edits.ts';
import {
  addFeederEdit,
  addSourceEdit,
  deleteRunEdit,
  deleteSourceEdit,
  deleteTransformerEdit,
} from './network-edits.ts';
import { addPanelEdit } from './panel-edits.ts';
import { refeedPanelEdit } from './refeed-edits.ts';
import { setLengthEdit, setRunSizeEdit } from './run-edits.ts';
import { type PanelView, scheduleView } from './schedule-view.ts';

const after = (rows: JobRows, { edit, problem }: ScheduleChange): JobRows => {
  if (!edit || problem) throw new Error(problem ?? 'nothing to change');
  const outcome = applyEdit(rows, edit);
  if (!outcome.ok) throw new Error(JSON.stringify(outcome));
  const back = applyEdit(outcome.rows, invertEdit(edit, 'undo'));
  if (!back.ok) throw new Error(JSON.stringify(back));
  expect(jobFromRows(back.rows).job).toEqual(jobFromRows(rows).job);
  return outcome.rows;
};
const panel = (rows: JobRows, code: string): PanelView =>
  scheduleView(rows).panels.find((one) => one.code === code)!;
const bus = (rows: JobRows, code: string) => [...rows.bus.values()].find((one) => one.code === code)!.id;
const run = (rows: JobRows, code: string) => [...rows.run.values()].find((one) => one.code === code)!;

/** The workshop with a panel LP-9 that LP-1 feeds from spaces of its own. */
function withSubpanel(): JobRows {
  const rows = workshop();
  const fed = after(
    rows,
    addPanelEdit(rows, {
      code: 'LP-9',
      feed: { panelId: panel(rows, 'LP-1').id, amps: '60' },
      feeder: { size: '6 AWG', length: '44 ft' },
    }),
  );
  return fed;
}

describe('what feeds a panel', () => {
  test('moves to another panel with its run and breaker', () => {
    const rows = withSubpanel();
    const before = run(rows, 'LP-9-feed');
    const moved = after(
      rows,
      refeedPanelEdit(rows, panel(rows, 'LP-9').id, { panelId: panel(rows, 'MDP').id }),
    );
    const sub = panel(moved, 'LP-9');
    expect(sub.fedFromText).toMatch(/^MDP-/);
    expect(sub.system).toBe('480Y/277 V');
    expect(run(moved, 'LP-9-feed')).toMatchObject({ id: before.id, size: '6 AWG', length: '44 ft' });
    expect(panel(moved, 'LP-1').circuits.length).toBe(panel(rows, 'LP-1').circuits.length - 1);
    const circuit = panel(moved, 'MDP').circuits.find((one) => one.feedsPanelId === sub.id)!;
    expect(circuit.fields.breaker.text).toBe('60/3');
  });

  test('behind a transformer the run before it moves', () => {
    const rows = workshop();
    const moved = after(rows, refeedPanelEdit(rows, panel(rows, 'LP-1').id, { busId: bus(rows, 'service') }));
    expect(run(moved, 'F1')).toMatchObject({ fromBusId: bus(rows, 'service'), circuitId: null });
    expect(run(moved, 'F1').conductors).toEqual(['L1', 'L2', 'L3']);
    expect(panel(moved, 'LP-1')).toMatchObject({ fedFromText: 'utility', system: '208Y/120 V' });
    expect(panel(moved, 'MDP').circuits.some((one) => one.circuit.kind === 'feeder')).toBe(false);
  });

  test('is given to a panel that had none', () => {
    const rows = workshop();
    const apart = after(rows, addPanelEdit(rows, { code: 'LP-9', feed: null }));
    const fed = after(
      apart,
      refeedPanelEdit(apart, panel(apart, 'LP-9').id, { panelId: panel(apart, 'LP-1').id, poles: 2 }),
    );
    expect(panel(fed, 'LP-9').system).toBe('208Y/120 V');
    expect(panel(fed, 'LP-9').panel.lines).toHaveLength(2);
  });

  test('is never the panel itself or one beyond it', () => {
    const rows = withSubpanel();
    const lp1 = panel(rows, 'LP-1').id;
    for (const code of ['LP-1', 'LP-9'])
      expect(refeedPanelEdit(rows, lp1, { panelId: panel(rows, code).id }).problem).toMatch(
        /lies beyond LP-1 itself/,
      );
  });
});

describe('pieces of the network', () => {
  test('a second feeder beside the first, and its end', () => {
    const rows = workshop();
    const { edit, problem, id } = addFeederEdit(
      rows,
      { busId: bus(rows, 'service') },
      bus(rows, 'MDP'),
      'S2',
    );
    let now = after(rows, { edit, problem });
    expect(now.run.get(id!)).toMatchObject({
      code: 'S2',
      kind: 'service',
      conductors: ['L1', 'L2', 'L3', 'N'],
    });
    now = after(now, setRunSizeEdit(now, id!, { size: '350 kcmil', sets: 2 }));
    now = after(now, setLengthEdit(now, id!, '60'));
    expect(jobFromRows(now).job!.runs.some((one) => one.id === 'S2')).toBe(true);
    now = after(now, deleteRunEdit(now, id!));
    expect(now.run.size).toBe(rows.run.size);
    expect(now.bus.size).toBe(rows.bus.size);
  });

  test('a run needs a name of its own and two points', () => {
    const rows = workshop();
    const at = { busId: bus(rows, 'MDP') };
    expect(addFeederEdit(rows, at, bus(rows, 'LP-1'), 'F1').problem).toBe(
      'F1 is already the name of a run of this job.',
    );
    expect(addFeederEdit(rows, at, bus(rows, 'MDP'), 'F9').problem).toMatch(/choose two/);
    expect(addFeederEdit(rows, at, bus(rows, 'LP-1'), ' ').problem).toMatch(/such as F7/);
  });

  test('a feeder goes with its breaker; a branch run does not go alone', () => {
    const rows = workshop();
    const gone = after(rows, deleteRunEdit(rows, run(rows, 'F1').id));
    expect(panel(gone, 'MDP').circuits).toHaveLength(panel(rows, 'MDP').circuits.length - 1);
    expect(panel(gone, 'LP-1').fedFrom).toBeNull();
    expect(deleteRunEdit(rows, run(rows, 'LP-1-1').id).problem).toMatch(/delete it in the schedule/);
  });

  test('a transformer goes, its runs stay', () => {
    const rows = workshop();
    const gone = after(rows, deleteTransformerEdit(rows, [...rows.transformer.keys()][0]!));
    expect(gone.transformer.size).toBe(0);
    expect(gone.run.size).toBe(rows.run.size);
  });

  test('a generator feeds in by a run of its own', () => {
    const rows = workshop();
    const added = addSourceEdit(
      rows,
      { code: 'standby', system: '3ph-4w', volts: '480', off: true },
      bus(rows, 'MDP'),
    );
    let now = after(rows, added);
    expect(now.run.get(added.runId!)).toMatchObject({ code: 'standby-feed', kind: 'feeder' });
    now = after(now, setRunSizeEdit(now, added.runId!, { size: '3/0 AWG' }));
    now = after(now, setLengthEdit(now, added.runId!, '30 ft'));
    expect(jobFromRows(now).job!.sources.map((one) => [one.id, one.off])).toEqual([
      ['utility', false],
      ['standby', true],
    ]);
    expect(addSourceEdit(now, { code: 'standby', system: '3ph-4w' }, bus(now, 'MDP')).problem).toMatch(
      /already the name of a source/,
    );
    const gone = after(now, deleteSourceEdit(now, added.id!));
    expect([gone.source.size, gone.run.size, gone.bus.size]).toEqual([1, rows.run.size, rows.bus.size]);
    expect(deleteSourceEdit(rows, [...rows.source.keys()][0]!).problem).toMatch(/needs one source/);
  });

  test('nothing typed into a breaker that goes stays behind', () => {
    const rows = withSubpanel();
    const circuit = panel(rows, 'LP-1').circuits.find((one) => one.circuit.kind === 'feeder')!;
    const typed = changeCircuitFieldEdit(rows, circuit.id, 'breaker', 'sixty');
    const drafted = applyEdit(rows, typed.edit!);
    if (!drafted.ok) throw new Error('draft');
    const moved = after(
      drafted.rows,
      refeedPanelEdit(drafted.rows, panel(rows, 'LP-9').id, { panelId: panel(rows, 'MDP').id }),
    );
    expect([...moved.draft.values()].filter((one) => one.table === 'circuit')).toEqual([]);
  });
});
