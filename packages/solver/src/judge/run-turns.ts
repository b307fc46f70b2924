import type { RunResult } from '../job/index.ts';
import { type Element, SLOT } from '../network/index.ts';
import type { Core } from './core.ts';
import { turnsOf } from './demand.ts';
import { runElements, runFlow } from './run-results.ts';
import type { TurnSolver } from './turn-solver.ts';

/**
 * Branch runs each in the turn of its circuit that drops it most; other runs as they are given. `only`, the index of
 * a run, leaves the circuits without it as they are given too.
 */
export function runsInTurns(
  core: Core,
  solver: TurnSolver,
  runs: readonly RunResult[],
  only: number | null = null,
): RunResult[] {
  const shown = [...runs];
  let elements: readonly Element[] = [];
  let byRun: Element[][] = [];
  for (const [circuit, { runs: own, buses }] of core.circuits.list.entries()) {
    if (own.length === 0 || (only !== null && !own.includes(only))) continue;
    solver.open(circuit, nodesAt(core, buses));
    const worst = new Map<number, number>();
    for (const turn of turnsOf(core, circuit)) {
      const solved = solver.turn(circuit, turn);
      if ('kind' in solved) continue;
      if (solved.elements !== elements) {
        elements = solved.elements;
        byRun = runElements(core, elements);
      }
      for (const run of own) {
        const flow = runFlow(core, solved.volts, run, byRun[run]!);
        const size = Math.abs(flow?.dropPercent ?? 0);
        if (!flow || size < (worst.get(run) ?? 0)) continue;
        worst.set(run, size);
        const { amps, dropVolts, dropPercent, lossWatts } = flow;
        shown[run] = { ...runs[run]!, amps, dropVolts, dropPercent, lossWatts };
      }
    }
  }
  return shown;
}

const nodesAt = (core: Core, buses: readonly number[]): number[] =>
  buses
    .flatMap((bus) => Object.values(SLOT).map((slot) => core.network.nodes.at[4 * bus + slot]!))
    .filter((node) => node >= 0);
