import { inOrder, spacesOfCircuit } from '../job/index.ts';
import type { JobRows, Row } from '../rows/index.ts';

/** A circuit with everything that is its own. Runs go from the panel outward. */
export interface CircuitParts {
  circuit: Row<'circuit'>;
  panel: Row<'panel'>;
  breakers: Row<'breaker'>[];
  runs: Row<'run'>[];
  loads: Row<'load'>[];
  /** Every space of its breakers, in the order of the panel. */
  spaces: number[];
}

export function allCircuitParts(rows: JobRows): Map<string, CircuitParts> {
  const parts = new Map<string, CircuitParts>();
  for (const circuit of rows.circuit.values()) {
    const panel = rows.panel.get(circuit.panelId)!;
    parts.set(circuit.id, { circuit, panel, breakers: [], runs: [], loads: [], spaces: [] });
  }
  for (const breaker of rows.breaker.values()) parts.get(breaker.circuitId)?.breakers.push(breaker);
  for (const run of inOrder(rows.run.values())) parts.get(run.circuitId ?? '')?.runs.push(run);
  for (const load of inOrder(rows.load.values())) parts.get(load.circuitId ?? '')?.loads.push(load);
  for (const one of parts.values()) {
    one.breakers.sort(bySpace);
    one.spaces = spacesOfCircuit(one.panel.layout, one.breakers);
    one.runs = outward(one.runs, one.panel.busId);
  }
  return parts;
}

export function circuitParts(rows: JobRows, circuitId: string): CircuitParts | null {
  const circuit = rows.circuit.get(circuitId);
  const panel = circuit && rows.panel.get(circuit.panelId);
  if (!circuit || !panel) return null;
  const ofCircuit = <R extends { circuitId: string | null }>(list: Iterable<R>) =>
    [...list].filter((row) => row.circuitId === circuitId);
  const breakers = ofCircuit(rows.breaker.values()).sort(bySpace);
  return {
    circuit,
    panel,
    breakers,
    runs: outward(inOrder(ofCircuit(rows.run.values())), panel.busId),
    loads: inOrder(ofCircuit(rows.load.values())),
    spaces: spacesOfCircuit(panel.layout, breakers),
  };
}

const bySpace = (a: Row<'breaker'>, b: Row<'breaker'>): number =>
  a.space - b.space || compare(a.half ?? '', b.half ?? '') || compare(a.id, b.id);
export const compare = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0);

/** Runs in the order in which a walk outward from `busId` meets them, each leg to its end; what is apart comes last. */
function outward(runs: readonly Row<'run'>[], busId: string): Row<'run'>[] {
  if (runs.length < 2) return [...runs];
  const at = new Map<string, Row<'run'>[]>();
  for (const run of runs)
    for (const bus of [run.fromBusId, run.toBusId]) at.set(bus, [...(at.get(bus) ?? []), run]);
  const met = new Set<Row<'run'>>();
  const legs: { bus: string; next: number }[] = [{ bus: busId, next: 0 }];
  for (let leg = legs.at(-1); leg; leg = legs.at(-1)) {
    const run = at.get(leg.bus)?.[leg.next++];
    if (!run) legs.pop();
    else if (!met.has(run)) {
      met.add(run);
      const far = run.fromBusId === leg.bus ? run.toBusId : run.fromBusId;
      if (far !== busId) legs.push({ bus: far, next: 0 });
    }
  }
  for (const run of runs) met.add(run);
  return [...met];
}

/** `LP-2-27`, `LP-2-2/4`, `LP-2-7a`; a circuit without a space goes by the code of its run or load. */
export function circuitCode(parts: CircuitParts, panelCode: string): string {
  const { spaces } = parts;
  if (spaces.length > 0) return `${panelCode}-${spaces.join('/')}${parts.breakers[0]?.half ?? ''}`;
  return parts.runs[0]?.code ?? parts.loads[0]?.code ?? panelCode;
}
