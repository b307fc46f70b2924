import { newId } from '../edit/index.ts';
import { blankBus, blankSource } from '../job/index.ts';
import type { JobRows, Row } from '../rows/index.ts';
import type { ScheduleAddition, ScheduleChange } from './circuit-edits.ts';
import { circuitParts } from './circuit-parts.ts';
import { removeWithDrafts } from './drafts.ts';
import { conductorsAt, type Feed, feedTo, insertRun } from './feed.ts';
import { removeCircuit, removeIfUnused } from './remove-circuit.ts';
import { RowChanges } from './row-changes.ts';

/** A feeder between two points that stand already: a second one in parallel, a tie, the closing of a ring. */
export function addFeederEdit(
  rows: JobRows,
  feed: Feed,
  toBusId: string,
  typedCode: string,
): ScheduleAddition {
  const refused = (problem: string) => ({ edit: null, problem, id: null });
  const fromBusId = 'busId' in feed ? feed.busId : rows.panel.get(feed.panelId)?.busId;
  const code = typedCode.trim();
  if (code === '') return refused('Give the run a name, such as F7.');
  if ([...rows.run.values()].some((run) => run.code === code))
    return refused(`${code} is already the name of a run of this job.`);
  if (fromBusId === toBusId) return refused('A run goes from one point to another: choose two.');
  const changes = new RowChanges(rows);
  const fed = feedTo(changes, feed, toBusId, code);
  if ('problem' in fed) return refused(fed.problem);
  const far = conductorsAt(rows, { busId: toBusId });
  const shared = far ? fed.conductors.filter((one) => far.includes(one)) : [];
  if (shared.length > 0 && shared.length < fed.conductors.length)
    changes.update('run', fed.runId, { conductors: shared });
  return { edit: changes.edit(`Add run ${code}`), problem: null, id: fed.runId };
}

/** Deletes a feeder with its breaker and what hangs along it; what lay beyond it stays, without a feed. */
export function deleteRunEdit(rows: JobRows, runId: string): ScheduleChange {
  const run = rows.run.get(runId);
  if (!run) return { edit: null, problem: 'The run is gone.' };
  const parts = circuitParts(rows, run.circuitId ?? '');
  if (parts?.circuit.kind === 'branch')
    return { edit: null, problem: 'A branch run goes with its circuit: delete it in the schedule.' };
  const changes = new RowChanges(rows);
  for (const load of rows.load.values())
    if (load.alongRunId === runId) removeWithDrafts(changes, 'load', load.id);
  if (parts && parts.runs.length === 1) removeCircuit(changes, parts);
  else removeWithDrafts(changes, 'run', runId);
  for (const bus of [run.fromBusId, run.toBusId]) if (rows.bus.has(bus)) removeIfUnused(changes, bus);
  return { edit: changes.edit(`Delete run ${run.code}`), problem: null };
}

/** Deletes a transformer; the runs on both of its sides stay. */
export function deleteTransformerEdit(rows: JobRows, transformerId: string): ScheduleChange {
  const row = rows.transformer.get(transformerId);
  if (!row) return { edit: null, problem: 'The transformer is gone.' };
  const changes = new RowChanges(rows);
  removeWithDrafts(changes, 'transformer', transformerId);
  for (const bus of [row.fromBusId, row.toBusId]) removeIfUnused(changes, bus);
  return { edit: changes.edit(`Delete transformer ${row.code}`), problem: null };
}

/** A further source, such as a generator or a battery, at a point of its own with a run to where it feeds in. */
export function addSourceEdit(
  rows: JobRows,
  given: Pick<Row<'source'>, 'code' | 'system'> & Partial<Row<'source'>>,
  toBusId: string,
): ScheduleAddition & { runId: string | null } {
  const refused = (problem: string) => ({ edit: null, problem, id: null, runId: null });
  const code = given.code.trim();
  if (code === '') return refused('Give the source a name, such as standby generator.');
  if (code.length > 60) return refused('Use at most 60 characters.');
  if ([...rows.source.values()].some((source) => source.code === code))
    return refused(`${code} is already the name of a source of this job.`);
  const here = conductorsAt(rows, { busId: toBusId });
  if (!rows.bus.has(toBusId)) return refused('The point that it feeds is gone.');
  const changes = new RowChanges(rows);
  const bus = changes.insert('bus', {
    ...blankBus({ id: newId(), code: changes.freshCode('bus', code), orderKey: changes.nextKey('bus') }),
    kind: 'service',
  });
  const source = changes.insert('source', {
    ...blankSource({
      id: newId(),
      orderKey: changes.nextKey('source'),
      busId: bus.id,
      system: given.system,
      code,
    }),
    ...given,
    code,
  });
  const own = conductorsAt(changes.rows, { busId: bus.id }) ?? here ?? [];
  const shared = here ? own.filter((one) => here.includes(one)) : own;
  const runId = insertRun(changes, {
    from: bus.id,
    to: toBusId,
    code: `${code}-feed`,
    conductors: shared.length > 0 ? shared : own,
  });
  return { edit: changes.edit(`Add source ${code}`), problem: null, id: source.id, runId };
}

/** Deletes a source with its point and the runs that leave it; the last one of a job stays. */
export function deleteSourceEdit(rows: JobRows, sourceId: string): ScheduleChange {
  const source = rows.source.get(sourceId);
  if (!source) return { edit: null, problem: 'The source is gone.' };
  if (rows.source.size === 1) return { edit: null, problem: 'A job needs one source: change it instead.' };
  const changes = new RowChanges(rows);
  removeWithDrafts(changes, 'source', sourceId);
  const shared = [...changes.rows.source.values(), ...rows.panel.values(), ...rows.load.values()].some(
    (row) => row.busId === source.busId,
  );
  const points = new Set([source.busId]);
  for (const run of shared ? [] : rows.run.values()) {
    if (run.circuitId !== null || (run.fromBusId !== source.busId && run.toBusId !== source.busId)) continue;
    points.add(run.fromBusId).add(run.toBusId);
    removeWithDrafts(changes, 'run', run.id);
  }
  for (const bus of points) removeIfUnused(changes, bus);
  return { edit: changes.edit(`Delete source ${source.code}`), problem: null };
}
