import type { Job, Limits, Load } from '../job/index.ts';

/** The limits that hold for one load, `null` where there is none. Percents of nominal, or volts. */
export interface LoadLimits {
  feeder: number | null;
  branch: number | null;
  /** Before what a long path adds. */
  total: number | null;
  starting: number | null;
  rise: number | null;
  lowestVolts: number | null;
  highestVolts: number | null;
  /** Percent of the load's rated volts. */
  ratingLow: number | null;
  ratingHigh: number | null;
}

/** A map of volts is keyed by nominal volts; a key holds within half a volt of the pair's. */
const KEY_SLACK_VOLTS = 0.5;

const voltsFor = (limit: Limits['lowestVolts'], nominal: number): number | null => {
  if (limit === null || typeof limit === 'number') return limit;
  let best: number | null = null;
  let nearest = KEY_SLACK_VOLTS;
  for (const [key, volts] of Object.entries(limit)) {
    const apart = Math.abs(Number(key) - nominal);
    if (apart <= nearest) {
      nearest = apart;
      best = volts ?? null;
    }
  }
  return best;
};

/** True where some source that is on states an impedance: only then can a starting dip be judged. */
export const startingIsJudged = (job: Job): boolean =>
  job.sources.some((source) => !source.off && (source.impedance !== null || source.fault !== null));

/**
 * Limits of a load: those of its class where it has one, else the job's. `nominalVolts` is of its pair, and picks
 * from a map of volts.
 */
export function limitsFor(load: Load, job: Job, nominalVolts: number): LoadLimits {
  const { limits } = job;
  const own = limits.byClass[load.class];
  const rated = load.ratedVolts !== null;
  return {
    feeder: own?.feeder ?? limits.feeder,
    branch: own?.branch ?? limits.branch,
    total: own?.total ?? limits.total,
    starting: load.starting && startingIsJudged(job) ? limits.starting : null,
    rise: limits.rise,
    lowestVolts: voltsFor(limits.lowestVolts, nominalVolts),
    highestVolts: voltsFor(limits.highestVolts, nominalVolts),
    ratingLow: rated ? (limits.rating?.low ?? null) : null,
    ratingHigh: rated ? (limits.rating?.high ?? null) : null,
  };
}

/** 0.005 % per metre of path beyond 100 m, at most 0.5 % (IEC 60364-5-52 Annex G), where the job counts it. */
export const longRunPercent = (job: Job, pathM: number): number =>
  job.limits.longRun && pathM > 100 ? Math.min(0.005 * (pathM - 100), 0.5) : 0;
