import { type BusSystem, type Conductor, magnitude } from '@farlug/solver/job';
import type { JobRows, Row } from '../rows/index.ts';
import type { CircuitParts } from './circuit-parts.ts';
import { loadVa } from './load-va.ts';
import type { PanelNode } from './panel-tree.ts';

type PerLine = Partial<Record<Conductor, number>>;

/** What stands at the foot of a panel schedule: its own circuits and the panels that it feeds. */
export interface PanelFoot {
  lines: { line: Conductor; connectedVa: number; demandVa: number; amps: number | null }[];
  connectedVa: number;
  demandVa: number;
  /** Largest deviation of a line's demand from the mean, percent of the mean; null without load. */
  unbalancePercent: number | null;
  spaces: number;
  spacesOpen: number;
  /** Loads whose VA is not known, and which the sums therefore lack. */
  unknown: number;
}

interface Sums {
  connected: PerLine;
  demand: PerLine;
  unknown: number;
}

/** Feet of all panels, by panel id. A panel behind a transformer counts evenly over the lines. */
export function panelFeet(
  rows: JobRows,
  nodes: readonly PanelNode[],
  parts: ReadonlyMap<string, CircuitParts>,
  systems: ReadonlyMap<string, BusSystem>,
): Map<string, PanelFoot> {
  const sums = new Map<string, Sums>(
    nodes.map(({ panel }) => [panel.id, { connected: {}, demand: {}, unknown: 0 }]),
  );
  const panelAt = new Map(nodes.map(({ panel }) => [panel.busId, panel.id]));
  for (const load of rows.load.values()) {
    const circuit = rows.circuit.get(load.circuitId ?? '');
    const own = sums.get(circuit?.panelId ?? panelAt.get(load.busId ?? '') ?? '');
    if (!own) continue;
    const system = systems.get(load.busId ?? rows.run.get(load.alongRunId ?? '')?.fromBusId ?? '');
    const va = system && loadVa(load, system);
    if (!va) own.unknown++;
    else {
      addTo(own.connected, va.connected);
      addTo(own.demand, va.demand);
    }
  }
  for (const { panel, fedFrom } of [...nodes].reverse()) {
    const above = sums.get(fedFrom?.panelId ?? '');
    if (!above || !fedFrom) continue;
    const own = sums.get(panel.id)!;
    const lines = nodes.find((node) => node.panel.id === fedFrom.panelId)!.panel.lines;
    const upward = (va: PerLine) => (fedFrom.transformerIds.length === 0 ? va : evenly(va, lines));
    addTo(above.connected, upward(own.connected));
    addTo(above.demand, upward(own.demand));
    above.unknown += own.unknown;
  }
  const used = new Map(nodes.map(({ panel }) => [panel.id, new Set<number>()]));
  for (const one of parts.values()) for (const space of one.spaces) used.get(one.panel.id)!.add(space);
  return new Map(
    nodes.map(({ panel }) => [
      panel.id,
      footOf(panel, sums.get(panel.id)!, used.get(panel.id)!, systems.get(panel.busId)),
    ]),
  );
}

function footOf(
  panel: Row<'panel'>,
  { connected, demand, unknown }: Sums,
  used: ReadonlySet<number>,
  system: BusSystem | undefined,
): PanelFoot {
  const lines = panel.lines.map((line) => {
    const emf = system?.origin.emfs[line];
    const demandVa = demand[line] ?? 0;
    return {
      line,
      connectedVa: connected[line] ?? 0,
      demandVa,
      amps: emf && magnitude(emf) > 0 ? demandVa / magnitude(emf) : null,
    };
  });
  const demandVa = sum(lines.map((line) => line.demandVa));
  const mean = demandVa / lines.length;
  const deviation = Math.max(...lines.map((line) => Math.abs(line.demandVa - mean)));
  return {
    lines,
    connectedVa: sum(lines.map((line) => line.connectedVa)),
    demandVa,
    unbalancePercent: mean > 0 ? (100 * deviation) / mean : null,
    spaces: panel.spaces,
    spacesOpen: Math.max(0, panel.spaces - [...used].filter((space) => space <= panel.spaces).length),
    unknown,
  };
}

function addTo(sums: PerLine, va: PerLine): void {
  for (const [line, value] of Object.entries(va) as [Conductor, number][])
    sums[line] = (sums[line] ?? 0) + value;
}

const sum = (values: readonly number[]): number => values.reduce((total, value) => total + value, 0);
const evenly = (va: PerLine, lines: readonly Conductor[]): PerLine =>
  Object.fromEntries(lines.map((line) => [line, sum(Object.values(va)) / lines.length]));
