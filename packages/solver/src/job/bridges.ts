import type { Job } from './schema.ts';

/** Which runs are the only way between their two sides, over closed runs and transformers. */
export interface Bridges {
  /** Index in `job.runs` (after those, `job.transformers`) → the bus on the side away from the root of the search. */
  bridges: Map<number, string>;
  /** Sources that are on, at or below each bus of the search, and in the whole connected piece of each bus. */
  sourcesBelow: Map<string, number>;
  sourcesInPiece: Map<string, number>;
}

/**
 * One depth-first search over buses (Tarjan 1974): a run is a bridge where nothing below it reaches above it.
 * Parallel runs are no bridges.
 */
export function bridgesOf(job: Job): Bridges {
  const links = new Map<string, { to: string; edge: number }[]>();
  const link = (from: string, to: string, edge: number) => {
    const list = links.get(from);
    if (list) list.push({ to, edge });
    else links.set(from, [{ to, edge }]);
  };
  job.runs.forEach((run, i) => {
    if (run.open) return;
    link(run.from, run.to, i);
    link(run.to, run.from, i);
  });
  job.transformers.forEach((t, i) => {
    link(t.from, t.to, job.runs.length + i);
    link(t.to, t.from, job.runs.length + i);
  });
  const fed = new Map<string, number>();
  for (const source of job.sources) if (!source.off) fed.set(source.bus, (fed.get(source.bus) ?? 0) + 1);

  const order = new Map<string, number>();
  const low = new Map<string, number>();
  const sourcesBelow = new Map<string, number>();
  const sourcesInPiece = new Map<string, number>();
  const bridges = new Map<number, string>();
  for (const root of links.keys()) {
    if (order.has(root)) continue;
    const piece: string[] = [];
    const enter = (bus: string) => {
      order.set(bus, order.size);
      low.set(bus, order.get(bus)!);
      sourcesBelow.set(bus, fed.get(bus) ?? 0);
      piece.push(bus);
    };
    enter(root);
    const stack = [{ bus: root, by: -1, next: 0 }];
    while (stack.length > 0) {
      const top = stack[stack.length - 1]!;
      const edge = links.get(top.bus)![top.next++];
      if (edge) {
        if (edge.edge === top.by) continue;
        if (order.has(edge.to)) low.set(top.bus, Math.min(low.get(top.bus)!, order.get(edge.to)!));
        else {
          enter(edge.to);
          stack.push({ bus: edge.to, by: edge.edge, next: 0 });
        }
        continue;
      }
      stack.pop();
      const above = stack[stack.length - 1];
      if (!above) continue;
      low.set(above.bus, Math.min(low.get(above.bus)!, low.get(top.bus)!));
      sourcesBelow.set(above.bus, sourcesBelow.get(above.bus)! + sourcesBelow.get(top.bus)!);
      if (low.get(top.bus)! > order.get(above.bus)!) bridges.set(top.by, top.bus);
    }
    for (const bus of piece) sourcesInPiece.set(bus, sourcesBelow.get(root)!);
  }
  return { bridges, sourcesBelow, sourcesInPiece };
}

/**
 * Run index → the bus on its far side, for every radial run: one that is the only way to its far side and has every
 * source that is on upon the other.
 */
export function radialRuns(job: Job): Map<number, string> {
  const { bridges, sourcesBelow, sourcesInPiece } = bridgesOf(job);
  const radial = new Map<number, string>();
  for (const [run, below] of bridges) {
    if (run >= job.runs.length) continue;
    const { from, to } = job.runs[run]!;
    const sources = sourcesBelow.get(below)!;
    if (sources === 0) radial.set(run, below);
    else if (sources === sourcesInPiece.get(below)) radial.set(run, below === from ? to : from);
  }
  return radial;
}
