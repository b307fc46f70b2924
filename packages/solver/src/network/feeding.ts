import { type Conductor, type Job, SYSTEM_CONDUCTORS } from '../job/index.ts';
import type { Buses } from './bus-systems.ts';
import type { JobOhms } from './job-ohms.ts';
import { SLOT } from './pair-table.ts';
import { STAR, type Winding } from './windings.ts';

export interface Feeding {
  /** By 4·bus + slot: 1 where a closed path of that conductor leads to a source or a winding. */
  fed: Uint8Array;
  /** By run: 1 where it joins two live buses. */
  runLive: Uint8Array;
  /** By transformer: 1 where all its primary terminals are fed. */
  transformerLive: Uint8Array;
}

/** Follows what is fed, conductor by conductor: through closed runs, and through transformers from their primaries. */
export function followFeeding(job: Job, buses: Buses, ohms: JobOhms, windings: Winding[][]): Feeding {
  const at = (id: string): number => buses.index.get(id)!;
  const fed = new Uint8Array(4 * buses.ids.length);
  const runLive = new Uint8Array(job.runs.length);
  const touching: number[][] = buses.ids.map(() => []);
  for (const [i, run] of job.runs.entries()) {
    const from = at(run.from);
    const to = at(run.to);
    if (run.open || !buses.system[from] || !buses.system[to]) continue;
    runLive[i] = 1;
    touching[from]!.push(i);
    touching[to]!.push(i);
  }
  const queue: number[] = [];
  const feed = (slot: number) => {
    if (fed[slot]) return;
    fed[slot] = 1;
    queue.push(slot);
  };
  const feedBus = (bus: number, conductors: readonly Conductor[]) => {
    if (buses.system[bus]) for (const c of conductors) feed(4 * bus + SLOT[c]);
  };
  const drain = () => {
    for (let slot = queue.pop(); slot !== undefined; slot = queue.pop())
      for (const r of touching[slot >> 2]!) {
        if (!ohms.runs[r]![slot & 3]) continue;
        feed(4 * at(job.runs[r]!.from) + (slot & 3));
        feed(4 * at(job.runs[r]!.to) + (slot & 3));
      }
  };
  for (const source of job.sources)
    if (!source.off) feedBus(at(source.bus), SYSTEM_CONDUCTORS[source.system]);
  drain();

  const transformerLive = new Uint8Array(job.transformers.length);
  for (let changed = true; changed; ) {
    changed = false;
    for (const [i, t] of job.transformers.entries()) {
      if (transformerLive[i]) continue;
      const primary = 4 * at(t.from);
      const complete = windings[i]!.every((w) =>
        w.primary.every((terminal) => terminal === STAR || fed[primary + SLOT[terminal]]),
      );
      if (!complete) continue;
      transformerLive[i] = 1;
      changed = true;
      feedBus(at(t.to), SYSTEM_CONDUCTORS[t.system]);
      drain();
    }
  }
  return { fed, runLive, transformerLive };
}
