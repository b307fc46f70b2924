import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { randomJob } from '../../test/random-job.ts';
import { workshop } from '../../test/workshop.ts';
import { applyEdit, invertEdit } from '../edit/index.ts';
import { jobFromRows, rowsFromJob } from '../job/index.ts';
import { type JobRows, rowsFromLists } from '../rows/index.ts';
import {
  addCircuitEdit,
  changeCircuitFieldEdit,
  deleteCircuitEdit,
  duplicateCircuitEdit,
  type ScheduleChange,
} from './circuit-edits.ts';
import { CIRCUIT_FIELDS, type CircuitField } from './circuit-fields.ts';
import { type CircuitView, scheduleView } from './schedule-view.ts';

const after = (rows: JobRows, { edit, problem }: ScheduleChange): JobRows => {
  if (!edit) throw new Error(problem ?? 'nothing to change');
  const outcome = applyEdit(rows, edit);
  if (!outcome.ok) throw new Error(JSON.stringify(outcome));
  return outcome.rows;
};
const row = (rows: JobRows, code: string): CircuitView => {
  const circuits = scheduleView(rows).panels.flatMap((panel) => panel.circuits);
  const found = circuits.find((circuit) => circuit.code === code);
  if (!found) throw new Error(`${code} is not among ${circuits.map((circuit) => circuit.code).join(' ')}`);
  return found;
};
const type = (rows: JobRows, code: string, field: CircuitField, text: string) =>
  changeCircuitFieldEdit(rows, row(rows, code).id, field, text);

