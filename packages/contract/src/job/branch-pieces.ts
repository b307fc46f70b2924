import type { Job } from '@farlug/solver/job';

/**
 * A circuit as the model has it: a connected piece of branch runs, cut at every bus that another kind of run,
 * a source or a transformer touches. A load at such a bus, or at one that no branch run touches, is a piece alone.
 */
export interface BranchPiece {
  /** Indices in `job.runs` and `job.loads`, in file order. */
  runs: number[];
  loads: number[];
  /** Cut buses that it touches, in the order in which its runs name them. */
  starts: string[];
}

export function branchPieces(job: Pick<Job, 'sources' | 'runs' | 'transformers' | 'loads'>): BranchPiece[] {
  const cut = cutBuses(job);
  const parent = job.runs.map((_, i) => i);
  const rootOf = (i: number): number => {
    let root = i;
    while (parent[root] !== root) root = parent[root]!;
    while (parent[i] !== root) [parent[i], i] = [root, parent[i]!];
    return root;
  };
  const runAt = new Map<string, number>();
  job.runs.forEach((run, i) => {
    if (run.kind !== 'branch') return;
    for (const bus of [run.from, run.to]) {
      if (cut.has(bus)) continue;
      const other = runAt.get(bus);
      if (other === undefined) runAt.set(bus, i);
      else parent[rootOf(i)] = rootOf(other);
    }
  });

  const pieces = new Map<number, BranchPiece>();
  job.runs.forEach((run, i) => {
    if (run.kind !== 'branch') return;
    const root = rootOf(i);
    const piece = pieces.get(root) ?? { runs: [], loads: [], starts: [] };
    pieces.set(root, piece);
    piece.runs.push(i);
    for (const bus of [run.from, run.to])
      if (cut.has(bus) && !piece.starts.includes(bus)) piece.starts.push(bus);
  });

  const runIndex = new Map(job.runs.map((run, i) => [run.id, i]));
  const alone: BranchPiece[] = [];
  job.loads.forEach((load, i) => {
    const along = load.along === null ? undefined : runIndex.get(load.along);
    const touching = along ?? (load.bus === null ? undefined : runAt.get(load.bus));
    const piece = touching === undefined ? undefined : pieces.get(rootOf(touching));
    if (piece) piece.loads.push(i);
    else alone.push({ runs: [], loads: [i], starts: load.bus === null ? [] : [load.bus] });
  });
  return [...pieces.values(), ...alone];
}

/** The buses at which circuits begin. */
export function cutBuses(job: Pick<Job, 'sources' | 'runs' | 'transformers'>): Set<string> {
  const cut = new Set(job.sources.map((source) => source.bus));
  for (const run of job.runs) if (run.kind !== 'branch') cut.add(run.from).add(run.to);
  for (const transformer of job.transformers) cut.add(transformer.from).add(transformer.to);
  return cut;
}
