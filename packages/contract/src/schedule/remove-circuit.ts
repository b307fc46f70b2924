import type { CircuitParts } from './circuit-parts.ts';
import { removeWithDrafts } from './drafts.ts';
import type { RowChanges } from './row-changes.ts';

/** Removes a circuit, its breakers, runs and loads, and the points that nothing else uses. */
export function removeCircuit(changes: RowChanges, parts: CircuitParts): void {
  const points = new Set(parts.runs.flatMap((run) => [run.fromBusId, run.toBusId]));
  for (const load of parts.loads) removeWithDrafts(changes, 'load', load.id);
  for (const run of parts.runs) removeWithDrafts(changes, 'run', run.id);
  for (const breaker of parts.breakers) removeWithDrafts(changes, 'breaker', breaker.id);
  removeWithDrafts(changes, 'circuit', parts.circuit.id);
  for (const bus of points) removeIfUnused(changes, bus);
}

/** Removes a point, and the readings taken there, unless a row of the network still stands on it. */
export function removeIfUnused(changes: RowChanges, busId: string): void {
  const { rows } = changes;
  const used =
    [...rows.run.values(), ...rows.transformer.values()].some(
      (row) => row.fromBusId === busId || row.toBusId === busId,
    ) ||
    [...rows.load.values(), ...rows.source.values(), ...rows.panel.values()].some(
      (row) => row.busId === busId,
    );
  if (used) return;
  for (const reading of rows.reading.values())
    if (reading.busId === busId) changes.remove('reading', reading.id);
  removeWithDrafts(changes, 'bus', busId);
}
