import type { Job, Verdict } from '@farlug/solver/job';
import type { ServedLoad } from './sinks.ts';

/** Two sets of bus-disjoint ways: from the source to one end of a run, and from the load to the other. */
export const carries = (job: Job, runId: string, item: ServedLoad): boolean => {
  const run = job.runs.find((r) => r.id === runId)!;
  if (run.open) return false;
  if (item.load.along === runId) return true;
  const sources = job.sources.filter((s) => !s.off).map((s) => s.bus);
  return item.places.some((place) => onSimplePath(job, run.id, sources, place));
};

/**
 * A run lies on a way without repeated bus from a source to a bus exactly when two bus-disjoint ways lead
 * from {source, bus} to its two ends: a flow of two with every bus used once.
 */
const onSimplePath = (job: Job, runId: string, sources: string[], target: string): boolean => {
  const run = job.runs.find((r) => r.id === runId)!;
  if (sources.includes(target)) return false;
  const links = [
    ...job.runs.filter((r) => !r.open && r.id !== runId).map((r) => [r.from, r.to] as const),
    ...job.transformers.map((t) => [t.from, t.to] as const),
  ];
  const capacity = new Map<string, Map<string, number>>();
  const link = (a: string, b: string) => {
    if (!capacity.has(a)) capacity.set(a, new Map());
    if (!capacity.has(b)) capacity.set(b, new Map());
    capacity.get(a)!.set(b, 1);
    if (!capacity.get(b)!.has(a)) capacity.get(b)!.set(a, 0);
  };
  const buses = new Set([run.from, run.to, target, ...sources, ...links.flat()]);
  for (const bus of buses) link(`in ${bus}`, `out ${bus}`);
  for (const [a, b] of links) {
    link(`out ${a}`, `in ${b}`);
    link(`out ${b}`, `in ${a}`);
  }
  for (const source of sources) link('origin', `in ${source}`);
  link('start', 'origin');
  link('start', `in ${target}`);
  link(`out ${run.from}`, 'goal');
  link(`out ${run.to}`, 'goal');
  let flow = 0;
  while (augment(capacity)) flow++;
  return flow === 2;
};

const augment = (capacity: Map<string, Map<string, number>>): boolean => {
  const came = new Map<string, string>([['start', '']]);
  for (const [at] of came) {
    for (const [next, room] of capacity.get(at) ?? []) if (room > 0 && !came.has(next)) came.set(next, at);
  }
  if (!came.has('goal')) return false;
  for (let at = 'goal'; at !== 'start'; at = came.get(at)!) {
    const before = came.get(at)!;
    capacity.get(before)!.set(at, capacity.get(before)!.get(at)! - 1);
    capacity.get(at)!.set(before, (capacity.get(at)!.get(before) ?? 0) + 1);
  }
  return true;
};

const WORST_FIRST: Verdict[] = ['over', 'rise', 'unserved', 'within', 'unjudged'];

/** The worst of some verdicts; `unjudged` where there are none. */
export const worstOf = (verdicts: Verdict[]): Verdict =>
  WORST_FIRST.find((verdict) => verdicts.includes(verdict)) ?? 'unjudged';
