import type { Core } from './core.ts';

/**
 * The lowest rank among the loads that each run carries, those whose power can come through it; infinity where it
 * carries none. A run that is the only way to its far side carries what lies beyond; a run inside a loop carries
 * whatever hangs on the loop away from the source. Found on the block tree of the network with all sources joined at a
 * virtual bus (Hopcroft and Tarjan 1973), in the time of one search of it.
 */
export function lowestCarried(core: Core, rankOf: (load: number) => number): Float64Array {
  const { job, network } = core;
  const { buses, feeding } = network;
  const count = buses.ids.length;
  const root = count;
  interface Link {
    to: number;
    edge: number;
  }
  const links: Link[][] = Array.from({ length: count + 1 }, () => []);
  const ends: [number, number][] = [];
  const link = (a: number, b: number) => {
    const edge = ends.push([a, b]) - 1;
    links[a]!.push({ to: b, edge });
    links[b]!.push({ to: a, edge });
  };
  const runOf: number[] = [];
  for (const [i, run] of job.runs.entries())
    if (feeding.runLive[i]) {
      runOf.push(i);
      link(buses.index.get(run.from)!, buses.index.get(run.to)!);
    }
  for (const [i, t] of job.transformers.entries())
    if (feeding.transformerLive[i]) link(buses.index.get(t.from)!, buses.index.get(t.to)!);
  for (const source of job.sources) if (!source.off) link(root, buses.index.get(source.bus)!);

  // Depth first from the virtual bus; blocks come off a stack of edges.
  const order = new Int32Array(count + 1).fill(-1);
  const low = new Int32Array(count + 1);
  const blockOf = new Int32Array(ends.length).fill(-1);
  /** The block through which a bus is reached, and the bus at which that block hangs. */
  const blockAbove = new Int32Array(count + 1).fill(-1);
  const headOf: number[] = [];
  const edges: number[] = [];
  const stack = [{ bus: root, by: -1, next: 0 }];
  let time = 0;
  order[root] = low[root] = time++;
  while (stack.length > 0) {
    const top = stack[stack.length - 1]!;
    const next = links[top.bus]![top.next++];
    if (next) {
      if (next.edge === top.by || order[next.to]! > order[top.bus]!) continue;
      edges.push(next.edge);
      if (order[next.to]! >= 0) low[top.bus] = Math.min(low[top.bus]!, order[next.to]!);
      else {
        order[next.to] = low[next.to] = time++;
        stack.push({ bus: next.to, by: next.edge, next: 0 });
      }
      continue;
    }
    stack.pop();
    const above = stack[stack.length - 1];
    if (!above) continue;
    low[above.bus] = Math.min(low[above.bus]!, low[top.bus]!);
    if (low[top.bus]! < order[above.bus]!) continue;
    const block = headOf.push(above.bus) - 1;
    for (let edge = edges.pop()!; ; edge = edges.pop()!) {
      blockOf[edge] = block;
      for (const bus of ends[edge]!) if (bus !== above.bus) blockAbove[bus] = block;
      if (edge === top.by) break;
    }
  }

  const lowest = new Float64Array(headOf.length).fill(Number.POSITIVE_INFINITY);
  for (const [i, load] of core.loads.entries()) {
    if (!load.served) continue;
    let bus = load.bus;
    if (load.along >= 0) {
      const { from, to } = job.runs[load.along]!;
      const one = buses.index.get(from)!;
      const other = buses.index.get(to)!;
      bus = order[one]! > order[other]! ? one : other;
    }
    const block = blockAbove[bus]!;
    if (block >= 0) lowest[block] = Math.min(lowest[block]!, rankOf(i));
  }
  // A block is numbered when all that hangs on it is done: before the one that it hangs on itself.
  for (const [block, head] of headOf.entries()) {
    const above = blockAbove[head]!;
    if (above >= 0) lowest[above] = Math.min(lowest[above]!, lowest[block]!);
  }
  const byRun = new Float64Array(job.runs.length).fill(Number.POSITIVE_INFINITY);
  for (const [edge, run] of runOf.entries()) if (blockOf[edge]! >= 0) byRun[run] = lowest[blockOf[edge]!]!;
  return byRun;
}
