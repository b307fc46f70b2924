import type { CircuitParts } from './circuit-parts.ts';

/** How a schedule row is wired: the forms of a row that stand for different pieces of network. */
export const CIRCUIT_FORMS = [
  'lumped',
  'taps',
  'multiwire',
  'spread',
  'ring',
  'at-panel',
  'feeder',
  'feed-through',
  'spare',
  'reserved',
] as const;
export type CircuitForm = (typeof CIRCUIT_FORMS)[number];

export function circuitForm({ circuit, panel, breakers, runs, loads }: CircuitParts): CircuitForm {
  if (circuit.kind !== 'branch') return circuit.kind;
  if (runs.length === 0) return loads.length > 0 ? 'at-panel' : 'lumped';
  const ends = runs.filter((run) => run.fromBusId === panel.busId || run.toBusId === panel.busId);
  if (runs.length > 1 && ends.length > 1) return 'ring';
  if (loads.some((load) => load.alongRunId !== null)) return 'spread';
  const lines = new Set(loads.filter((load) => load.terminals.endsWith('-N')).map((load) => load.terminals));
  if (breakers.length > 1 || lines.size > 1) return 'multiwire';
  return runs.length > 1 ? 'taps' : 'lumped';
}

/** True where each run begins at the end of the one before: distances from the panel are then a list. */
export function isChain(parts: CircuitParts): boolean {
  let bus = parts.panel.busId;
  for (const run of parts.runs) {
    if (run.fromBusId !== bus) return false;
    bus = run.toBusId;
  }
  return true;
}
