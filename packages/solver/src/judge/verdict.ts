import type { Limits, Verdict } from '../job/index.ts';
import type { LoadLimits } from './limits.ts';
import type { Split } from './split.ts';

/** One limit beside what is judged by it: over where `value` is beyond `limit` in the direction of `sign`. */
export interface Judged {
  name: 'feeder' | 'branch' | 'total' | 'starting' | 'rise' | 'lowest volts' | 'highest volts' | 'rating';
  value: number;
  limit: number;
  unit: '%' | 'V';
  /** 1: the value must not be above the limit; −1: not below. */
  sign: 1 | -1;
}

/** Limits are compared on unrounded values, at this share of the limit. */
const EQUAL = 1e-9;

/** What counts of a split, against `total`. */
export function totalPercent(split: Split, limits: Limits): number {
  let total = split.feederPercent + split.branchPercent;
  if (limits.includeService) total += split.servicePercent;
  if (limits.includeTransformer) total += split.transformerPercent;
  if (limits.includeSource) total += split.sourcePercent;
  return total;
}

export interface Terminals {
  split: Split;
  totalPercent: number;
  /** The total limit with what a long path adds. */
  totalLimit: number | null;
  startingPercent: number | null;
  ratedVolts: number | null;
}

/** Every limit that holds for a load beside its value, in the order of `limits`. */
export function judge(at: Terminals, limits: LoadLimits): Judged[] {
  const { split } = at;
  const list: Judged[] = [];
  const put = (
    name: Judged['name'],
    value: number | null,
    limit: number | null,
    unit: Judged['unit'],
    sign: 1 | -1,
  ) => {
    if (value !== null && limit !== null) list.push({ name, value, limit, unit, sign });
  };
  put('feeder', split.feederPercent, limits.feeder, '%', 1);
  put('branch', split.branchPercent, limits.branch, '%', 1);
  put('total', at.totalPercent, at.totalLimit, '%', 1);
  put('starting', at.startingPercent, limits.starting, '%', 1);
  put('rise', -at.totalPercent, limits.rise, '%', 1);
  put('lowest volts', split.volts, limits.lowestVolts, 'V', -1);
  put('highest volts', split.volts, limits.highestVolts, 'V', 1);
  const share = at.ratedVolts === null ? null : (100 * split.volts) / at.ratedVolts;
  put('rating', share, limits.ratingLow, '%', -1);
  put('rating', share, limits.ratingHigh, '%', 1);
  return list;
}

/** How far beyond its limit, in the unit of the limit; ≤ 0 within. */
export const beyondLimit = ({ value, limit, sign }: Judged): number => sign * (value - limit);
export const trips = (judged: Judged): boolean => beyondLimit(judged) > EQUAL * Math.abs(judged.limit);

export function verdictOf(list: readonly Judged[]): Verdict {
  if (list.length === 0) return 'unjudged';
  const tripped = list.filter(trips);
  if (tripped.length === 0) return 'within';
  return tripped.every((j) => j.name === 'rise') ? 'rise' : 'over';
}

/** Verdicts from worst to best. */
export const VERDICT_ORDER: readonly Verdict[] = ['over', 'rise', 'within', 'unjudged', 'unserved'];

/** Digits that tell a value from its limit: two, and more where two would make them look alike. */
const shown = (value: number, limit: number): string => {
  for (let digits = 2; digits < 12; digits++) {
    const text = value.toFixed(digits);
    if (Number(text) !== limit) return text;
  }
  return String(value);
};

/** `branch 4.70 % > 3 %`: in words, for each limit that is tripped, in the order of `limits`. */
export const reasonsOf = (list: readonly Judged[]): string[] =>
  list
    .filter(trips)
    .map(
      (j) => `${j.name} ${shown(j.value, j.limit)} ${j.unit} ${j.sign > 0 ? '>' : '<'} ${j.limit} ${j.unit}`,
    );
