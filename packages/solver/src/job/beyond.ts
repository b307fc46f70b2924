import { radialRuns } from './bridges.ts';
import type { Job } from './schema.ts';

/** What lies beyond a radial run: buses, runs and loads on its far side, as indices in file order where they are lists. */
export interface Beyond {
  nearBus: string;
  farBus: string;
  buses: ReadonlySet<string>;
  runs: readonly number[];
  /** Loads at buses beyond, along runs beyond, and along the run itself. */
  loads: readonly number[];
  /** Those of `loads` that are spread along the run itself. */
  along: readonly number[];
}

/** The far side of a run; `null` where the run is open, part of a loop or fed from both ends. */
export function beyondRun(job: Job, index: number, radial = radialRuns(job)): Beyond | null {
  const farBus = radial.get(index);
  if (farBus === undefined) return null;
  const run = job.runs[index]!;
  const links = new Map<string, string[]>();
  const link = (from: string, to: string) => {
    const list = links.get(from);
    if (list) list.push(to);
    else links.set(from, [to]);
  };
  job.runs.forEach((other, i) => {
    if (i === index || other.open) return;
    link(other.from, other.to);
    link(other.to, other.from);
  });
  for (const t of job.transformers) {
    link(t.from, t.to);
    link(t.to, t.from);
  }
  const buses = new Set([farBus]);
  for (const bus of buses) for (const next of links.get(bus) ?? []) buses.add(next);
  const runs = job.runs.flatMap((r, i) =>
    i !== index && !r.open && buses.has(r.from) && buses.has(r.to) ? [i] : [],
  );
  const within = new Set(runs.map((i) => job.runs[i]!.id)).add(run.id);
  const loads = job.loads.flatMap((load, i) =>
    (load.bus !== null && buses.has(load.bus)) || (load.along !== null && within.has(load.along)) ? [i] : [],
  );
  return {
    nearBus: farBus === run.to ? run.from : run.to,
    farBus,
    buses,
    runs,
    loads,
    along: loads.filter((i) => job.loads[i]!.along === run.id),
  };
}
