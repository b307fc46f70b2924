import type { Job } from '@farlug/solver/job';
import { flood } from './topology.ts';

/** A piece of branch runs between cut buses, or a single load at a cut bus (model.md 6). */
export interface Circuit {
  /** For messages and for finding the circuit of a run: ids of its branch runs. */
  runs: Set<string>;
  loads: Set<string>;
  /** The cut buses that it touches: where it begins. */
  begins: string[];
}

/** Circuits as the file draws them: open runs and sources that are off included, before any merging. */
export const circuitsOf = (job: Job): Circuit[] => {
  const cut = new Set([
    ...job.sources.map((source) => source.bus),
    ...job.transformers.flatMap((t) => [t.from, t.to]),
    ...job.runs.filter((run) => run.kind !== 'branch').flatMap((run) => [run.from, run.to]),
  ]);
  const branches = job.runs.filter((run) => run.kind === 'branch');
  const ends = new Map(branches.map((run) => [run.id, [run.from, run.to]]));
  const circuits: Circuit[] = [];
  const placed = new Set<string>();
  for (const branch of branches) {
    if (placed.has(branch.id)) continue;
    const runs = flood([branch.id], (id) => {
      const joints = ends.get(id)!.filter((bus) => !cut.has(bus));
      return branches.filter((r) => joints.includes(r.from) || joints.includes(r.to)).map((r) => r.id);
    });
    for (const id of runs) placed.add(id);
    const touched = new Set([...runs].flatMap((id) => ends.get(id)!));
    const loads = job.loads.filter((load) =>
      load.along !== null ? runs.has(load.along) : touched.has(load.bus!) && !cut.has(load.bus!),
    );
    circuits.push({
      runs,
      loads: new Set(loads.map((load) => load.id)),
      begins: [...touched].filter((bus) => cut.has(bus)),
    });
  }
  for (const load of job.loads) {
    if (load.along !== null || !cut.has(load.bus!)) continue;
    circuits.push({ runs: new Set(), loads: new Set([load.id]), begins: [load.bus!] });
  }
  return circuits;
};
