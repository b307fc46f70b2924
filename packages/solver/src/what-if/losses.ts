import type { Job, Problem, Scenario } from '../job/index.ts';
import { buildCore, type Core } from '../judge/core.ts';
import { diversityCredits } from '../judge/credits.ts';
import { scenarioDemand } from '../judge/demand.ts';
import { solveDemand } from '../judge/operating.ts';
import type { State } from '../judge/solve-state.ts';
import type { Element, Refusal } from '../network/index.ts';
import { type Year, type YearOptions, yearOf } from './loss-factor.ts';

/** Watts at the peak, and what a year of them is; `null` where nothing says how. */
export interface YearlyLoss {
  lossWatts: number;
  kwhPerYear: number | null;
  /** Rounded to a hundredth, half up. */
  costPerYear: number | null;
}
/** `null` watts: open or unserved, or a run without impedance. */
export interface PartLoss extends Omit<YearlyLoss, 'lossWatts'> {
  id: string;
  lossWatts: number | null;
}

export interface Losses {
  kind: 'losses';
  scenario: Scenario;
  lossFactor: number | null;
  lossFactorFrom: string | null;
  hoursPerYear: number;
  /** As stated, in plain decimals. */
  pricePerKwh: string | null;
  /** In the order of the job. */
  runs: PartLoss[];
  /** Copper losses alone. */
  transformers: PartLoss[];
  /** Runs and transformers; its money is rounded from the whole, not added up from rounded parts. */
  total: YearlyLoss;
  /** In the impedance of the sources themselves: ahead of the job, and in no total. */
  sourceWatts: number;
  note: string;
}

/** Options that are no such numbers, by name. */
export interface LossesRefused {
  kind: 'refused';
  problems: Problem[];
}

const NOTE =
  'copper losses at the loads of the scenario, taken as the peak of the year; transformers lose more at no load, which is not counted';

/**
 * What runs and transformers lose: Σ I²·r in watts in one scenario (`each-circuit` and `starting`: at design demand,
 * as the runs of a solution are), kWh a year = W/1000 · loss factor · hours, and money = kWh · price.
 * Refused, as values: options out of bounds, by name; what the network refuses, by place.
 */
export function losses(
  job: Job,
  { scenario = 'design', ...options }: { scenario?: Scenario } & YearOptions = {},
): Losses | LossesRefused | Refusal {
  const checked = yearOf(options);
  if (!checked.ok) return { kind: 'refused', problems: checked.problems };
  const { year } = checked;
  const core = buildCore(job);
  if ('kind' in core) return core;
  const credits = diversityCredits(core);
  if (credits && 'kind' in credits) return credits;
  const state = solveDemand(core, scenarioDemand(core, scenario), credits);
  if ('kind' in state) return state;

  const watts = wattsOf(core, state);
  const part = (id: string, lossWatts: number | null): PartLoss => ({
    id,
    ...(lossWatts === null ? { lossWatts, kwhPerYear: null, costPerYear: null } : yearly(lossWatts, year)),
  });
  const runs = job.runs.map(({ id }, i) => part(id, watts.run[i]!));
  const transformers = job.transformers.map(({ id }, i) => part(id, watts.winding[i]!));
  const sum = [...watts.run, ...watts.winding].reduce<number>((all, each) => all + (each ?? 0), 0);
  return {
    kind: 'losses',
    scenario,
    lossFactor: year.lossFactor,
    lossFactorFrom: year.lossFactorFrom,
    hoursPerYear: year.hoursPerYear,
    pricePerKwh: year.pricePerKwh?.toFixed() ?? null,
    runs,
    transformers,
    total: yearly(sum, year),
    sourceWatts: watts.source.reduce<number>((all, each) => all + (each ?? 0), 0),
    note: NOTE,
  };
}

const yearly = (lossWatts: number, { lossFactor, hoursPerYear, pricePerKwh }: Year): YearlyLoss => {
  const kwhPerYear = lossFactor === null ? null : (lossWatts / 1000) * lossFactor * hoursPerYear;
  const cost = kwhPerYear === null ? null : pricePerKwh?.times(kwhPerYear);
  return { lossWatts, kwhPerYear, costPerYear: cost?.toDecimalPlaces(2).toNumber() ?? null };
};

type Counted = 'run' | 'winding' | 'source';

/** Σ I²·r of each run, transformer and source; `null` where it has no live element. */
function wattsOf(core: Core, { stamped, volts }: State): Record<Counted, (number | null)[]> {
  const { job, network } = core;
  const { referenceRe, referenceIm } = network.nodes;
  const watts: Record<Counted, (number | null)[]> = {
    run: job.runs.map(() => null),
    winding: job.transformers.map(() => null),
    source: job.sources.map(() => null),
  };
  const across = (of: Float64Array, { nodes, u }: Element): number =>
    nodes.reduce((sum, node, k) => sum + u[k]! * of[node]!, 0);
  for (const e of stamped.elements) {
    if (e.kind === 'centroid') continue;
    const re = across(referenceRe, e) - e.emfRe + across(volts.re, e);
    const im = across(referenceIm, e) - e.emfIm + across(volts.im, e);
    const square = (re * re + im * im) / (e.zRe * e.zRe + e.zIm * e.zIm);
    watts[e.kind][e.owner] = (watts[e.kind][e.owner] ?? 0) + square * e.zRe;
  }
  return watts;
}
