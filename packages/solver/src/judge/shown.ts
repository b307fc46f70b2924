import type { Job, Load, LoadResult, Solution, Verdict } from '../job/index.ts';
import { panelJudged } from './bus-results.ts';
import { lowestCarried } from './carried.ts';
import { buildCore } from './core.ts';
import { limitsFor } from './limits.ts';
import type { Judged } from './verdict.ts';

/** Verdicts as pages show them: `near` is within, but at `NEAR_SHARE` of a limit or beyond. */
export type ShownVerdict = Verdict | 'near';
export const NEAR_SHARE = 0.9;

/** From worst to best. */
export const SHOWN_ORDER: readonly ShownVerdict[] = [
  'over',
  'rise',
  'near',
  'within',
  'unjudged',
  'unserved',
];

/** Shown verdicts of a solution, by id. */
export interface Shown {
  loads: ReadonlyMap<string, ShownVerdict>;
  /** A run shows the worst of the loads that it carries. */
  runs: ReadonlyMap<string, ShownVerdict>;
  panels: ReadonlyMap<string, ShownVerdict>;
}

export const worstShown = (list: Iterable<ShownVerdict>): ShownVerdict => {
  let worst = SHOWN_ORDER.length;
  for (const verdict of list) worst = Math.min(worst, SHOWN_ORDER.indexOf(verdict));
  return SHOWN_ORDER[worst] ?? 'unjudged';
};

/** Shown verdicts of every load, run and panel of a solution of this job; `share` of a limit counts as near. */
export function shownVerdicts(job: Job, solution: Solution, share = NEAR_SHARE): Shown {
  const loads = new Map(
    job.loads.map((load, i) => {
      const result = solution.loads[i]!;
      return [load.id, shownOf(result.verdict, used(job, load, result), share)] as const;
    }),
  );
  const panels = new Map(
    solution.buses.flatMap(({ id, feederPercent, verdict }) => {
      if (verdict === undefined) return [];
      const judged = panelJudged(feederPercent ?? 0, job.limits.feeder).map(shareOf);
      return [[id, shownOf(verdict, judged, share)] as const];
    }),
  );
  const core = buildCore(job);
  const rankOf = (load: number) => SHOWN_ORDER.indexOf(loads.get(job.loads[load]!.id)!);
  const worst = 'kind' in core ? null : lowestCarried(core, rankOf);
  const runs = new Map(
    job.runs.map(({ id }, i) => [id, (worst && SHOWN_ORDER[worst[i]!]) ?? 'unjudged'] as const),
  );
  return { loads, runs, panels };
}

const shownOf = (verdict: Verdict, shares: readonly number[], share: number): ShownVerdict =>
  verdict === 'within' && shares.some((each) => each >= share) ? 'near' : verdict;

const shareOf = ({ value, limit }: Pick<Judged, 'value' | 'limit'>): number =>
  value > 0 ? value / limit : 0;

/** The share of each limit that a load uses; of a bound in volts, of the way from no load down to it. */
function used(job: Job, load: Load, result: LoadResult): number[] {
  if (result.volts === null) return [];
  const openVolts = result.volts + result.dropVolts!;
  const limits = limitsFor(load, job, openVolts);
  const shares: number[] = [];
  const put = (value: number | null, limit: number | null) => {
    if (value !== null && limit !== null) shares.push(shareOf({ value, limit }));
  };
  put(result.feederPercent, limits.feeder);
  put(result.branchPercent, limits.branch);
  put(result.totalPercent, result.limitPercent);
  put(result.startingPercent, limits.starting);
  put(-result.totalPercent!, limits.rise);
  const floor = limits.lowestVolts;
  const rated = limits.ratingLow === null ? null : (limits.ratingLow * load.ratedVolts!) / 100;
  for (const lowest of [floor, rated])
    if (lowest !== null && openVolts > lowest) put(result.dropVolts, openVolts - lowest);
  return shares;
}
