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

const listed = (map: Map<string, number[]>, key: string, value: number): void => {
  const list = map.get(key);
  if (list) list.push(value);
  else map.set(key, [value]);
};

/**
 * Prepares a job once and answers for any run, by index: its far side, or `null` where the run is open, part of a loop
 * or fed from both ends. An answer costs no more than what lies beyond.
 */
export function beyondFinder(job: Job): (run: number) => Beyond | null {
  const radial = radialRuns(job);
  const runsAt = new Map<string, number[]>();
  const transformersAt = new Map<string, number[]>();
  const loadsAt = new Map<string, number[]>();
  const loadsAlong = new Map<string, number[]>();
  job.runs.forEach((run, i) => {
    if (run.open) return;
    listed(runsAt, run.from, i);
    listed(runsAt, run.to, i);
  });
  job.transformers.forEach((t, i) => {
    listed(transformersAt, t.from, i);
    listed(transformersAt, t.to, i);
  });
  job.loads.forEach((load, i) => {
    if (load.bus !== null) listed(loadsAt, load.bus, i);
    else listed(loadsAlong, load.along!, i);
  });

  return (index) => {
    const farBus = radial.get(index);
    if (farBus === undefined) return null;
    const run = job.runs[index]!;
    const buses = new Set([farBus]);
    const runs = new Set<number>();
    const along = loadsAlong.get(run.id) ?? [];
    const loads = [...along];
    for (const bus of buses) {
      for (const load of loadsAt.get(bus) ?? []) loads.push(load);
      for (const i of runsAt.get(bus) ?? []) {
        if (i === index || runs.has(i)) continue;
        const { id, from, to } = job.runs[i]!;
        runs.add(i);
        for (const load of loadsAlong.get(id) ?? []) loads.push(load);
        buses.add(from).add(to);
      }
      for (const i of transformersAt.get(bus) ?? [])
        buses.add(job.transformers[i]!.from).add(job.transformers[i]!.to);
    }
    const inOrder = (a: number, b: number) => a - b;
    return {
      nearBus: farBus === run.to ? run.from : run.to,
      farBus,
      buses,
      runs: [...runs].sort(inOrder),
      loads: loads.sort(inOrder),
      along,
    };
  };
}
