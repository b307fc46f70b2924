import { type Conductor, SYSTEM_CONDUCTORS } from '@farlug/solver/job';
import { newId } from '../edit/index.ts';
import { blankBus, blankPanel } from '../job/index.ts';
import type { JobRows, Row } from '../rows/index.ts';
import { buildCircuit } from './build-circuit.ts';
import { codeOfPanel, type ScheduleAddition, type ScheduleChange } from './circuit-edits.ts';
import { circuitParts } from './circuit-parts.ts';
import { copyCircuit } from './copy-circuit.ts';
import { removeWithDrafts } from './drafts.ts';
import { conductorsAt, type Feed, feedTo, insertRun } from './feed.ts';
import { panelTree } from './panel-tree.ts';
import { removeCircuit, removeIfUnused } from './remove-circuit.ts';
import { RowChanges } from './row-changes.ts';
import { firstOpenSpace } from './space-search.ts';
import { insertTransformer, type NewTransformer } from './transformer-edits.ts';

export interface NewPanel {
  code: string;
  name?: string | null;
  feed: Feed | null;
  /** The panel's rows and the feeder's, beyond what follows from the feed. */
  panel?: Partial<Omit<Row<'panel'>, 'id' | 'busId'>>;
  feeder?: Partial<Row<'run'>>;
  /** Between the feed and the panel: feeder, transformer, and a second feeder to the panel. */
  transformer?: NewTransformer;
}

const SPACES = 42;

/** A panel with its point and its feeder; the feeder's size and length are still to be filled in. */
export function addPanelEdit(rows: JobRows, given: NewPanel): ScheduleAddition {
  const code = given.code.trim();
  const problem = codeProblem(rows, code);
  if (problem) return { edit: null, problem, id: null };
  const changes = new RowChanges(rows);
  const bus = changes.insert('bus', {
    ...blankBus({ id: newId(), code, orderKey: changes.nextKey('bus') }),
    kind: 'panel',
    name: given.name ?? null,
  });
  let conductors: readonly Conductor[] = given.feed ? (conductorsAt(rows, given.feed) ?? []) : [];
  if (given.feed && given.transformer) {
    const made = insertTransformer(changes, given.feed, given.transformer, given.feeder);
    if ('problem' in made) return { edit: null, problem: made.problem, id: null };
    conductors = SYSTEM_CONDUCTORS[given.transformer.system];
    insertRun(changes, { from: made.toBusId, to: bus.id, code: `${code}-feed`, conductors });
  } else if (given.feed) {
    const fed = feedTo(changes, given.feed, bus.id, `${code}-feed`, given.feeder);
    if ('problem' in fed) return { edit: null, problem: fed.problem, id: null };
    conductors = fed.conductors;
  }
  const lines = conductors.filter((one) => one !== 'N');
  const panel = changes.insert('panel', {
    ...blankPanel({
      id: newId(),
      busId: bus.id,
      spaces: SPACES,
      lines: lines.length > 0 ? [...lines] : ['L1', 'L2', 'L3'],
    }),
    ...given.panel,
  });
  return { edit: changes.edit(`Add panel ${code}`), problem: null, id: panel.id };
}

export function codeProblem(rows: JobRows, code: string): string | null {
  if (code === '') return 'Give the panel a name, such as LP-1.';
  if (code.length > 60) return 'Use at most 60 characters.';
  const taken = [...rows.bus.values()].some((bus) => bus.code === code);
  return taken ? `${code} is already the name of a point of this job.` : null;
}

/**
 * A panel of the same make with copies of its circuits in the same spaces, fed like it from the next open spaces.
 * Feeders that leave it are not copied.
 */
