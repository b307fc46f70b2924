import type { BusSystem, Conductor } from '@farlug/solver/job';
import { incompleteRows, type Missing } from '../job/incomplete.ts';
import { inOrder, lineOfSpace, spacesOfBreaker } from '../job/index.ts';
import type { JobRows, Row } from '../rows/index.ts';
import { CIRCUIT_FIELDS, type CircuitField, fieldText } from './circuit-fields.ts';
import { type CircuitForm, circuitForm } from './circuit-form.ts';
import { allCircuitParts, type CircuitParts, circuitCode, compare } from './circuit-parts.ts';
import { systemsOfRows, systemText } from './nominal.ts';
import { type PanelFoot, panelFeet } from './panel-foot.ts';
import { type FedFrom, panelTree } from './panel-tree.ts';

export interface FieldView {
  /** As it would be typed; a draft stands here as it was typed. */
  text: string;
  assumed: boolean;
  /** True where the text was not understood. */
  draft: boolean;
}

export interface CircuitView extends CircuitParts {
  id: string;
  /** `LP-2-2/4`. */
  code: string;
  form: CircuitForm;
  /** Lines of its poles, by the panel's layout; those of its conductors where it has no space. */
  lines: Conductor[];
  fields: Record<CircuitField, FieldView>;
  /** Circuits that claim one of its spaces too. */
  clashes: string[];
  /** True where a space lies beyond the last of the panel. */
  beyond: boolean;
  /** The panel that it feeds. */
  feedsPanelId: string | null;
  /** What is to be filled in next; null where the row is complete. */
  next: { field: string | null; reason: string } | null;
}

export interface PanelView {
  id: string;
  panel: Row<'panel'>;
  bus: Row<'bus'>;
  code: string;
  /** 0 at the service. */
  depth: number;
  /** `480Y/277 V`; null while nothing feeds it. */
  system: string | null;
  fedFrom: FedFrom | null;
  /** `MDP-1/3/5`, `service`. */
  fedFromText: string | null;
  childIds: string[];
  /** By first space; circuits without a space come last. */
  circuits: CircuitView[];
  foot: PanelFoot;
}

export interface ScheduleView {
  /** From the service down, each panel after the one that feeds it. */
  panels: PanelView[];
  /** Rows of the network that stand in no circuit: feeders behind a transformer, loads at a junction. */
  looseRuns: Row<'run'>[];
  looseLoads: Row<'load'>[];
  systems: ReadonlyMap<string, BusSystem>;
}

/** The schedules of a job as they are shown. */
export function scheduleView(rows: JobRows): ScheduleView {
  const parts = allCircuitParts(rows);
  const nodes = panelTree(rows);
  const systems = systemsOfRows(rows);
  const feet = panelFeet(rows, nodes, parts, systems);
  const next = nextByCircuit(rows);
  const drafts = draftsByCircuit(rows);
  const codeOf = (panelId: string) => rows.bus.get(rows.panel.get(panelId)!.busId)!.code;
  const feeds = new Map(
    nodes.flatMap(({ panel, fedFrom }) => (fedFrom?.circuitId ? [[fedFrom.circuitId, panel.id]] : [])),
  );

  const ofPanel = byPanel(parts.values());

  const panels = nodes.map(({ panel, depth, fedFrom, childIds }): PanelView => {
    const own = ofPanel.get(panel.id) ?? [];
    const claims = claimsOf(own);
    const code = codeOf(panel.id);
    const system = systems.get(panel.busId);
    const circuits = own.map((one) => ({
      ...one,
      id: one.circuit.id,
      code: circuitCode(one, code),
      form: circuitForm(one),
      lines: linesOf(one),
      fields: fieldsOf(one, drafts.get(one.circuit.id) ?? new Map()),
      clashes: clashesOf(one, claims),
      beyond: one.spaces.some((space) => space > panel.spaces),
      feedsPanelId: feeds.get(one.circuit.id) ?? null,
      next: next.get(one.circuit.id) ?? null,
    }));
    return {
      id: panel.id,
      panel,
      bus: rows.bus.get(panel.busId)!,
      code,
      depth,
      system: system ? systemText(system) : null,
      fedFrom,
      fedFromText: fedFromText(rows, parts, fedFrom, codeOf),
      childIds,
      circuits: inSpaceOrder(circuits),
      foot: feet.get(panel.id)!,
    };
  });
  return {
    panels,
    looseRuns: inOrder(rows.run.values()).filter((run) => run.circuitId === null),
    looseLoads: inOrder(rows.load.values()).filter((load) => load.circuitId === null),
    systems,
  };
}

