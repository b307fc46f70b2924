import { type BusResult, CONDUCTORS, type Job, PAIRS, type Verdict } from '../job/index.ts';
import { magnitude } from '../job/systems.ts';
import { SLOT } from '../network/index.ts';
import type { Core } from './core.ts';
import { dropAt, worstPair } from './drop.ts';
import { busPhasors } from './run-results.ts';
import { beginsOf, splitDrop } from './split.ts';
import { type Judged, verdictOf } from './verdict.ts';
import type { Volts } from './volts.ts';

const ALL_PAIRS = PAIRS.map((_, i) => i);

/** Buses that are judged as panels: those of kind `panel`, and those with a schedule. */
export const panelBuses = (job: Job): Set<string> =>
  new Set([
    ...job.buses.flatMap(({ id, kind }) => (kind === 'panel' ? [id] : [])),
    ...job.panels.map(({ bus }) => bus),
  ]);

/** The feeder limit beside the feeder part of a panel. */
export const panelJudged = (feederPercent: number, limit: number | null): Judged[] =>
  limit === null ? [] : [{ name: 'feeder', value: feederPercent, limit, unit: '%', sign: 1 }];

/** Volts of every bus in one state; panels with their feeder part in `design` and its verdict. */
export function busResults(core: Core, volts: Volts, design: Volts): BusResult[] {
  const { job, network } = core;
  const panels = panelBuses(job);
  return network.buses.ids.map((id, bus): BusResult => {
    const isPanel = panels.has(id);
    const live = CONDUCTORS.some((c) => network.nodes.at[4 * bus + SLOT[c]]! >= 0);
    if (!live) {
      const dead: BusResult = { id, volts: null, phasors: null };
      return isPanel ? { ...dead, feederPercent: null, verdict: 'unserved' } : dead;
    }
    const phasors = busPhasors(core, volts, bus);
    const magnitudes: NonNullable<BusResult['volts']> = {};
    for (const pair of ALL_PAIRS) {
      const drop = dropAt(core, volts, bus, pair);
      if (drop) magnitudes[PAIRS[pair]!] = drop.volts;
    }
    if (phasors.N) magnitudes.N = magnitude(phasors.N);
    const result: BusResult = { id, volts: magnitudes, phasors };
    return isPanel ? { ...result, ...panelVerdict(core, design, bus) } : result;
  });
}

function panelVerdict(
  core: Core,
  design: Volts,
  bus: number,
): { feederPercent: number | null; verdict: Verdict } {
  const worst = worstPair(core, design, bus, ALL_PAIRS);
  if (!worst) return { feederPercent: null, verdict: 'unserved' };
  const { feederPercent } = splitDrop(core, design, worst, bus, beginsOf(core, [bus]));
  return { feederPercent, verdict: verdictOf(panelJudged(feederPercent, core.job.limits.feeder)) };
}
