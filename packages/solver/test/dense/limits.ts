import type { Job, Load, Verdict } from '@farlug/solver/job';
import { D, type Decimal, largest, NIL, sumOf } from './decimal.ts';
import type { Reading, Split } from './split.ts';

export interface Judgement {
  verdict: Verdict;
  /** The limits that are not met, in their order in the file. */
  broken: string[];
  /** Limits that apply, met or not. */
  applied: string[];
  total: Decimal;
  totalLimit: Decimal | null;
  /** How far the worst limit that more current can break is overstepped, in its own unit; null without one. */
  excess: Decimal | null;
}

/** More than 1e-9 relative above. */
export const exceeds = (value: Decimal, limit: Decimal): boolean =>
  value.minus(limit).gt(largest([value.abs(), limit.abs()]).times('1e-9'));

const voltsLimit = (limit: number | Record<string, number> | null, nominal: Decimal): Decimal | null => {
  const volts = limit === null || typeof limit === 'number' ? limit : limit[nominal.toFixed(0)];
  return volts == null ? null : D(volts);
};

const totalOf = (job: Job, split: Split): Decimal => {
  const { includeService, includeTransformer, includeSource } = job.limits;
  return sumOf([
    split.feeder,
    split.branch,
    includeService ? split.service : NIL,
    includeTransformer ? split.transformer : NIL,
    includeSource ? split.source : NIL,
  ]);
};

/** A limit or a share of rated volts as a figure. */
const figure = (value: number | null | undefined): Decimal | null => (value == null ? null : D(value));

/** All limits of a load on one set of figures; `starting` is its percent while starting, null where not judged. */
export const judge = (
  job: Job,
  load: Load,
  reading: Reading,
  split: Split,
  pathM: Decimal,
  starting: Decimal | null,
): Judgement => {
  const { limits } = job;
  const own = limits.byClass[load.class];
  const feeder = figure(own?.feeder ?? limits.feeder);
  const branch = figure(own?.branch ?? limits.branch);
  const base = figure(own?.total ?? limits.total);
  const beyond = largest([NIL, pathM.minus(100)]).times('0.005');
  const longer = limits.longRun ? (beyond.gt('0.5') ? D('0.5') : beyond) : NIL;
  const totalLimit = base?.plus(longer) ?? null;
  const total = totalOf(job, split);
  const lowest = voltsLimit(limits.lowestVolts, reading.nominalVolts);
  const highest = voltsLimit(limits.highestVolts, reading.nominalVolts);
  const rated = (percent: Decimal | null): Decimal | null =>
    percent === null || load.ratedVolts === null ? null : percent.times(load.ratedVolts).div(100);
  const low = rated(figure(limits.rating?.low));
  const high = rated(figure(limits.rating?.high));
  const atLeast = (limit: Decimal | null) => (limit === null ? null : reading.volts.neg());

  const checks: [name: string, value: Decimal | null, limit: Decimal | null][] = [
    ['feeder', split.feeder, feeder],
    ['branch', split.branch, branch],
    ['total', total, totalLimit],
    ['starting', starting, figure(limits.starting)],
    ['rise', total.neg(), figure(limits.rise)],
    ['lowest volts', atLeast(lowest), lowest?.neg() ?? null],
    ['highest volts', reading.volts, highest],
    ['rating', atLeast(low), low?.neg() ?? null],
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
    breakable.length === 0 ? null : largest(breakable.map(([, value, limit]) => value!.minus(limit!)));
  return { verdict, broken, applied: applied.map(([name]) => name), total, totalLimit, excess };
};