describe('typing into the grid', () => {
  test('what stands in a field, typed again, changes nothing', () => {
    fc.assert(
      fc.property(randomJob, (job) => {
        const rows = rowsFromLists(rowsFromJob(job));
        for (const panel of scheduleView(rows).panels)
          for (const circuit of panel.circuits)
            for (const field of CIRCUIT_FIELDS)
              expect(changeCircuitFieldEdit(rows, circuit.id, field, circuit.fields[field].text)).toEqual({
                edit: null,
                problem: null,
              });
      }),
      { numRuns: 30 },
    );
  });

  const TYPED: [CircuitField, string, string][] = [
    ['length', '140', '140 ft'],
    ['length', '36m', '36 m'],
    ['length', '120\' 6"', '120.5 ft'],
    ['load', '1.5 kW', '1.5 kW'],
    ['load', '3/4 hp', '0.75 hp'],
    ['load', '6 x 180 VA', '6 × 180 VA'],
    ['powerFactor', '85 %', '0.85'],
    ['powerFactor', '0.9 leading', '0.9 leading'],
    ['demand', '40 %', '0.4'],
    ['demand', '1080 VA', '1080 VA'],
    ['continuous', 'yes', 'yes'],
    ['class', 'heat', 'heat'],
    ['starting', '96 A at 0.4', '96 A at 0.4'],
    ['starting', '96', '96 A at 0.35'],
    ['size', '#10', '10 AWG'],
    ['size', '3/0 AL', '3/0 AWG'],
    ['neutral', '8', '8 AWG'],
    ['ground', '12', '12 AWG'],
    ['sets', '2', '2'],
    ['raceway', '3/4 EMT', '3/4 EMT'],
    ['raceway', 'pvc', 'pvc'],
    ['material', 'Al', 'aluminum'],
    ['breaker', '30A', '30'],
    ['spaces', '9', '9'],
    ['description', 'Bench grinder', 'Bench grinder'],
    ['notes', 'Above ceiling', 'Above ceiling'],
  ];
  test.each(TYPED)('%s understands “%s”', (field, typed, shown) => {
    const rows = workshop();
    const { id } = row(rows, 'LP-1-1');
    const change = changeCircuitFieldEdit(rows, id, field, typed);
    expect(change.problem).toBeNull();
    const view = scheduleView(after(rows, change)).panels.flatMap((panel) => panel.circuits);
    expect(view.find((one) => one.id === id)?.fields[field]).toMatchObject({ text: shown, draft: false });
  });

  const WRONG: [CircuitField, string, RegExp][] = [
    ['length', '12O ft', /must be a length/],
    ['load', '16', /unit is missing/],
    ['load', 'lots', /must be a load/],
    ['powerFactor', '1.2', /at most 1/],
    ['demand', '3', /1080 VA/],
    ['size', '13 AWG', /must be a size in the tables/],
    ['neutral', 'none', /connected to the neutral/],
    ['spaces', '99', /from 1 to 42/],
    ['spaces', '1,2', /neighbours/],
    ['breaker', 'big', /must be a breaker/],
    ['class', 'whatever', /must be one of/],
    ['continuous', 'sometimes', /yes or no/],
    ['raceway', 'string', /pvc, aluminum, steel or cable/],
  ];
  test.each(WRONG)('%s keeps “%s” as a draft and says what would be right', (field, typed, message) => {
    const rows = workshop();
    const { id, code } = row(rows, 'LP-1-1');
    const change = changeCircuitFieldEdit(rows, id, field, typed);
    expect(change.problem).toMatch(message);
    const kept = after(rows, change);
    const shown = scheduleView(kept)
      .panels.flatMap((panel) => panel.circuits)
      .find((one) => one.id === id);
    expect(shown?.fields[field]).toMatchObject({ text: typed, draft: true });
    expect(jobFromRows(kept).leftOutCount).toBe(1);
    expect(jobFromRows(kept).job.loads.some((load) => load.id === code)).toBe(false);
    const right = after(
      kept,
      changeCircuitFieldEdit(kept, id, field, row(rows, 'LP-1-1').fields[field].text),
    );
    expect(jobFromRows(right).leftOut).toEqual([]);
    expect(right.draft.size).toBe(0);
  });

  test('a second pole moves the conductors and the load to both lines', () => {
    const before = workshop();
    const rows = after(before, type(before, 'LP-1-9', 'breaker', '20/2'));
    const two = row(rows, 'LP-1-9/11');
    expect(two.lines).toEqual(['L2', 'L3']);
    expect(two.runs[0]?.conductors).toEqual(['L2', 'L3']);
    expect(two.loads[0]?.terminals).toBe('L2-L3');
    const back = row(after(rows, type(rows, 'LP-1-9/11', 'breaker', '20/1')), 'LP-1-9');
    expect(back.runs[0]?.conductors).toEqual(['L2', 'N']);
    expect(back.loads[0]?.terminals).toBe('L2-N');
  });

  test('another space is another line', () => {
    const before = workshop();
    const rows = after(before, type(before, 'LP-1-1', 'spaces', '5'));
    const moved = row(rows, 'LP-1-5');
    expect(moved.runs[0]?.conductors).toEqual(['L3', 'N']);
    expect(moved.loads[0]?.terminals).toBe('L3-N');
    expect(moved.runs[0]?.code).toBe('LP-1-1');
  });

  test('a multiwire circuit keeps a leg for each line when it moves', () => {
    const before = workshop();
    const rows = after(before, type(before, 'LP-1-2/4', 'spaces', '8,10'));
    const moved = row(rows, 'LP-1-8/10');
    expect(moved.form).toBe('multiwire');
    expect(moved.runs[0]?.conductors).toEqual(['L1', 'L2', 'N']);
    expect(moved.loads.map((load) => load.terminals).sort()).toEqual(['L1-N', 'L2-N']);
  });

  test('a feeder takes a demand of its own, and no load', () => {
    const before = workshop();
    const rows = after(before, type(before, 'MDP-1/3/5', 'demand', '80 %'));
    expect(row(rows, 'MDP-1/3/5').runs[0]?.demand).toBe('0.8');
    expect(row(rows, 'MDP-1/3/5').fields.demand.text).toBe('0.8');
    expect(type(before, 'MDP-1/3/5', 'demand', '1.2').problem).toMatch(/share/);
    expect(type(before, 'MDP-1/3/5', 'load', '16 A').problem).toMatch(/a feeder carries what lies beyond it/);
    expect(type(before, 'LP-1-41', 'load', '16 A').problem).toMatch(/branch circuit first/);
  });

  test('a spare becomes a circuit with a run and a load to fill in', () => {
    const before = workshop();
    const made = row(after(before, type(before, 'LP-1-41', 'kind', 'branch')), 'LP-1-41');
    expect(made.runs).toHaveLength(1);
    expect(made.loads).toHaveLength(1);
    expect(made.breakers).toHaveLength(1);
    expect(type(before, 'LP-1-1', 'kind', 'spare').problem).toMatch(/delete the circuit/);
  });

  test('horsepower makes a motor, with its power factor assumed', () => {
    const before = workshop();
    const rows = after(before, type(before, 'LP-1-1', 'load', '1/2 hp'));
    expect(row(rows, 'LP-1-1').loads[0]).toMatchObject({ size: '0.5 hp', class: 'receptacle' });
    const plain = after(rows, addCircuitEdit(rows, row(rows, 'LP-1-1').panel.id, { spaces: [21] }));
    const motor = row(after(plain, type(plain, 'LP-1-21', 'load', '1/2 hp')), 'LP-1-21');
    expect(motor.loads[0]).toMatchObject({ class: 'motor', powerFactor: '0.85', powerFactorAssumed: true });
  });
});

