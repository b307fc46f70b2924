import { inOrder } from '../job/index.ts';
import type { JobRows, Row } from '../rows/index.ts';

/** What feeds a panel: derived from the network, never entered. */
export interface FedFrom {
  /** Null where the panel hangs on the service itself. */
  panelId: string | null;
  /** The circuit of that panel that leads here. */
  circuitId: string | null;
  sourceId: string | null;
  /** From the panel above to this one. */
  runIds: string[];
  transformerIds: string[];
}
export interface PanelNode {
  panel: Row<'panel'>;
  fedFrom: FedFrom | null;
  depth: number;
  childIds: string[];
}

interface Step {
  from: string;
  run: Row<'run'> | null;
  transformer: Row<'transformer'> | null;
}

/** The panels from the service down, each after the one that feeds it. Incomplete runs count. */
export function panelTree(rows: JobRows): PanelNode[] {
  const { steps, sourceAt } = stepsFromSources(rows);
  const buses = new Map(inOrder(rows.bus.values()).map((bus, i) => [bus.id, i]));
  const panels = [...rows.panel.values()].sort(
    (a, b) => buses.get(a.busId)! - buses.get(b.busId)! || (a.id < b.id ? -1 : 1),
  );
  const panelAt = new Map<string, Row<'panel'>>();
  for (const panel of panels) if (!panelAt.has(panel.busId)) panelAt.set(panel.busId, panel);

  const nodes = new Map<string, PanelNode>();
  for (const panel of panels)
    nodes.set(panel.id, { panel, fedFrom: fedFrom(panel, steps, sourceAt, panelAt), depth: 0, childIds: [] });
  for (const { panel, fedFrom: from } of nodes.values())
    if (from?.panelId) nodes.get(from.panelId)!.childIds.push(panel.id);

  const ordered: PanelNode[] = [];
  const visit = (id: string, depth: number) => {
    const node = nodes.get(id)!;
    node.depth = depth;
    ordered.push(node);
    for (const child of node.childIds) visit(child, depth + 1);
  };
  for (const node of nodes.values()) if (!node.fedFrom?.panelId) visit(node.panel.id, 0);
  return ordered;
}

/** The step by which each bus is first reached from a source, breadth first in file order. */
function stepsFromSources(rows: JobRows): { steps: Map<string, Step>; sourceAt: Map<string, string> } {
  const links = new Map<string, { to: string; step: Step }[]>();
  const link = (from: string, to: string, step: Omit<Step, 'from'>) => {
    const list = links.get(from) ?? [];
    links.set(from, list);
    list.push({ to, step: { from, ...step } });
  };
  for (const run of inOrder(rows.run.values())) {
    link(run.fromBusId, run.toBusId, { run, transformer: null });
    link(run.toBusId, run.fromBusId, { run, transformer: null });
  }
  for (const transformer of inOrder(rows.transformer.values()))
    link(transformer.fromBusId, transformer.toBusId, { run: null, transformer });
  const sourceAt = new Map<string, string>();
  for (const source of inOrder(rows.source.values()))
    if (!sourceAt.has(source.busId)) sourceAt.set(source.busId, source.id);
  const steps = new Map<string, Step>();
  const queue = [...sourceAt.keys()];
  const seen = new Set(queue);
  for (let at = 0; at < queue.length; at++)
    for (const { to, step } of links.get(queue[at]!) ?? []) {
      if (seen.has(to)) continue;
      seen.add(to);
      steps.set(to, step);
      queue.push(to);
    }
  return { steps, sourceAt };
}

function fedFrom(
  panel: Row<'panel'>,
  steps: ReadonlyMap<string, Step>,
  sourceAt: ReadonlyMap<string, string>,
  panelAt: ReadonlyMap<string, Row<'panel'>>,
): FedFrom | null {
  const runIds: string[] = [];
  const transformerIds: string[] = [];
  let circuitId: string | null = null;
  let bus = panel.busId;
  for (let step = steps.get(bus); step; step = steps.get(bus)) {
    if (step.run) runIds.unshift(step.run.id);
    if (step.transformer) transformerIds.unshift(step.transformer.id);
    circuitId = step.run?.circuitId ?? circuitId;
    bus = step.from;
    const above = panelAt.get(bus);
    if (above) return { panelId: above.id, circuitId, sourceId: null, runIds, transformerIds };
  }
  const sourceId = sourceAt.get(bus) ?? null;
  return sourceId === null ? null : { panelId: null, circuitId: null, sourceId, runIds, transformerIds };
}
