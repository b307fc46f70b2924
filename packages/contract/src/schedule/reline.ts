import type { Conductor, Terminals } from '@farlug/solver/job';
import { circuitParts } from './circuit-parts.ts';
import type { RowChanges } from './row-changes.ts';
import { linesOf } from './schedule-view.ts';

/**
 * Puts the conductors and terminals of a circuit on the lines that its spaces now have. As many lines as before
 * are exchanged one for one; with more or fewer the circuit becomes an ordinary one of that many poles.
 */
export function relineCircuit(changes: RowChanges, circuitId: string): void {
  const parts = circuitParts(changes.rows, circuitId);
  if (!parts || parts.breakers.length === 0) return;
  const lines = inConductorOrder(linesOf(parts));
  const was = inConductorOrder(linesInUse(parts));
  if (lines.length === 0 || sameList(lines, was)) return;
  if (was.length === lines.length) {
    const next = new Map(was.map((line, i) => [line, lines[i]!]));
    const moved = (one: string) => next.get(one as Conductor) ?? one;
    for (const run of parts.runs)
      changes.update('run', run.id, {
        conductors: inConductorOrder(run.conductors.map(moved) as Conductor[]),
      });
    for (const load of parts.loads)
      if (load.terminals !== 'three-phase')
        changes.update('load', load.id, {
          terminals: terminalsOf(load.terminals.split('-').map(moved) as Conductor[]),
        });
    return;
  }
  for (const run of parts.runs) {
    const neutral = lines.length === 1 || (run.conductors.includes('N') && was.length > 1);
    changes.update('run', run.id, {
      conductors: neutral ? [...lines, 'N'] : lines,
      neutralSize: neutral ? run.neutralSize : null,
    });
  }
  for (const load of parts.loads) changes.update('load', load.id, { terminals: usualTerminals(lines) });
}

function linesInUse({
  runs,
  loads,
}: {
  runs: { conductors: Conductor[] }[];
  loads: { terminals: Terminals }[];
}) {
  const used = runs.flatMap((run) => run.conductors);
  const ofLoads = loads.flatMap((load) =>
    load.terminals === 'three-phase' ? ['L1', 'L2', 'L3'] : load.terminals.split('-'),
  ) as Conductor[];
  return [...new Set(used.length > 0 ? used : ofLoads)].filter((one) => one !== 'N');
}

/** Terminals of a load on all lines of an ordinary circuit. */
export function usualTerminals(lines: readonly Conductor[]): Terminals {
  if (lines.length >= 3) return 'three-phase';
  return terminalsOf(lines.length === 2 ? [...lines] : [lines[0] ?? 'L1', 'N']);
}

export const terminalsOf = (pair: readonly Conductor[]): Terminals =>
  inConductorOrder(pair).join('-') as Terminals;

export const inConductorOrder = (list: readonly Conductor[]): Conductor[] => [...list].sort();
const sameList = (a: readonly string[], b: readonly string[]) =>
  a.length === b.length && a.every((one, i) => one === b[i]);
