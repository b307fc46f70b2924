import { z } from 'zod';
import { applyEdit } from '../edit/index.ts';
import type { JobRows, Row } from '../rows/index.ts';
import { addCircuitEdit, changeCircuitFieldEdit, type ScheduleChange } from './circuit-edits.ts';
import type { CircuitField } from './circuit-fields.ts';
import { circuitParts } from './circuit-parts.ts';
import { RowChanges } from './row-changes.ts';

const words = z.record(z.string(), z.string());

/** What a job has that a job file cannot hold: open rows, rooms, and which of its values are assumed. */
export const unfinishedSchema = z.strictObject({
  about: z.string(),
  circuits: z.array(
    z.strictObject({
      panel: z.string(),
      spaces: z.array(z.int()),
      loadAssumed: z.boolean().optional(),
      breaker: z.string(),
      description: z.string(),
      room: z.string(),
      class: z.string(),
      load: z.string(),
      demand: z.string(),
      size: z.string(),
      raceway: z.string(),
    }),
  ),
  assumedLengths: z.array(z.string()),
  assumedLoads: z.array(z.string()),
  assumedPowerFactors: z.array(z.string()),
  /** By code of the circuit's first run. */
  rooms: words,
  panels: z.record(z.string(), words),
  job: z.record(z.string(), z.string().nullable()),
});
export type Unfinished = z.output<typeof unfinishedSchema>;

const TYPED = [
  'breaker',
  'description',
  'room',
  'class',
  'load',
  'demand',
  'size',
  'raceway',
] as const satisfies readonly CircuitField[];

/** The rows of a job with what its file could not hold, as a person would have typed it. */
export function withUnfinished(rows: JobRows, unfinished: Unfinished): JobRows {
  const changes = new RowChanges(rows);
  const job = [...rows.job.values()][0]!;
  changes.update('job', job.id, unfinished.job);
  const codes = <T extends 'run' | 'load'>(table: T): Map<string, Row<T>> =>
    new Map([...(rows[table].values() as Iterable<Row<T>>)].map((row) => [row.code, row]));
  const runs = codes('run');
  const loads = codes('load');
  const panels = new Map(
    [...rows.panel.values()].map((panel) => [rows.bus.get(panel.busId)!.code, panel.id]),
  );
  for (const code of unfinished.assumedLengths)
    changes.update('run', need(runs, code).id, { lengthState: 'assumed' });
  for (const code of unfinished.assumedLoads)
    changes.update('load', need(loads, code).id, { sizeAssumed: true });
  for (const code of unfinished.assumedPowerFactors)
    changes.update('load', need(loads, code).id, { powerFactorAssumed: true });
  for (const [code, room] of Object.entries(unfinished.rooms))
    changes.update('circuit', need(runs, code).circuitId!, { room });
  for (const [code, more] of Object.entries(unfinished.panels))
    changes.update('panel', need(panels, code), more);
  for (const run of rows.run.values())
    if (run.length !== null && run.lengthState === null && !unfinished.assumedLengths.includes(run.code))
      changes.update('run', run.id, { lengthState: 'measured' });
  for (const breaker of rows.breaker.values())
    if (rows.circuit.get(breaker.circuitId)?.kind === 'spare' && breaker.amps === null)
      changes.update('breaker', breaker.id, { amps: breaker.poles === 3 ? '100' : '20' });

  let now = changes.rows;
  const make = ({ edit, problem }: ScheduleChange) => {
    if (problem) throw new Error(problem);
    if (!edit) return;
    const outcome = applyEdit(now, edit);
    if (!outcome.ok) throw new Error(JSON.stringify(outcome));
    now = outcome.rows;
  };
  for (const given of unfinished.circuits) {
    const added = addCircuitEdit(now, need(panels, given.panel), { spaces: given.spaces });
    make(added);
    for (const field of TYPED) make(changeCircuitFieldEdit(now, added.id!, field, given[field]));
    if (!given.loadAssumed) continue;
    const assumed = new RowChanges(now);
    for (const load of circuitParts(now, added.id!)!.loads)
      assumed.update('load', load.id, { sizeAssumed: true });
    make({ edit: assumed.edit('Assumed load'), problem: null });
  }
  return now;
}

function need<V>(map: ReadonlyMap<string, V>, code: string): V {
  const found = map.get(code);
  if (found === undefined) throw new Error(`${code} is not in the job`);
  return found;
}
