import { describe, expect, test } from 'vitest';
import { workshop } from '../../test/workshop.ts';
import { applyEdit, invertEdit } from '../edit/index.ts';
import { jobFromRows } from '../job/index.ts';
import type { JobRows } from '../rows/index.ts';
import { changeCircuitFieldEdit, type ScheduleChange } from './circuit-edits.ts';
import { addPanelEdit, deletePanelEdit, duplicatePanelEdit } from './panel-edits.ts';
import { setLengthEdit, setRunSizeEdit } from './run-edits.ts';
import { type CircuitView, type PanelView, scheduleView } from './schedule-view.ts';
import { addTransformerEdit } from './transformer-edits.ts';
import {
  addTapEdit,
  closeRingEdit,
  makeMultiwireEdit,
  removeLastSegmentEdit,
  splitMultiwireEdit,
  spreadLoadEdit,
} from './wiring-edits.ts';

const after = (rows: JobRows, { edit, problem }: ScheduleChange): JobRows => {
  if (!edit) throw new Error(problem ?? 'nothing to change');
  const outcome = applyEdit(rows, edit);
  if (!outcome.ok) throw new Error(JSON.stringify(outcome));
  const back = applyEdit(outcome.rows, invertEdit(edit, 'undo'));
  if (!back.ok) throw new Error(JSON.stringify(back));
  expect(jobFromRows(back.rows).job).toEqual(jobFromRows(rows).job);
  return outcome.rows;
};
const panel = (rows: JobRows, code: string): PanelView =>
  scheduleView(rows).panels.find((one) => one.code === code)!;
const circuit = (rows: JobRows, code: string): CircuitView =>
  scheduleView(rows)
    .panels.flatMap((one) => one.circuits)
    .find((one) => one.code === code)!;
const fill = (rows: JobRows, code: string, length = '40 ft', size = '3 AWG'): JobRows => {
  const { id } = circuit(rows, code);
  const sized = after(rows, changeCircuitFieldEdit(rows, id, 'size', size));
  return after(sized, changeCircuitFieldEdit(sized, id, 'length', length));
};

describe('the tree of panels', () => {
  test('is derived from the network, through transformers', () => {
    const { panels, looseRuns } = scheduleView(workshop());
    expect(panels.map((one) => [one.code, one.depth, one.fedFromText, one.system])).toEqual([
      ['MDP', 0, 'utility', '480Y/277 V'],
      ['LP-1', 1, 'MDP-1/3/5', '208Y/120 V'],
    ]);
    expect(panels[0]?.circuits[0]?.feedsPanelId).toBe(panels[1]?.id);
    expect(looseRuns.map((run) => run.code)).toEqual(['S1', 'F2']);
  });

  test('the foot adds up what each line carries', () => {
    const { foot } = panel(workshop(), 'LP-1');
    // By hand, at 208/√3 = 120.089 V to neutral: L1 = 12 + 11 + 5 + 6 + 5 + 6 = 45 A, L2 = 8 + 9 = 17 A,
    // and a third of √3·208·16.7 VA = 16.7 A at 120.089 V on each line.
    const volts = 208 / Math.sqrt(3);
    const expected = [45 + 16.7, 17 + 16.7, 16.7].map((amps) => amps * volts);
    foot.lines.forEach((line, i) => {
      expect(line.connectedVa).toBeCloseTo(expected[i]!, 6);
      expect(line.amps).toBeCloseTo(expected[i]! / volts, 6);
    });
    const mean = (45 + 17 + 3 * 16.7) / 3;
    expect(foot.unbalancePercent).toBeCloseTo((100 * (61.7 - mean)) / mean, 6);
    expect(foot.spacesOpen).toBe(42 - 10);
    const above = panel(workshop(), 'MDP').foot;
    expect(above.connectedVa).toBeCloseTo(foot.connectedVa, 6);
    expect(above.lines[0]?.connectedVa).toBeCloseTo(foot.connectedVa / 3, 6);
  });
});