function byPanel(parts: Iterable<CircuitParts>): Map<string, CircuitParts[]> {
  const grouped = new Map<string, CircuitParts[]>();
  for (const one of parts) {
    const own = grouped.get(one.panel.id);
    if (own) own.push(one);
    else grouped.set(one.panel.id, [one]);
  }
  return grouped;
}

export function linesOf(parts: CircuitParts): Conductor[] {
  const lines = parts.spaces.map((space) => lineOfSpace(parts.panel, space));
  const distinct = [...new Set(lines)];
  return distinct.length > 0 ? distinct : (parts.runs[0]?.conductors.filter((one) => one !== 'N') ?? []);
}

function fieldsOf(parts: CircuitParts, drafts: ReadonlyMap<string, string>): Record<CircuitField, FieldView> {
  const { runs, loads } = parts;
  const assumed: Partial<Record<CircuitField, boolean>> = {
    length: runs.some((run) => run.lengthState === 'assumed'),
    load: loads.some((load) => load.sizeAssumed),
    powerFactor: loads.some((load) => load.powerFactorAssumed),
  };
  const entries = CIRCUIT_FIELDS.map((field): [CircuitField, FieldView] => {
    const draft = drafts.get(field);
    return [
      field,
      {
        text: draft ?? fieldText(parts, field),
        assumed: assumed[field] ?? false,
        draft: draft !== undefined,
      },
    ];
  });
  return Object.fromEntries(entries) as Record<CircuitField, FieldView>;
}

function draftsByCircuit(rows: JobRows): Map<string, Map<string, string>> {
  const drafts = new Map<string, Map<string, string>>();
  for (const { table, rowId, field, text } of rows.draft.values())
    if (table === 'circuit') drafts.set(rowId, (drafts.get(rowId) ?? new Map()).set(field, text));
  return drafts;
}

/** The first thing missing of each circuit, in the order in which the rows are filled in. */
function nextByCircuit(rows: JobRows): Map<string, { field: string | null; reason: string }> {
  const next = new Map<string, Missing>();
  for (const missing of incompleteRows(rows)) {
    const circuitId = circuitOf(rows, missing);
    if (circuitId !== null && !next.has(circuitId)) next.set(circuitId, missing);
  }
  return new Map(
    [...next].map(([id, { table, field, reason }]) => [id, { field: gridField(table, field), reason }]),
  );
}

function circuitOf(rows: JobRows, { table, row }: Missing): string | null {
  if (table === 'circuit') return row;
  if (table === 'run' || table === 'load' || table === 'breaker')
    return rows[table].get(row)?.circuitId ?? null;
  return null;
}

const gridField = (table: string, field: string | null): string | null =>
  table === 'load' && field === 'size' ? 'load' : field;

type Claims = Map<number, { circuitId: string; half: 'a' | 'b' | null }[]>;

function claimsOf(circuits: readonly CircuitParts[]): Claims {
  const claims: Claims = new Map();
  for (const { circuit, panel, breakers } of circuits)
    for (const breaker of breakers)
      for (const space of spacesOfBreaker(panel.layout, breaker)) {
        const here = claims.get(space) ?? [];
        claims.set(space, here);
        here.push({ circuitId: circuit.id, half: breaker.half });
      }
  return claims;
}

function clashesOf(parts: CircuitParts, claims: Claims): string[] {
  const found = new Set<string>();
  for (const space of parts.spaces) {
    const here = claims.get(space) ?? [];
    const halves = here.map((claim) => claim.half);
    const tandem = here.length === 2 && halves.includes('a') && halves.includes('b');
    if (!tandem) for (const { circuitId } of here) if (circuitId !== parts.circuit.id) found.add(circuitId);
  }
  return [...found];
}

function inSpaceOrder(circuits: readonly CircuitView[]): CircuitView[] {
  return [...circuits].sort(
    (a, b) =>
      (a.spaces[0] ?? Infinity) - (b.spaces[0] ?? Infinity) ||
      compare(a.breakers[0]?.half ?? '', b.breakers[0]?.half ?? '') ||
      compare(a.circuit.orderKey, b.circuit.orderKey) ||
      compare(a.id, b.id),
  );
}

function fedFromText(
  rows: JobRows,
  parts: ReadonlyMap<string, CircuitParts>,
  from: FedFrom | null,
  codeOf: (panelId: string) => string,
): string | null {
  if (!from) return null;
  if (from.panelId === null) return rows.source.get(from.sourceId ?? '')?.code ?? null;
  const circuit = parts.get(from.circuitId ?? '');
  return circuit && circuit.spaces.length > 0
    ? circuitCode(circuit, codeOf(from.panelId))
    : codeOf(from.panelId);
}
