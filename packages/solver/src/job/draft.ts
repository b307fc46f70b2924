import type { Bus, ConductorRow, Job, Load, Panel, Run, Source, Transformer } from './schema.ts';
import { jobSchema } from './schema.ts';

type Reading = Job['readings'][number];

/** The arrays of a job file as far as each entry can be read: an entry that its schema refuses is a hole. */
export interface Draft {
  sources: (Source | undefined)[];
  buses: (Bus | undefined)[];
  runs: (Run | undefined)[];
  transformers: (Transformer | undefined)[];
  loads: (Load | undefined)[];
  panels: (Panel | undefined)[];
  conductorRows: (ConductorRow | undefined)[];
  readings: (Reading | undefined)[];
}
export type DraftList = keyof Draft;
export type Report = (path: string, message: string) => void;

const LISTS = [
  'sources',
  'buses',
  'runs',
  'transformers',
  'loads',
  'panels',
  'conductorRows',
  'readings',
] as const satisfies readonly DraftList[];

/** Reads each entry by itself, so that one faulty entry hides no problem of another. */
export function draftOf(json: unknown): Draft {
  const whole = typeof json === 'object' && json !== null ? (json as Record<string, unknown>) : {};
  const read = (key: DraftList) => {
    const entries = whole[key];
    if (!Array.isArray(entries)) return [];
    const list = jobSchema.shape[key];
    return entries.map((entry) => {
      const outcome = list.safeParse([entry]);
      return outcome.success ? outcome.data[0] : undefined;
    });
  };
  return Object.fromEntries(LISTS.map((key) => [key, read(key)])) as unknown as Draft;
}

/** Calls `visit` for every entry that could be read. */
export function eachOf<T>(list: readonly (T | undefined)[], visit: (entry: T, index: number) => void): void {
  list.forEach((entry, index) => {
    if (entry !== undefined) visit(entry, index);
  });
}
