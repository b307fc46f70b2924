import type { JobRows, Row } from '../rows/index.ts';
import { codeOfPanel, type ScheduleChange } from './circuit-edits.ts';
import { circuitParts } from './circuit-parts.ts';
import { type Feed, feedTo } from './feed.ts';
import { systemsOfRows } from './nominal.ts';
import { type PanelNode, panelTree } from './panel-tree.ts';
import { relineCircuit } from './reline.ts';
import { removeIfUnused } from './remove-circuit.ts';
import { RowChanges } from './row-changes.ts';

const refused = (problem: string): ScheduleChange => ({ edit: null, problem });

/**
 * Hangs a panel on something else. Its feeder keeps its size, length and name; where a transformer stands between,
 * the run before the transformer is the one that moves. A breaker in the panel above gives way to one in the new.
 */
export function refeedPanelEdit(rows: JobRows, panelId: string, feed: Feed): ScheduleChange {
  const panel = rows.panel.get(panelId);
  if (!panel) return refused('The panel is gone.');
  const code = codeOfPanel(rows, panel);
  const nodes = panelTree(rows);
  const node = nodes.find((one) => one.panel.id === panelId)!;
  const busId = 'busId' in feed ? feed.busId : rows.panel.get(feed.panelId)?.busId;
  if (busId === undefined || !rows.bus.has(busId)) return refused('What should feed it is gone.');
  const circular = `${rows.bus.get(busId)!.code} lies beyond ${code} itself: choose something before it.`;
  if (beyond(rows, nodes, node).has(busId)) return refused(circular);

  const changes = new RowChanges(rows);
  const run = rows.run.get(node.fedFrom?.runIds[0] ?? '');
  const above = aboveBus(rows, node);
  if (run && run.fromBusId !== above && run.toBusId !== above)
    return refused(
      `A transformer stands at ${rows.bus.get(above!)!.code} itself: move the transformer first.`,
    );
  const far = run ? (run.fromBusId === above ? run.toBusId : run.fromBusId) : panel.busId;
  const old = run ? circuitParts(rows, run.circuitId ?? '') : null;
  const breaker = old?.breakers[0];
  if (run) takeAway(changes, run);
  const place =
    'panelId' in feed && breaker ? { poles: breaker.poles as 1 | 2 | 3, amps: breaker.amps, ...feed } : feed;
  const fed = feedTo(changes, place, far, `${code}-feed`, run ? kept(run) : {});
  if ('problem' in fed) return refused(fed.problem);
  const lines = fed.conductors.filter((one) => one !== 'N');
  if (run && !run.conductors.includes('N') && lines.length > 1)
    changes.update('run', fed.runId, { conductors: lines, neutralSize: null });
  if (systemsOfRows(rows).has(busId) && !systemsOfRows(changes.rows).has(panel.busId))
    return refused(circular);
  if (run && above) removeIfUnused(changes, above);
  if (far === panel.busId && lines.length !== panel.lines.length) {
    changes.update('panel', panelId, { lines: [...lines] });
    for (const circuit of rows.circuit.values())
      if (circuit.panelId === panelId) relineCircuit(changes, circuit.id);
  }
  return { edit: changes.edit(`Feed ${code} from ${rows.bus.get(busId)!.code}`), problem: null };
}

/** Everything of a run that does not follow from its feed. */
function kept(run: Row<'run'>): Partial<Row<'run'>> {
  const { fromBusId: _f, toBusId: _t, circuitId: _c, conductors: _w, kind: _k, ...rest } = run;
  return rest;
}

function takeAway(changes: RowChanges, run: Row<'run'>): void {
  changes.remove('run', run.id);
  const parts = circuitParts(changes.rows, run.circuitId ?? '');
  if (!parts || parts.runs.length > 0 || parts.loads.length > 0) return;
  for (const breaker of parts.breakers) changes.remove('breaker', breaker.id);
  for (const draft of changes.rows.draft.values())
    if (draft.table === 'circuit' && draft.rowId === parts.circuit.id) changes.remove('draft', draft.id);
  changes.remove('circuit', parts.circuit.id);
}

function aboveBus(rows: JobRows, { fedFrom }: PanelNode): string | null {
  if (!fedFrom) return null;
  if (fedFrom.panelId !== null) return rows.panel.get(fedFrom.panelId)?.busId ?? null;
  return rows.source.get(fedFrom.sourceId ?? '')?.busId ?? null;
}

/** Points of the panel itself and of the panels that it feeds. */
function beyond(rows: JobRows, nodes: readonly PanelNode[], node: PanelNode): Set<string> {
  const byId = new Map(nodes.map((one) => [one.panel.id, one]));
  const found = new Set<string>();
  const visit = (one: PanelNode) => {
    found.add(one.panel.busId);
    for (const id of one.childIds) visit(byId.get(id)!);
    for (const id of one.fedFrom?.transformerIds ?? []) {
      const transformer = rows.transformer.get(id);
      if (transformer) found.add(transformer.fromBusId).add(transformer.toBusId);
    }
  };
  visit(node);
  return found;
}
