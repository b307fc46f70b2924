import type { Network } from './network.ts';

/** One step of a path away from a source: a run or a transformer, from a near bus to a far one. */
export interface Step {
  kind: 'service' | 'feeder' | 'branch' | 'transformer';
  /** Index in `job.runs` or `job.transformers`. */
  index: number;
  near: number;
  far: number;
}

/**
 * Paths with the fewest steps from a source bus, ties by file order (runs before transformers). Searched once per
 * source bus; `pathTo` returns `null` where the bus is not reached.
 */
export function pathFinder(network: Network): (source: number, to: number) => Step[] | null {
  const { job, buses, feeding } = network;
  const steps: Step[][] = buses.ids.map(() => []);
  for (const [i, run] of job.runs.entries()) {
    if (!feeding.runLive[i]) continue;
    const from = buses.index.get(run.from)!;
    const to = buses.index.get(run.to)!;
    steps[from]!.push({ kind: run.kind, index: i, near: from, far: to });
    steps[to]!.push({ kind: run.kind, index: i, near: to, far: from });
  }
  for (const [i, t] of job.transformers.entries()) {
    if (!feeding.transformerLive[i]) continue;
    const near = buses.index.get(t.from)!;
    steps[near]!.push({ kind: 'transformer', index: i, near, far: buses.index.get(t.to)! });
  }
  const trees = new Map<number, (Step | null | undefined)[]>();
  const treeFrom = (source: number) => {
    const known = trees.get(source);
    if (known) return known;
    const by: (Step | null | undefined)[] = new Array(buses.ids.length);
    by[source] = null;
    const queue = [source];
    for (const bus of queue)
      for (const step of steps[bus]!)
        if (by[step.far] === undefined) {
          by[step.far] = step;
          queue.push(step.far);
        }
    trees.set(source, by);
    return by;
  };
  return (source, to) => {
    const by = treeFrom(source);
    if (by[to] === undefined) return null;
    const path: Step[] = [];
    for (let step = by[to] ?? null; step; step = by[step.near] ?? null) path.push(step);
    return path.reverse();
  };
}