describe('panels', () => {
  test('a new panel hangs on a breaker of another, its feeder to be filled in', () => {
    const rows = workshop();
    const added = addPanelEdit(rows, {
      code: 'LP-2',
      feed: { panelId: panel(rows, 'LP-1').id, amps: '100' },
    });
    const made = after(rows, added);
    const view = panel(made, 'LP-2');
    expect(view).toMatchObject({ depth: 2, fedFromText: 'LP-1-6/8/10', system: '208Y/120 V' });
    expect(view.panel.lines).toEqual(['L1', 'L2', 'L3']);
    expect(circuit(made, 'LP-1-6/8/10')).toMatchObject({ form: 'feeder', next: { field: 'size' } });
    expect(jobFromRows(made).leftOutCount).toBe(1);
    const { job, leftOut } = jobFromRows(fill(made, 'LP-1-6/8/10'));
    expect(leftOut).toEqual([]);
    expect(job.runs.find((run) => run.to === 'LP-2')).toMatchObject({
      kind: 'feeder',
      conductors: ['L1', 'L2', 'L3', 'N'],
      breaker: { amps: 100, poles: 3 },
      circuit: '6,8,10',
    });
  });

  test('a two-pole feeder brings two lines', () => {
    const rows = workshop();
    const made = after(
      rows,
      addPanelEdit(rows, { code: 'LP-2', feed: { panelId: panel(rows, 'LP-1').id, poles: 2 } }),
    );
    expect(panel(made, 'LP-2').panel.lines).toHaveLength(2);
  });

  test('feed-through lugs take no breaker', () => {
    const rows = workshop();
    const made = after(
      rows,
      addPanelEdit(rows, { code: 'LP-1B', feed: { panelId: panel(rows, 'LP-1').id, feedThrough: true } }),
    );
    expect(panel(made, 'LP-1').circuits.find((one) => one.form === 'feed-through')).toMatchObject({
      spaces: [],
      breakers: [],
    });
    expect(panel(made, 'LP-1B').fedFromText).toBe('LP-1');
  });

  test('behind a transformer a panel has the lines of its secondary', () => {
    const rows = workshop();
    const made = after(
      rows,
      addPanelEdit(rows, {
        code: 'LP-9',
        feed: { panelId: panel(rows, 'MDP').id },
        transformer: {
          code: 'T9',
          connection: 'delta-wye',
          system: '3ph-4w',
          transformer: { kva: '30', primaryVolts: '480', secondaryVolts: '208', percentZ: '4', xOverR: '2' },
        },
      }),
    );
    expect(panel(made, 'LP-9')).toMatchObject({ system: '208Y/120 V', fedFromText: 'MDP-2/4/6' });
    const feeder = circuit(made, 'MDP-2/4/6').runs[0]!;
    expect(feeder.conductors).toEqual(['L1', 'L2', 'L3']);
  });

  test('a transformer alone waits for its nameplate', () => {
    const rows = workshop();
    const added = addTransformerEdit(
      rows,
      { panelId: panel(rows, 'MDP').id },
      { code: 'T2', connection: 'delta-wye', system: '3ph-4w' },
    );
    const made = after(rows, added);
    expect(jobFromRows(made).leftOut.find((one) => one.table === 'transformer')).toMatchObject({
      code: 'T2',
      field: 'kva',
    });
  });

  test('a name that is taken is refused', () => {
    const rows = workshop();
    expect(addPanelEdit(rows, { code: 'LP-1', feed: null }).problem).toBe(
      'LP-1 is already the name of a point of this job.',
    );
    expect(addPanelEdit(rows, { code: ' ', feed: null }).problem).toMatch(/Give the panel a name/);
  });

  test('a duplicate has the same circuits under its own name, fed from the next open spaces', () => {
    let rows = workshop();
    rows = after(
      rows,
      addPanelEdit(rows, { code: 'LP-2', feed: { panelId: panel(rows, 'LP-1').id, amps: '60' } }),
    );
    rows = fill(rows, 'LP-1-6/8/10');
    const made = after(rows, duplicatePanelEdit(rows, panel(rows, 'LP-2').id, 'LP-3'));
    expect(panel(made, 'LP-3').fedFromText).toBe('LP-1-12/14/16');
    const whole = after(made, duplicatePanelEdit(made, panel(made, 'LP-1').id, 'LP-4'));
    const shape = (view: PanelView) =>
      view.circuits
        .filter((one) => one.form !== 'feeder')
        .map((one) => [one.spaces, one.form, one.fields.load.text]);
    expect(shape(panel(whole, 'LP-4'))).toEqual(shape(panel(whole, 'LP-1')));
  });

  test('deleted, a panel takes its circuits and its feed along, and leaves no clash behind', () => {
    const rows = workshop();
    const made = after(rows, deletePanelEdit(rows, panel(rows, 'LP-1').id));
    expect(scheduleView(made).panels.map((one) => one.code)).toEqual(['MDP']);
    expect(made.load.size).toBe(0);
    expect(made.transformer.size).toBe(0);
    expect(jobFromRows(made).leftOut).toEqual([]);
    expect(jobFromRows(made).job.runs.map((run) => run.id)).toEqual(['S1']);
  });
});

