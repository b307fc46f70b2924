import type { Job, Load, Verdict } from '@farlug/solver/job';
import type { Reading, Split } from './split.ts';

export interface Judgement {
  verdict: Verdict;
  /** The limits that are not met, in their order in the file. */
  broken: string[];
  /** Limits that apply, met or not. */
  applied: string[];
  total: number;
  totalLimit: number | null;
  /** How far the worst limit that more current can break is overstepped, in its own unit; null without one. */
  excess: number | null;
}

/** More than 1e-9 relative above. */
export const exceeds = (value: number, limit: number): boolean =>
  value - limit > 1e-9 * Math.max(Math.abs(value), Math.abs(limit));

const voltsLimit = (limit: number | Record<string, number> | null, nominal: number): number | null => {
  if (limit === null || typeof limit === 'number') return limit;
  return limit[String(Math.round(nominal))] ?? null;
};

export const totalOf = (job: Job, split: Split): number => {
  const { includeService, includeTransformer, includeSource } = job.limits;
  return (
    split.feeder +
    split.branch +
    (includeService ? split.service : 0) +
    (includeTransformer ? split.transformer : 0) +
    (includeSource ? split.source : 0)
  );
};

/** All limits of a load on one set of figures; `starting` is its percent while starting, null where not judged. */
export const judge = (
  job: Job,
  load: Load,
  reading: Reading,
  split: Split,
  pathM: number,
  starting: number | null,
): Judgement => {
  const { limits } = job;
  const own = limits.byClass[load.class];
  const feeder = own?.feeder ?? limits.feeder;
  const branch = own?.branch ?? limits.branch;
  const base = own?.total ?? limits.total;
  const longer = limits.longRun ? Math.min(0.5, 0.005 * Math.max(0, pathM - 100)) : 0;
  const totalLimit = base === null ? null : base + longer;
  const total = totalOf(job, split);
  const lowest = voltsLimit(limits.lowestVolts, reading.nominalVolts);
  const highest = voltsLimit(limits.highestVolts, reading.nominalVolts);
  const rated = load.ratedVolts;
  const low = rated !== null && limits.rating?.low != null ? (rated * limits.rating.low) / 100 : null;
  const high = rated !== null && limits.rating?.high != null ? (rated * limits.rating.high) / 100 : null;

  const checks: [name: string, value: number | null, limit: number | null][] = [
    ['feeder', split.feeder, feeder],
    ['branch', split.branch, branch],
    ['total', total, totalLimit],
    ['starting', starting, limits.starting],
    ['rise', -total, limits.rise],
    ['lowest volts', lowest === null ? null : -reading.volts, lowest === null ? null : -lowest],
    ['highest volts', reading.volts, highest],
    ['rating', low === null ? null : -reading.volts, low === null ? null : -low],
    ['rating', reading.volts, high],
  ];
  const applied = checks.filter(([, value, limit]) => value !== null && limit !== null);
  const broken = applied.filter(([, value, limit]) => exceeds(value!, limit!)).map(([name]) => name);
  const verdict: Verdict =
    applied.length === 0
      ? 'unjudged'
      : broken.some((name) => name !== 'rise')
        ? 'over'
        : broken.length > 0
          ? 'rise'
          : 'within';
  const breakable = applied.filter(([name]) => name !== 'starting' && name !== 'rise');
  const excess =
    breakable.length === 0 ? null : Math.max(...breakable.map(([, value, limit]) => value! - limit!));
  return { verdict, broken, applied: applied.map(([name]) => name), total, totalLimit, excess };
};
