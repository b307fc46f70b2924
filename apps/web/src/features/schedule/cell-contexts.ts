import type { PanelView } from '@farlug/contract/schedule';
import type { JobResult } from '../../workers/results.ts';
import type { CellContext } from './components/circuit-cell.tsx';

/** A panel's circuits with the figures that their cells show. */
export function cellContexts(panel: PanelView, result: JobResult | null): CellContext[] {
  const leftOut = new Map<string, string>();
  for (const { circuitId, reason } of result?.leftOut ?? [])
    if (circuitId !== null && !leftOut.has(circuitId)) leftOut.set(circuitId, reason);
  const raceways = new Set(
    (result?.assumed ?? []).flatMap((one) =>
      one.field === 'raceway' && one.circuitId ? [one.circuitId] : [],
    ),
  );
  return panel.circuits.map((circuit) => ({
    circuit,
    figures: result?.circuits.get(circuit.id) ?? null,
    amps: firstAmps(circuit.runs[0]?.id, result),
    leftOut: leftOut.get(circuit.id) ?? null,
    racewayAssumed: raceways.has(circuit.id),
    feeds: result?.panels.get(circuit.feedsPanelId ?? '') ?? null,
  }));
}

function firstAmps(runId: string | undefined, result: JobResult | null): number | null {
  const amps = runId === undefined ? null : result?.runs.get(runId)?.amps;
  if (!amps) return null;
  return Math.max(amps.L1 ?? 0, amps.L2 ?? 0, amps.L3 ?? 0);
}
