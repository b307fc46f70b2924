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
 * Paths with the fewest steps from a source bus, ties by file order (runs before transformers): of every bus the last
 * step to it, whose near end is reached in the same way; `null` at the source, `undefined` where it is not reached.
 */
export type PathTree = readonly (Step | null | undefined)[];

/** Trees by source bus, each searched once. */
export function pathTrees(network: Network): (source: number) => PathTree {
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
  const trees = new Map<number, PathTree>();
  return (source) => {
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
}

/** The whole path to a bus; `null` where it is not reached. As long as it has steps: many of them are better shared. */
export function pathIn(tree: PathTree, to: number): Step[] | null {
  if (tree[to] === undefined) return null;
  const path: Step[] = [];
  for (let step = tree[to] ?? null; step; step = tree[step.near] ?? null) path.push(step);
  return path.reverse();
}

/**
 * Something of every path of a tree that is known at its source and grows step by step, found once for every bus that
 * lies on some path asked for.
 */
export function alongPaths<T>(atSource: (bus: number) => T, after: (value: T, step: Step) => T) {
  const known = new WeakMap<PathTree, (T | undefined)[]>();
  return (tree: PathTree, to: number): T => {
    let values = known.get(tree);
    if (!values) {
      values = [];
      known.set(tree, values);
    }
    const behind: Step[] = [];
    let bus = to;
    for (let step = tree[bus]; step && values[bus] === undefined; step = tree[bus]) {
      behind.push(step);
      bus = step.near;
    }
    values[bus] ??= atSource(bus);
    let value = values[bus] as T;
    for (let k = behind.length - 1; k >= 0; k--) {
      value = after(value, behind[k]!);
      values[behind[k]!.far] = value;
    }
    return value;
  };
}