export function duplicatePanelEdit(rows: JobRows, panelId: string, typedCode: string): ScheduleAddition {
  const original = rows.panel.get(panelId);
  if (!original) return { edit: null, problem: 'The panel is gone.', id: null };
  const code = typedCode.trim();
  const problem = codeProblem(rows, code);
  if (problem) return { edit: null, problem, id: null };
  const changes = new RowChanges(rows);
  const bus = changes.insert('bus', {
    ...rows.bus.get(original.busId)!,
    id: newId(),
    code,
    orderKey: changes.nextKey('bus'),
  });
  const panel = changes.insert('panel', { ...original, id: newId(), busId: bus.id });
  for (const circuit of rows.circuit.values()) {
    if (circuit.panelId !== panelId || circuit.kind === 'feeder' || circuit.kind === 'feed-through') continue;
    const parts = circuitParts(rows, circuit.id)!;
    copyCircuit(changes, parts, panel, parts.breakers);
  }
  const fed = panelTree(rows).find((node) => node.panel.id === panelId)?.fedFrom;
  const run = fed && fed.transformerIds.length === 0 ? rows.run.get(fed.runIds[0] ?? '') : undefined;
  if (run) copyFeeder(changes, run, bus.id, `${code}-feed`);
  return {
    edit: changes.edit(`Duplicate panel ${codeOfPanel(rows, original)} as ${code}`),
    problem: null,
    id: panel.id,
  };
}

function copyFeeder(changes: RowChanges, run: Row<'run'>, toBusId: string, code: string): void {
  const parts = circuitParts(changes.rows, run.circuitId ?? '');
  const breaker = parts?.breakers[0];
  const space = parts && breaker ? firstOpenSpace(changes.rows, parts.panel, breaker.poles) : null;
  const place = breaker && space !== null ? [{ space, poles: breaker.poles, amps: breaker.amps }] : [];
  const circuit = parts
    ? buildCircuit(changes, parts.panel, { kind: parts.circuit.kind, breakers: place })
    : null;
  changes.insert('run', {
    ...run,
    id: newId(),
    code: changes.freshCode('run', code),
    orderKey: changes.nextKey('run'),
    circuitId: circuit?.id ?? null,
    toBusId,
    locked: false,
  });
}

/** Deletes a panel, its circuits and what feeds it. Panels that it fed stay, without a feed. */
export function deletePanelEdit(rows: JobRows, panelId: string): ScheduleChange {
  const panel = rows.panel.get(panelId);
  if (!panel) return { edit: null, problem: 'The panel is gone.' };
  const changes = new RowChanges(rows);
  const node = panelTree(rows).find((one) => one.panel.id === panelId);
  const own = new Set(
    [...rows.circuit.values()].filter((one) => one.panelId === panelId).map((one) => one.id),
  );
  for (const run of rows.run.values())
    if ((run.fromBusId === panel.busId || run.toBusId === panel.busId) && run.circuitId !== null)
      own.add(run.circuitId);
  if (node?.fedFrom?.circuitId) own.add(node.fedFrom.circuitId);
  for (const id of own) {
    const parts = circuitParts(changes.rows, id);
    if (parts) removeCircuit(changes, parts);
  }
  removePath(changes, panel.busId, node?.fedFrom?.runIds ?? [], node?.fedFrom?.transformerIds ?? []);
  removeWithDrafts(changes, 'panel', panelId);
  removeIfUnused(changes, panel.busId);
  return { edit: changes.edit(`Delete panel ${codeOfPanel(rows, panel)}`), problem: null };
}

function removePath(
  changes: RowChanges,
  busId: string,
  runIds: readonly string[],
  transformerIds: readonly string[],
): void {
  const points = new Set<string>();
  const drop = (table: 'run' | 'transformer', id: string) => {
    const row = changes.rows[table].get(id);
    if (!row) return;
    points.add(row.fromBusId).add(row.toBusId);
    removeWithDrafts(changes, table, id);
  };
  for (const id of transformerIds) drop('transformer', id);
  for (const id of runIds) drop('run', id);
  for (const run of changes.rows.run.values())
    if (run.fromBusId === busId || run.toBusId === busId) drop('run', run.id);
  for (const one of changes.rows.transformer.values())
    if (one.fromBusId === busId || one.toBusId === busId) drop('transformer', one.id);
  for (const load of changes.rows.load.values())
    if (load.busId === busId) removeWithDrafts(changes, 'load', load.id);
  for (const point of points) removeIfUnused(changes, point);
}
