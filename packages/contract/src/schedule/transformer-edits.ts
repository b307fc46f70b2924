import type { System, TransformerConnection } from '@farlug/solver/job';
import { newId } from '../edit/index.ts';
import { blankBus, blankTransformer } from '../job/index.ts';
import type { JobRows, Row } from '../rows/index.ts';
import type { ScheduleAddition } from './circuit-edits.ts';
import { type Feed, feedTo } from './feed.ts';
import { RowChanges } from './row-changes.ts';

export interface NewTransformer {
  code: string;
  connection: TransformerConnection;
  /** System of the secondary. */
  system: System;
  transformer?: Partial<Row<'transformer'>>;
}

/** A transformer with the run that feeds it, between two points of its own; panels are hung on the second. */
export function addTransformerEdit(
  rows: JobRows,
  feed: Feed,
  given: NewTransformer,
  feeder: Partial<Row<'run'>> = {},
): ScheduleAddition {
  const changes = new RowChanges(rows);
  const made = insertTransformer(changes, feed, given, feeder);
  if ('problem' in made) return { edit: null, problem: made.problem, id: null };
  return { edit: changes.edit(`Add transformer ${given.code}`), problem: null, id: made.id };
}

export function insertTransformer(
  changes: RowChanges,
  feed: Feed,
  { code, connection, system, transformer }: NewTransformer,
  feeder: Partial<Row<'run'>> = {},
): { id: string; toBusId: string } | { problem: string } {
  if ([...changes.rows.transformer.values()].some((one) => one.code === code))
    return { problem: `${code} is already the name of a transformer of this job.` };
  const point = (side: string) =>
    changes.insert(
      'bus',
      blankBus({
        id: newId(),
        code: changes.freshCode('bus', `${code}-${side}`),
        orderKey: changes.nextKey('bus'),
      }),
    ).id;
  const fromBusId = point('pri');
  const toBusId = point('sec');
  const fed = feedTo(changes, feed, fromBusId, `${code}-feed`, feeder);
  if ('problem' in fed) return fed;
  if (connection !== 'wye-wye' && feeder.conductors === undefined) {
    const conductors = fed.conductors.filter((one) => one !== 'N');
    if (conductors.length > 1) changes.update('run', fed.runId, { conductors });
  }
  const row = changes.insert('transformer', {
    ...blankTransformer({
      id: newId(),
      code,
      orderKey: changes.nextKey('transformer'),
      fromBusId,
      toBusId,
      connection,
      system,
    }),
    ...transformer,
  });
  return { id: row.id, toBusId };
}
