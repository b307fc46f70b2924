import type { JobFile } from '@farlug/solver/job';
import type { Random } from './random.ts';

type Lists = 'buses' | 'runs' | 'transformers' | 'loads' | 'panels';
const LISTS: Lists[] = ['buses', 'runs', 'transformers', 'loads', 'panels'];

const shuffled = <T>(random: Random, list: readonly T[]): T[] => {
  const copy = [...list];
  for (let k = copy.length - 1; k > 0; k--) {
    const other = random.whole(0, k);
    [copy[k], copy[other]] = [copy[other]!, copy[k]!];
  }
  return copy;
};

/** The same job with every list in another order (sources keep theirs: their order has a meaning). */
export const reordered = (random: Random, job: JobFile): JobFile => {
  const copy = { ...job };
  for (const list of LISTS) copy[list] = shuffled<unknown>(random, job[list] ?? []) as never;
  copy.runs = copy.runs!.map((run) => ({ ...run, conductors: shuffled(random, run.conductors) }));
  return copy;
};

/** The same job with every bus and run under another name. */
export const relabelled = (random: Random, job: JobFile): { job: JobFile; bus: (id: string) => string } => {
  const names = new Map<string, string>();
  const rename = (id: string): string => {
    if (!names.has(id)) names.set(id, `${random.whole(100, 999)} ${names.size}`);
    return names.get(id)!;
  };
  const bus = (id: string) => rename(`bus ${id}`);
  const run = (id: string) => rename(`run ${id}`);
  const maybe = (id: string | null | undefined, by: (id: string) => string) => (id == null ? id : by(id));
  return {
    bus,
    job: {
      ...job,
      buses: job.buses?.map((b) => ({ ...b, id: bus(b.id) })),
      sources: job.sources.map((s) => ({ ...s, bus: bus(s.bus) })),
      runs: job.runs?.map((r) => ({ ...r, id: run(r.id), from: bus(r.from), to: bus(r.to) })),
      transformers: job.transformers?.map((t) => ({ ...t, from: bus(t.from), to: bus(t.to) })),
      loads: job.loads?.map((l) => ({ ...l, bus: maybe(l.bus, bus), along: maybe(l.along, run) })),
      panels: job.panels?.map((p) => ({ ...p, bus: bus(p.bus) })),
    },
  };
};

/** The same job with its lengths in the other unit. */
export const inOtherUnit = (job: JobFile): JobFile => {
  const toFeet = job.lengthUnit === 'm';
  return {
    ...job,
    lengthUnit: toFeet ? 'ft' : 'm',
    runs: job.runs?.map((run) => ({ ...run, length: toFeet ? run.length / 0.3048 : run.length * 0.3048 })),
  };
};

/**
 * The same job with every run of one set laid as two equal runs of twice the length in parallel: electrically the same, but no
 * longer radial anywhere.
 */
export const doubled = (job: JobFile): JobFile => ({
  ...job,
  runs: job.runs?.flatMap((run) => {
    if (run.open || run.temperature === 'operating') return [run];
    const half = { ...run, length: run.length * 2 };
    return [half, { ...half, id: `${run.id} again` }];
  }),
});
