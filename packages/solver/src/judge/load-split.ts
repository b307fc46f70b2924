import { LINE_LINE, PAIR_INDEX } from '../network/index.ts';
import type { Core } from './core.ts';
import { type PairDrop, SAME_PERCENT, worstPair } from './drop.ts';
import { type Begin, type Split, splitDrop } from './split.ts';
import type { Volts } from './volts.ts';

/** Buses at whose terminals a load is judged: its own, or both ends of the run that it is spread along. */
export function judgedBuses(core: Core, load: number): number[] {
  const { along, bus } = core.loads[load]!;
  if (along < 0) return [bus];
  const run = core.job.runs[along]!;
  return [core.network.buses.index.get(run.from)!, core.network.buses.index.get(run.to)!];
}

export const judgedPairs = (core: Core, load: number): readonly number[] => {
  const { terminals } = core.job.loads[load]!;
  return terminals === 'three-phase' ? LINE_LINE : [PAIR_INDEX[terminals]];
};

/** Figures of a load in some state: of the worst of its pairs, and of the worse end of the run it is spread along. */
export function splitLoad(core: Core, volts: Volts, load: number, begins: readonly Begin[]): Split {
  const pairs = judgedPairs(core, load);
  let worst: PairDrop | null = null;
  let at = -1;
  for (const bus of judgedBuses(core, load)) {
    const drop = worstPair(core, volts, bus, pairs);
    if (drop && (worst === null || drop.dropPercent > worst.dropPercent + SAME_PERCENT)) {
      worst = drop;
      at = bus;
    }
  }
  if (!worst) throw new Error(`load ${core.job.loads[load]!.id} has no terminals`);
  return splitDrop(core, volts, worst, at, begins);
}
