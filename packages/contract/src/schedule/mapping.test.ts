import { describe, expect, test } from 'vitest';
import { workshop } from '../../test/workshop.ts';
import { applyEdit } from '../edit/index.ts';
import { branchPieces, jobFromRows } from '../job/index.ts';
import type { JobRows, Row } from '../rows/index.ts';
import { addCircuitEdit, changeCircuitFieldEdit, type ScheduleChange } from './circuit-edits.ts';
import { addPanelEdit } from './panel-edits.ts';
import { type CircuitView, scheduleView } from './schedule-view.ts';
import {
  addTapEdit,
  closeRingEdit,
  makeMultiwireEdit,
  splitMultiwireEdit,
  spreadLoadEdit,
} from './wiring-edits.ts';

/** The way from a schedule row to the network, one test for each form of a row. */
type Step = (rows: JobRows, id: string) => ScheduleChange;
const type =
  (field: Parameters<typeof changeCircuitFieldEdit>[2], text: string): Step =>
  (rows, id) =>
    changeCircuitFieldEdit(rows, id, field, text);

const after = (rows: JobRows, { edit, problem }: ScheduleChange): JobRows => {
  if (!edit) throw new Error(problem ?? 'nothing to change');
  const outcome = applyEdit(rows, edit);
  if (!outcome.ok) throw new Error(JSON.stringify(outcome));
  return outcome.rows;
};
const view = (rows: JobRows, id: string): CircuitView =>
  scheduleView(rows)
    .panels.flatMap((panel) => panel.circuits)
    .find((one) => one.id === id)!;

/** Gives every run a length and a size, and every load an amp, where they still lack them. */
function filledIn(rows: JobRows): JobRows {
  const runs = [...rows.run.values()].map(
    (run): Row<'run'> => ({ ...run, length: run.length ?? '10 ft', size: run.size ?? '12 AWG' }),
  );
  const loads = [...rows.load.values()].map((load): Row<'load'> => ({ ...load, size: load.size ?? '1 A' }));
  return {
    ...rows,
    run: new Map(runs.map((run) => [run.id, run])),
    load: new Map(loads.map((load) => [load.id, load])),
  };
}

function made(poles: 1 | 2 | 3, ...steps: Step[]): { rows: JobRows; circuit: CircuitView } {
  let rows = workshop();
  const panel = scheduleView(rows).panels.find((one) => one.code === 'LP-1')!;
  const spaces = [20, 22, 24].slice(0, poles);
  const added = addCircuitEdit(rows, panel.id, { spaces, poles, amps: '20' });
  rows = after(rows, added);
  for (const step of steps) rows = after(rows, step(rows, added.id!));
  return { rows: filledIn(rows), circuit: view(rows, added.id!) };
}

/** Every branch circuit of the rows is one connected piece of the job's branch runs, with all of its loads. */
function expectPieces(rows: JobRows): void {
  const { job, index, leftOut } = jobFromRows(rows);
  expect(leftOut).toEqual([]);
  const pieces = branchPieces(job).map((piece) =>
    [...piece.runs.map((i) => index.runs[i]!), ...piece.loads.map((i) => index.loads[i]!)].sort().join(),
  );
  const circuits = [...rows.circuit.values()]
    .filter((circuit) => circuit.kind === 'branch')
    .map(({ id }) =>
      [...rows.run.values(), ...rows.load.values()]
        .filter((row) => row.circuitId === id)
        .map((row) => row.id)
        .sort()
        .join(),
    );
  expect([...circuits].sort()).toEqual([...pieces].sort());
}

describe('from a schedule row to the network', () => {
  // Spaces 20, 22 and 24 of LP-1 stand in rows 10, 11 and 12: L1, L2, L3.
  test('single-pole', () => {
    const { rows, circuit } = made(1);
    expect(circuit.runs.map((run) => run.conductors)).toEqual([['L1', 'N']]);
    expect(circuit.loads.map((load) => load.terminals)).toEqual(['L1-N']);
    expectPieces(rows);
  });

  test('two-pole, with and without a neutral', () => {
    const { rows, circuit } = made(2);
    expect(circuit.runs.map((run) => run.conductors)).toEqual([['L1', 'L2']]);
    expect(circuit.loads.map((load) => load.terminals)).toEqual(['L1-L2']);
    expectPieces(rows);
    const pulled = made(2, type('neutral', 'same'));
    expect(pulled.circuit.runs[0]?.conductors).toEqual(['L1', 'L2', 'N']);
    expectPieces(pulled.rows);
  });

  test('three-pole', () => {
    const { rows, circuit } = made(3);
    expect(circuit.runs.map((run) => run.conductors)).toEqual([['L1', 'L2', 'L3']]);
    expect(circuit.loads.map((load) => load.terminals)).toEqual(['three-phase']);
    expectPieces(rows);
  });

  test('multiwire, together and with its legs parted', () => {
    const together = made(1, (rows, id) => makeMultiwireEdit(rows, id, 3));
    expect(together.circuit.breakers).toHaveLength(3);
    expectPieces(together.rows);
    const parted = made(1, (rows, id) => makeMultiwireEdit(rows, id, 2), splitMultiwireEdit);
    expect(parted.circuit.runs.map((run) => run.conductors)).toEqual([
      ['L1', 'L2', 'N'],
      ['L1', 'N'],
      ['L2', 'N'],
    ]);
    expectPieces(parted.rows);
  });

  test('taps', () => {
    const { rows, circuit } = made(1, addTapEdit, addTapEdit);
    expect(circuit.form).toBe('taps');
    expect(circuit.runs).toHaveLength(3);
    expectPieces(rows);
  });

  test('spread', () => {
    const { rows, circuit } = made(1, (of, id) => spreadLoadEdit(of, id, true));
    expect(circuit.loads.map((load) => [load.busId, load.alongRunId])).toEqual([[null, circuit.runs[0]!.id]]);
    expectPieces(rows);
  });

  test('ring', () => {
    const { rows, circuit } = made(1, addTapEdit, closeRingEdit);
    expect(circuit.runs.at(-1)?.toBusId).toBe(circuit.panel.busId);
    expectPieces(rows);
  });

  test('sub-feed and feed-through lugs are feeders, and no branch circuit', () => {
    let rows = workshop();
    const panelId = scheduleView(rows).panels.find((one) => one.code === 'LP-1')!.id;
    rows = after(rows, addPanelEdit(rows, { code: 'LP-2', feed: { panelId, amps: '60' } }));
    rows = after(rows, addPanelEdit(rows, { code: 'LP-3', feed: { panelId, feedThrough: true } }));
    const runs = [...rows.run.values()].filter(
      (run) => rows.circuit.get(run.circuitId ?? '')?.panelId === panelId && run.kind === 'feeder',
    );
    expect(runs.map((run) => rows.bus.get(run.toBusId)!.code)).toEqual(['LP-2', 'LP-3']);
    expectPieces(filledIn(rows));
  });

  test('spare and reserved spaces have no network rows', () => {
    const before = workshop();
    const panelId = scheduleView(before).panels.find((one) => one.code === 'LP-1')!.id;
    for (const kind of ['spare', 'reserved'] as const) {
      const rows = after(before, addCircuitEdit(before, panelId, { kind }));
      expect([rows.run.size, rows.load.size, rows.bus.size]).toEqual([
        before.run.size,
        before.load.size,
        before.bus.size,
      ]);
      expectPieces(rows);
    }
  });
});
