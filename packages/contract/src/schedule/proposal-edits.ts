import { Decimal } from 'decimal.js';
import {
  RECEPTACLE_SHARE_OF_BREAKER,
  STARTING_POWER_FACTOR,
  STARTING_TIMES_FULL_LOAD,
} from '../presets/defaults.ts';
import type { JobRows } from '../rows/index.ts';
import { codeOf, type ScheduleChange } from './circuit-edits.ts';
import { circuitParts } from './circuit-parts.ts';
import { connectedVa, terminalVolts } from './load-va.ts';
import { systemsOfRows } from './nominal.ts';
import { RowChanges } from './row-changes.ts';

/** Loads that nobody stated at 80 % of the breaker, marked as assumed (common practice). */
export function assumeLoadEdit(rows: JobRows, circuitId: string): ScheduleChange {
  const parts = circuitParts(rows, circuitId);
  const amps = parts?.breakers[0]?.amps ?? null;
  if (!parts || amps === null)
    return { edit: null, problem: 'Enter the breaker first: the load is taken from it.' };
  const changes = new RowChanges(rows);
  for (const load of parts.loads)
    if (load.size === null)
      changes.update('load', load.id, {
        size: `${new Decimal(amps).times(RECEPTACLE_SHARE_OF_BREAKER).toFixed()} A`,
        quantity: null,
        sizeAssumed: true,
      });
  return { edit: changes.edit(`Assumed load of ${codeOf(rows, parts)}`), problem: null };
}

/** Starting current of a circuit's loads at six times their full-load current, power factor 0.35 (common practice). */
export function assumeStartingEdit(rows: JobRows, circuitId: string): ScheduleChange {
  const parts = circuitParts(rows, circuitId);
  if (!parts) return { edit: null, problem: 'The row is gone.' };
  const systems = systemsOfRows(rows);
  const changes = new RowChanges(rows);
  for (const load of parts.loads) {
    const system = systems.get(load.busId ?? parts.panel.busId);
    const va = system && connectedVa({ ...load, quantity: null }, system);
    const volts = system && terminalVolts(load.terminals, system);
    if (!va || !volts || va < 0)
      return { edit: null, problem: 'Enter the load first: the starting current is taken from it.' };
    const amps = va / (load.terminals === 'three-phase' ? Math.sqrt(3) * volts : volts);
    changes.update('load', load.id, {
      startingAmps: new Decimal(amps).times(STARTING_TIMES_FULL_LOAD).toSignificantDigits(4).toFixed(),
      startingPowerFactor: STARTING_POWER_FACTOR,
    });
  }
  return { edit: changes.edit(`Starting current of ${codeOf(rows, parts)}`), problem: null };
}
