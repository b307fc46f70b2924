import type { Job } from '../job/index.ts';

/** Every bus of a job: the entries of `buses` in file order, then those that only something else names. */
export function busIds(job: Job): string[] {
  const ids = new Set<string>();
  for (const bus of job.buses) ids.add(bus.id);
  for (const source of job.sources) ids.add(source.bus);
  for (const run of job.runs) ids.add(run.from).add(run.to);
  for (const t of job.transformers) ids.add(t.from).add(t.to);
  for (const load of job.loads) if (load.bus !== null) ids.add(load.bus);
  return [...ids];
}
