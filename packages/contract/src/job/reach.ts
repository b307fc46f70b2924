import type { JobRows } from '../rows/index.ts';

export interface Kept {
  source: ReadonlySet<string>;
  run: ReadonlySet<string>;
  transformer: ReadonlySet<string>;
}

/** The buses that a source reaches through the kept runs and transformers; open runs and sources that are off count. */
export function reachedBuses(rows: JobRows, kept: Kept): Set<string> {
  const next = new Map<string, string[]>();
  const link = (from: string, to: string) => {
    const list = next.get(from);
    if (list) list.push(to);
    else next.set(from, [to]);
  };
  for (const run of rows.run.values()) {
    if (!kept.run.has(run.id)) continue;
    link(run.fromBusId, run.toBusId);
    link(run.toBusId, run.fromBusId);
  }
  for (const one of rows.transformer.values())
    if (kept.transformer.has(one.id)) link(one.fromBusId, one.toBusId);
  const reached = new Set<string>();
  const queue = [...rows.source.values()].filter((one) => kept.source.has(one.id)).map((one) => one.busId);
  for (let bus = queue.pop(); bus !== undefined; bus = queue.pop()) {
    if (reached.has(bus)) continue;
    reached.add(bus);
    queue.push(...(next.get(bus) ?? []));
  }
  return reached;
}