describe('rows', () => {
  test('a new circuit takes the first open space and waits for its load, size and length', () => {
    const rows = workshop();
    const panelId = row(rows, 'LP-1-1').panel.id;
    const added = addCircuitEdit(rows, panelId);
    const made = after(rows, added);
    const circuit = scheduleView(made)
      .panels.flatMap((panel) => panel.circuits)
      .find((one) => one.id === added.id)!;
    expect(circuit.code).toBe('LP-1-3');
    expect(circuit.next).toMatchObject({ field: 'size' });
    expect(jobFromRows(made).leftOutCount).toBe(1);
    expect(jobFromRows(made).job.runs).toEqual(jobFromRows(rows).job.runs);
    expect(jobFromRows(made).job.loads).toEqual(jobFromRows(rows).job.loads);
  });

  test('filled in, it is in the job', () => {
    let rows = workshop();
    rows = after(rows, addCircuitEdit(rows, row(rows, 'LP-1-1').panel.id, { amps: '20' }));
    for (const [field, text] of [
      ['load', '12 A'],
      ['size', '12'],
      ['length', '95 ft'],
    ] as const)
      rows = after(rows, type(rows, 'LP-1-3', field, text));
    const { leftOut, job, assumed } = jobFromRows(rows);
    expect(leftOut).toEqual([]);
    expect(job.runs.find((run) => run.id === 'LP-1-3')).toMatchObject({
      length: 95,
      size: '12 AWG',
      conductors: ['L2', 'N'],
      breaker: { amps: 20, poles: 1 },
      circuit: '3',
    });
    expect(assumed.filter((one) => one.code === 'LP-1-3').map((one) => one.field)).toEqual([
      'raceway',
      'powerFactor',
    ]);
  });

  test('a full panel takes no further circuit', () => {
    let rows = workshop();
    const { panel } = row(rows, 'LP-1-1');
    rows = { ...rows, panel: new Map(rows.panel).set(panel.id, { ...panel, spaces: 2 }) };
    expect(addCircuitEdit(rows, panel.id).problem).toBe('LP-1 has no open space left.');
  });

  test('a duplicate is the same but for its place', () => {
    const rows = workshop();
    for (const code of scheduleView(rows)
      .panels.flatMap((panel) => panel.circuits.filter((one) => one.circuit.kind === 'branch'))
      .map((one) => one.code)) {
      const original = row(rows, code);
      const change = duplicateCircuitEdit(rows, original.id);
      const copied = after(rows, change);
      const copy = scheduleView(copied)
        .panels.flatMap((panel) => panel.circuits)
        .find((one) => one.id === change.id)!;
      expect(copy.form).toBe(original.form);
      expect(copy.clashes).toEqual([]);
      expect(copy.spaces).toHaveLength(original.spaces.length);
      for (const field of ['load', 'size', 'length', 'breaker', 'description'] as const)
        expect(copy.fields[field].text).toBe(original.fields[field].text);
      expect(jobFromRows(copied).leftOut).toEqual([]);
    }
  });

  test('a deleted circuit leaves nothing, and comes back whole by undo', () => {
    const rows = workshop();
    for (const panel of scheduleView(rows).panels)
      for (const circuit of panel.circuits) {
        const change = deleteCircuitEdit(rows, circuit.id);
        const gone = after(rows, change);
        for (const table of ['run', 'load', 'breaker'] as const)
          for (const one of gone[table].values()) expect(one.circuitId).not.toBe(circuit.id);
        const back = after(gone, { edit: invertEdit(change.edit!, 'undo'), problem: null });
        expect(jobFromRows(back).job).toEqual(jobFromRows(rows).job);
      }
  });
});
