import type { Limits } from '@farlug/solver/job';
import type { JobRows, LimitKind, Row } from '../rows/index.ts';
import { decimalOf } from './quantity.ts';

type LimitRow = Row<'limit'>;
const PER_CLASS = ['feeder', 'branch', 'total'] as const;

type Header = Pick<
  Row<'job'>,
  'limitBasis' | 'limitForce' | 'includeService' | 'includeTransformer' | 'includeSource' | 'longRun'
>;

/** The limits of a job as the job file has them. A limit at one voltage wins over one at every voltage. */
export const limitsFromRows = (rows: JobRows): Limits =>
  limitsOf([...rows.limit.values()], [...rows.job.values()][0]!);

export function limitsOf(limits: readonly Omit<LimitRow, 'id'>[], header: Header): Limits {
  const value = (kind: LimitKind, ofClass: LimitRow['class'] = null): number | null => {
    const row = limits.find((one) => one.kind === kind && one.class === ofClass && one.atVolts === null);
    return row ? Number(row.value) : null;
  };
  const volts = (kind: 'lowest-volts' | 'highest-volts'): Limits['lowestVolts'] => {
    const at = limits.filter((row) => row.kind === kind && row.atVolts !== null);
    if (at.length === 0) return value(kind);
    const entries = at.map((row): [string, number] => [decimalOf(Number(row.atVolts)), Number(row.value)]);
    return Object.fromEntries(entries.sort(([a], [b]) => Number(a) - Number(b)));
  };
  const byClass: Limits['byClass'] = {};
  for (const row of limits) {
    if (row.class === null || byClass[row.class]) continue;
    const [feeder, branch, total] = PER_CLASS.map((kind) => value(kind, row.class));
    byClass[row.class] = { feeder: feeder!, branch: branch!, total: total! };
  }
  const low = value('rating-low');
  const high = value('rating-high');
  return {
    feeder: value('feeder'),
    branch: value('branch'),
    total: value('total'),
    includeService: header.includeService,
    includeTransformer: header.includeTransformer,
    includeSource: header.includeSource,
    longRun: header.longRun,
    byClass,
    starting: value('starting'),
    rise: value('rise'),
    lowestVolts: volts('lowest-volts'),
    highestVolts: volts('highest-volts'),
    rating: low === null && high === null ? null : { low, high },
    basis: header.limitBasis,
    force: header.limitForce,
  };
}

export function limitRowsOf(limits: Limits, makeId: () => string): LimitRow[] {
  const found: LimitRow[] = [];
  const add = (kind: LimitKind, value: number | null | undefined, more: Partial<LimitRow> = {}) => {
    if (value !== null && value !== undefined)
      found.push({ id: makeId(), class: null, kind, atVolts: null, value: decimalOf(value), ...more });
  };
  for (const kind of PER_CLASS) add(kind, limits[kind]);
  add('starting', limits.starting);
  add('rise', limits.rise);
  add('rating-low', limits.rating?.low);
  add('rating-high', limits.rating?.high);
  for (const [kind, value] of [
    ['lowest-volts', limits.lowestVolts],
    ['highest-volts', limits.highestVolts],
  ] as const) {
    if (typeof value === 'number') add(kind, value);
    else
      for (const [at, volts] of Object.entries(value ?? {}))
        if (Number.isFinite(Number(at))) add(kind, volts, { atVolts: decimalOf(Number(at)) });
  }
  for (const [ofClass, own] of Object.entries(limits.byClass))
    for (const kind of PER_CLASS) add(kind, own?.[kind], { class: ofClass as LimitRow['class'] });
  return found;
}
