import { newId } from '../edit/index.ts';
import { blankBreaker } from '../job/index.ts';
import type { Row } from '../rows/index.ts';
import { type BreakerSpec, codeOfSpec } from './build-circuit.ts';
import type { CircuitParts } from './circuit-parts.ts';
import { relineCircuit } from './reline.ts';
import type { RowChanges } from './row-changes.ts';

/** Copies a circuit into `panel`, its breakers into `places`: every row new, every code fresh. */
export function copyCircuit(
  changes: RowChanges,
  parts: CircuitParts,
  panel: Row<'panel'>,
  places: readonly BreakerSpec[],
): string {
  const circuit = changes.insert('circuit', {
    ...parts.circuit,
    id: newId(),
    panelId: panel.id,
    orderKey: changes.nextKey('circuit'),
  });
  for (const { space, poles, half = null, amps = null } of places)
    changes.insert('breaker', {
      ...blankBreaker({ id: newId(), circuitId: circuit.id, space, poles }),
      half,
      amps,
    });
  const base = codeOfSpec(changes.rows, panel, places);
  const buses = new Map([[parts.panel.busId, panel.busId]]);
  const busCopy = (id: string): string => {
    const known = buses.get(id);
    if (known) return known;
    const bus = changes.insert('bus', {
      ...changes.rows.bus.get(id)!,
      id: newId(),
      code: changes.freshCode('bus', `${base}-end`),
      orderKey: changes.nextKey('bus'),
    });
    buses.set(id, bus.id);
    return bus.id;
  };
  const runs = new Map<string, string>();
  for (const run of parts.runs) {
    const copy = changes.insert('run', {
      ...run,
      id: newId(),
      code: changes.freshCode('run', base),
      orderKey: changes.nextKey('run'),
      circuitId: circuit.id,
      fromBusId: busCopy(run.fromBusId),
      toBusId: busCopy(run.toBusId),
      locked: false,
    });
    runs.set(run.id, copy.id);
  }
  for (const load of parts.loads)
    changes.insert('load', {
      ...load,
      id: newId(),
      code: changes.freshCode('load', base),
      orderKey: changes.nextKey('load'),
      circuitId: circuit.id,
      busId: load.busId === null ? null : busCopy(load.busId),
      alongRunId: load.alongRunId === null ? null : (runs.get(load.alongRunId) ?? null),
    });
  relineCircuit(changes, circuit.id);
  return circuit.id;
}
