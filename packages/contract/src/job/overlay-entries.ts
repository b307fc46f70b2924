import type { Panel } from '@farlug/solver/job';
import type { JobRows, Row } from '../rows/index.ts';
import { inOrder } from './order-keys.ts';
import type { Selection } from './selection.ts';
import { firstBreaker, spacesOfCircuit } from './spaces.ts';

/** A circuit's place in its panel: its spaces, and the breaker that its runs have. */
export interface CircuitPlace {
  circuit: Row<'circuit'>;
  spaces: number[];
  breaker: Row<'breaker'> | null;
}

export function circuitPlaces(rows: JobRows): Map<string, CircuitPlace> {
  const breakers = new Map<string, Row<'breaker'>[]>();
  for (const breaker of rows.breaker.values()) {
    const own = breakers.get(breaker.circuitId);
    if (own) own.push(breaker);
    else breakers.set(breaker.circuitId, [breaker]);
  }
  const places = new Map<string, CircuitPlace>();
  for (const circuit of rows.circuit.values()) {
    const own = breakers.get(circuit.id) ?? [];
    const { layout } = rows.panel.get(circuit.panelId)!;
    places.set(circuit.id, { circuit, spaces: spacesOfCircuit(layout, own), breaker: firstBreaker(own) });
  }
  return places;
}

export interface PanelSheet {
  entries: Panel['circuits'];
  /** The circuit row of each entry. */
  rows: string[];
}

/** The list of each panel's circuits, by panel id. One that says nothing of the panel, a load at its lugs, is not listed. */
export function panelSheets(
  places: ReadonlyMap<string, CircuitPlace>,
  runs: readonly Row<'run'>[],
  selection: Selection,
): Map<string, PanelSheet> {
  const firstRun = new Map<string, string>();
  for (const run of runs)
    if (run.circuitId !== null && !firstRun.has(run.circuitId)) firstRun.set(run.circuitId, run.code);
  const refused = new Set(
    selection
      .leftOut()
      .flatMap((one) => (one.table === 'circuit' && one.field === 'spaces' ? [one.row] : [])),
  );
  const sheets = new Map<string, PanelSheet>();
  for (const circuit of inOrder([...places.values()].map((place) => place.circuit))) {
    const { spaces } = places.get(circuit.id)!;
    const run = firstRun.get(circuit.id) ?? null;
    if (refused.has(circuit.id) || (circuit.kind === 'branch' && run === null && spaces.length === 0))
      continue;
    const sheet = sheets.get(circuit.panelId) ?? { entries: [], rows: [] };
    sheets.set(circuit.panelId, sheet);
    sheet.entries.push({ spaces, run, kind: circuit.kind, description: circuit.description });
    sheet.rows.push(circuit.id);
  }
  return sheets;
}
