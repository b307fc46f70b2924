import { alongPaths, lengthMOf } from '../network/index.ts';
import type { Core } from './core.ts';
import { type LoadLimits, limitsFor, longRunPercent } from './limits.ts';
import { judgedBuses, splitLoad } from './load-split.ts';
import { type Begin, beginsOf, type Split } from './split.ts';
import { type Judged, judge, totalPercent } from './verdict.ts';
import type { Volts } from './volts.ts';

/** Figures of a load in one solved state, and every limit that holds for it beside its value. */
export interface LoadFigures {
  split: Split;
  totalPercent: number;
  /** The total limit with what a long path adds. */
  totalLimit: number | null;
  judged: Judged[];
}

/** What judging the loads of a job shares: where circuits begin, limits, lengths of paths. */
export interface Judge {
  begins: (circuit: number) => readonly Begin[];
  /** `startingPercent` is judged where it is not `null`. */
  figures: (volts: Volts, load: number, startingPercent: number | null) => LoadFigures;
  /** Nodes whose volts the figures of a circuit's loads need. */
  nodesOf: (circuit: number) => number[];
  /** Nodes whose volts the figures of one load need. */
  nodesOfLoad: (load: number) => number[];
}

export function judgeOf(core: Core): Judge {
  const { job, network, circuits } = core;
  const { buses, nodes } = network;
  const beginsKnown: (Begin[] | undefined)[] = [];
  const begins = (circuit: number): Begin[] => {
    beginsKnown[circuit] ??= beginsOf(core, circuits.list[circuit]!.begins);
    return beginsKnown[circuit];
  };
  const metres = alongPaths(
    () => 0,
    (before, step) => (step.kind === 'transformer' ? before : before + lengthMOf(job, job.runs[step.index]!)),
  );
  const pathMOf = (bus: number): number => {
    const tree = core.treeOf(bus);
    return tree && tree[bus] !== undefined ? metres(tree, bus) : 0;
  };
  // Node → the list that it was last put in: buses that a run without impedance joins share nodes, each counts once.
  const listedIn = new Int32Array(nodes.count);
  let lists = 0;
  const nodesAt = (at: readonly number[], from: readonly Begin[]): number[] => {
    const list: number[] = [];
    lists++;
    const put = (bus: number) => {
      for (let slot = 0; slot < 4; slot++) {
        const node = nodes.at[4 * bus + slot]!;
        if (node < 0 || listedIn[node] === lists) continue;
        listedIn[node] = lists;
        list.push(node);
      }
    };
    for (const bus of at) put(bus);
    for (const begin of from) {
      put(begin.bus);
      put(begin.sourceBus);
      for (const step of begin.steps) {
        put(step.near);
        put(step.far);
      }
    }
    return list;
  };
  const limitsKnown: (LoadLimits | undefined)[] = [];
  return {
    begins,
    figures: (volts, load, startingPercent) => {
      const circuit = circuits.ofLoad[load]!;
      const split = splitLoad(core, volts, load, begins(circuit));
      const nominal = buses.system[split.bus]!.pairs[split.pair]!.nominal;
      // Pairs of one load differ in nominal volts in no system, so that its limits are looked up once.
      limitsKnown[load] ??= limitsFor(job.loads[load]!, job, nominal);
      const limits = limitsKnown[load];
      const total = totalPercent(split, job.limits);
      const totalLimit =
        limits.total === null
          ? null
          : limits.total + (job.limits.longRun ? longRunPercent(job, pathMOf(split.bus)) : 0);
      const judged = judge(
        {
          split,
          totalPercent: total,
          totalLimit,
          startingPercent,
          ratedVolts: job.loads[load]!.ratedVolts,
        },
        limits,
      );
      return { split, totalPercent: total, totalLimit, judged };
    },
    nodesOf: (circuit) => nodesAt(circuits.list[circuit]!.buses, begins(circuit)),
    nodesOfLoad: (load) => nodesAt(judgedBuses(core, load), begins(circuits.ofLoad[load]!)),
  };
}