describe('wiring of a circuit', () => {
  const one = (rows: JobRows, code: string, change: (rows: JobRows, id: string) => ScheduleChange): JobRows =>
    after(rows, change(rows, circuit(rows, code).id));

  test('a tap goes on from the last point', () => {
    const rows = one(workshop(), 'LP-1-1', addTapEdit);
    expect(circuit(rows, 'LP-1-1')).toMatchObject({ form: 'taps', next: { field: 'length' } });
    const { id } = circuit(rows, 'LP-1-1');
    const measured = after(rows, changeCircuitFieldEdit(rows, id, 'length', '60, 110 ft'));
    expect(circuit(measured, 'LP-1-1').runs.map((run) => run.length)).toEqual(['60 ft', '50 ft']);
    expect(circuit(measured, 'LP-1-1').fields.length.text).toBe('60, 110 ft');
    expect(changeCircuitFieldEdit(measured, id, 'length', '60 ft').problem).toMatch(/2 distances/);
    expect(changeCircuitFieldEdit(measured, id, 'length', '60, 40 ft').problem).toMatch(/grow away/);
    const loaded = after(measured, changeCircuitFieldEdit(measured, id, 'load', '8 A + 4 A'));
    expect(jobFromRows(loaded).leftOut).toEqual([]);
    expect(one(loaded, 'LP-1-1', removeLastSegmentEdit).run.size).toBe(workshop().run.size);
  });

  test('a ring comes back to the panel', () => {
    const rows = one(workshop(), 'LP-1-7', closeRingEdit);
    expect(circuit(rows, 'LP-1-7').form).toBe('ring');
    const ring = circuit(rows, 'LP-1-7').runs;
    expect(ring.at(-1)?.toBusId).toBe(ring[0]?.fromBusId);
    expect(closeRingEdit(rows, circuit(rows, 'LP-1-7').id).problem).toMatch(/already/);
    expect(circuit(one(rows, 'LP-1-7', removeLastSegmentEdit), 'LP-1-7').form).toBe('taps');
  });

  test('a load is spread along its run and gathered again', () => {
    const rows = one(workshop(), 'LP-1-1', (r, id) => spreadLoadEdit(r, id, true));
    expect(circuit(rows, 'LP-1-1').form).toBe('spread');
    expect(jobFromRows(rows).job.loads.find((load) => load.id === 'LP-1-1')).toMatchObject({
      bus: null,
      along: 'LP-1-1',
    });
    expect(
      circuit(
        one(rows, 'LP-1-1', (r, id) => spreadLoadEdit(r, id, false)),
        'LP-1-1',
      ).form,
    ).toBe('lumped');
    expect(spreadLoadEdit(rows, circuit(rows, 'LP-1-7').id, true).problem).toMatch(/single run/);
  });

  test('a multiwire circuit shares one neutral, and its legs can part', () => {
    const rows = one(workshop(), 'LP-1-1', (r, id) => makeMultiwireEdit(r, id, 3));
    const multi = circuit(rows, 'LP-1-1/3/5');
    expect(multi.form).toBe('multiwire');
    expect(multi.runs[0]?.conductors).toEqual(['L1', 'L2', 'L3', 'N']);
    expect(multi.loads.map((load) => load.terminals).sort()).toEqual(['L1-N', 'L2-N', 'L3-N']);
    expect(multi.breakers.map((breaker) => breaker.poles)).toEqual([1, 1, 1]);
    const parted = circuit(one(rows, 'LP-1-1/3/5', splitMultiwireEdit), 'LP-1-1/3/5');
    expect(parted.runs.map((run) => run.conductors.join())).toEqual(['L1,L2,L3,N', 'L1,N', 'L2,N', 'L3,N']);
  });

  test('multiwire needs the neighbouring spaces', () => {
    const rows = workshop();
    expect(makeMultiwireEdit(rows, circuit(rows, 'LP-1-7').id, 2).problem).toMatch(/one run/);
    expect(makeMultiwireEdit(rows, circuit(rows, 'LP-1-9').id, 3).problem).toBe(
      'Spaces 11 and 13 must be open first.',
    );
  });
});

describe('runs', () => {
  test('a size goes to every segment of the circuit, grounding conductor too', () => {
    const rows = workshop();
    const run = circuit(rows, 'LP-1-13').runs[1]!;
    const made = after(
      rows,
      setRunSizeEdit(rows, run.id, { size: '8 AWG', groundingSize: '10 AWG', neutralSize: null }),
    );
    expect(circuit(made, 'LP-1-13').runs.map((one) => [one.size, one.groundingSize])).toEqual([
      ['8 AWG', '10 AWG'],
      ['8 AWG', '10 AWG'],
      ['8 AWG', '10 AWG'],
    ]);
    const feeder = [...rows.run.values()].find((one) => one.code === 'F1')!;
    const bigger = after(rows, setRunSizeEdit(rows, feeder.id, { size: '1/0 AWG', sets: 1 }));
    expect(bigger.run.get(feeder.id)).toMatchObject({ size: '1/0 AWG' });
    expect([...bigger.run.values()].filter((one) => one.size === '1/0 AWG')).toHaveLength(1);
  });

  test('a length says how it was come by, and text stays as a draft', () => {
    const rows = workshop();
    const run = circuit(rows, 'LP-1-1').runs[0]!;
    const made = after(rows, setLengthEdit(rows, run.id, '95', 'scaled'));
    expect(made.run.get(run.id)).toMatchObject({ length: '95 ft', lengthState: 'scaled' });
    const change = setLengthEdit(rows, run.id, 'about here');
    expect(change.problem).toMatch(/must be a length/);
    const drafted = after(rows, change);
    expect([...drafted.draft.values()]).toMatchObject([
      { table: 'run', field: 'length', text: 'about here' },
    ]);
    expect(after(drafted, setLengthEdit(drafted, run.id, '95 ft')).draft.size).toBe(0);
  });
});
