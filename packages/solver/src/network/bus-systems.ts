import type { Job } from '../job/index.ts';
import { busSystems, type Origin } from '../job/systems.ts';
import { busIds } from './bus-list.ts';
import { type PairEmf, pairTable } from './pair-table.ts';
import { type Refusal, refusal } from './refusal.ts';

/** What a supply system means at each of its buses. */
export interface SystemHere {
  origin: Origin;
  /** By pair index; `null` where the system lacks the pair. */
  pairs: (PairEmf | null)[];
}

export interface Buses {
  ids: string[];
  index: Map<string, number>;
  /** By bus; `null` where only open runs or sources that are off lead. */
  system: (SystemHere | null)[];
}

/** Buses and their systems. Refused: a bus with no path to a source. */
export function buildBuses(job: Job): Buses | Refusal {
  const ids = busIds(job);
  const reached = busSystems(job);
  const unfed = ids.find((id) => !reached.has(id));
  if (unfed !== undefined)
    return refusal(`bus ${unfed}`, 'has no path to a source: join it to the network or take it out');
  const known = new Map<Origin, SystemHere>();
  const system = ids.map((id): SystemHere | null => {
    const { origin, live } = reached.get(id)!;
    if (!live) return null;
    const seen = known.get(origin);
    if (seen) return seen;
    const made = { origin, pairs: pairTable(origin.emfs, origin.openRatio) };
    known.set(origin, made);
    return made;
  });
  return { ids, index: new Map(ids.map((id, i) => [id, i])), system };
}
