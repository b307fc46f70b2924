import type { Job, LoadResult, Solution } from '../job/index.ts';
import { SHOWN_ORDER, type Shown, type ShownVerdict, shownVerdicts, worstShown } from './shown.ts';

/** Loads that are counted as one, with the one that decides. */
export interface Group {
  key: string;
  shown: ShownVerdict;
  worst: LoadResult;
  loads: LoadResult[];
}

export interface Summary {
  /** Worst first. */
  groups: Group[];
  /** Of groups. */
  counts: Record<ShownVerdict, number>;
  worst: Group | null;
}

/** Worst first: by verdict, then by the share of the total limit, then by total percent. */
export function summarise(
  job: Job,
  solution: Solution,
  groupOf: (loadId: string) => string,
  shown: Shown = shownVerdicts(job, solution),
): Summary {
  const byKey = new Map<string, LoadResult[]>();
  for (const load of solution.loads) {
    const key = groupOf(load.id);
    const list = byKey.get(key);
    if (list) list.push(load);
    else byKey.set(key, [load]);
  }
  const order = (load: LoadResult) => SHOWN_ORDER.indexOf(shown.loads.get(load.id)!);
  const worstFirst = (a: LoadResult, b: LoadResult) =>
    order(a) - order(b) || shareUsed(b) - shareUsed(a) || (b.totalPercent ?? 0) - (a.totalPercent ?? 0);
  const groups = [...byKey].map(([key, loads]): Group => {
    const worst = loads.reduce((most, next) => (worstFirst(next, most) < 0 ? next : most));
    return { key, shown: worstShown(loads.map((l) => shown.loads.get(l.id)!)), worst, loads };
  });
  groups.sort((a, b) => worstFirst(a.worst, b.worst));
  const counts = Object.fromEntries(SHOWN_ORDER.map((verdict) => [verdict, 0])) as Summary['counts'];
  for (const group of groups) counts[group.shown]++;
  return { groups, counts, worst: groups[0] ?? null };
}

const shareUsed = ({ totalPercent, limitPercent }: LoadResult): number =>
  totalPercent === null ? 0 : Math.abs(totalPercent) / (limitPercent || 1);
