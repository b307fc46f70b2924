import { type Job, NEUTRAL_CAUTION, type Pair, type Terminals } from '../job/index.ts';
import { magnitude } from '../job/systems.ts';
import type { Core } from '../judge/core.ts';
import { designDemand } from '../judge/demand.ts';
import { solveDemand } from '../judge/operating.ts';
import type { Volts } from '../judge/volts.ts';
import { type Refusal, refusal, type Sink } from '../network/index.ts';
import { type Floating, floatingFrom } from './floating.ts';
import { openNeutral } from './open-neutral.ts';

/** Lowest and highest volts at a load, percent of nominal. */
export interface VoltBounds {
  lowPercent: number;
  highPercent: number;
}
/** ± 10 % of nominal volts: common practice, not a clause. */
const COMMON_BOUNDS: VoltBounds = { lowPercent: 90, highPercent: 110 };

/** From worst to best: what is over burns at once. */
const ORDER = ['over', 'under', 'within', 'undetermined', 'unserved'] as const;
export type LostNeutralStatus = (typeof ORDER)[number];

export interface LostNeutralLoad {
  id: string;
  terminals: Terminals;
  /** The pair that the figures are of: of a three-phase load the one farthest out. */
  pair: Pair | null;
  nominalVolts: number | null;
  withNeutralVolts: number | null;
  withoutNeutralVolts: number | null;
  /** Without the neutral, percent of nominal; `null` where nothing holds the voltage or nothing feeds the load. */
  percent: number | null;
  status: LostNeutralStatus;
}

export interface LostNeutral {
  kind: 'lost-neutral';
  run: string;
  caution: string;
  bounds: VoltBounds & { basis: 'common practice' | 'as given' };
  /** Another closed path of neutral leads to the far bus: nothing is cut off. */
  otherPath: boolean;
  /** The neutral at the far bus against the earthed neutral of its system; `null` where nothing holds it. */
  neutral: { bus: string; withNeutralVolts: number; withoutNeutralVolts: number | null };
  note: string | null;
  /** Overvoltage before undervoltage, the farthest from nominal first; undetermined and unserved ones last. */
  loads: LostNeutralLoad[];
}

const NOT_HELD =
  'no load ties the far neutral to a line: nothing holds its voltage, and that of whatever is switched on there is not determined';

/**
 * What every load would see if the neutral of one run were open at its end towards the source: every load as the
 * constant impedance that draws its design-demand amount at nominal volts, diversity and generation absent, one solve
 * with the neutral and one without it (the same node equations; for two unequal loads a voltage divider, for three
 * Millman's theorem). On paper only. Volts are magnitudes, percents of nominal volts between the terminals.
 * Refused, as a value that names the place: an unknown run, one without a neutral or out of use, bounds that are no
 * range, a network that cannot be solved.
 */
export function lostNeutral(
  job: Job,
  { run, bounds = null }: { run: string; bounds?: VoltBounds | null },
): LostNeutral | Refusal {
  const { lowPercent, highPercent } = bounds ?? COMMON_BOUNDS;
  if (!(lowPercent >= 0 && lowPercent < highPercent && highPercent < Number.POSITIVE_INFINITY))
    return refusal('bounds', `must be 0 ≤ low < high in percent; are ${lowPercent} and ${highPercent}`);
  const parts = openNeutral(job, run);
  if ('kind' in parts) return parts;
  const { intact, farBus, otherPath } = parts;
  const demand = designDemand(intact);
  const floating = otherPath ? null : floatingFrom(parts.opened, parts.farOpened, demand);
  if (floating && 'kind' in floating) return floating;
  const opened = floating?.core ?? parts.opened;
  const before = solveDemand(intact, demand, null);
  if ('kind' in before) return before;
  const after = solveDemand(opened, demand, null);
  if ('kind' in after) return after;

  const loads = job.loads.map((_, i) =>
    loadWithout(i, { core: intact, volts: before.volts }, { core: opened, volts: after.volts }, floating, {
      lowPercent,
      highPercent,
    }),
  );
  loads.sort(
    (a, b) =>
      ORDER.indexOf(a.status) - ORDER.indexOf(b.status) ||
      Math.abs((b.percent ?? 0) - 100) - Math.abs((a.percent ?? 0) - 100),
  );
  return {
    kind: 'lost-neutral',
    run,
    caution: NEUTRAL_CAUTION,
    bounds: { lowPercent, highPercent, basis: bounds ? 'as given' : 'common practice' },
    otherPath,
    neutral: {
      bus: farBus,
      withNeutralVolts: voltsAt(intact, before.volts, parts.farIntact),
      withoutNeutralVolts: floating?.at(parts.farOpened)
        ? null
        : voltsAt(opened, after.volts, parts.farOpened),
    },
    note: floating ? NOT_HELD : null,
    loads,
  };
}

interface Solved {
  core: Core;
  volts: Volts;
}

const THREE_PHASE_PAIRS: readonly Pair[] = ['L1-L2', 'L2-L3', 'L1-L3'];

function loadWithout(
  i: number,
  intact: Solved,
  opened: Solved,
  floating: Floating | null,
  { lowPercent, highPercent }: VoltBounds,
): LostNeutralLoad {
  const { id, terminals } = intact.core.job.loads[i]!;
  const own = opened.core.loads[i]!.sinks;
  const nothing = { nominalVolts: null, withNeutralVolts: null, withoutNeutralVolts: null, percent: null };
  if (own.length === 0) return { id, terminals, pair: null, ...nothing, status: 'unserved' };
  let worst: LostNeutralLoad | null = null;
  for (const [k, sink] of own.entries()) {
    const pair = terminals === 'three-phase' ? THREE_PHASE_PAIRS[k % 3]! : terminals;
    const withNeutralVolts = voltsAcross(intact, intact.core.loads[i]!.sinks[k]!);
    const figures = { id, terminals, pair, nominalVolts: sink.nominal, withNeutralVolts };
    if (floating?.between(sink.a, sink.b))
      return { ...figures, withoutNeutralVolts: null, percent: null, status: 'undetermined' };
    const withoutNeutralVolts = voltsAcross(opened, sink);
    const percent = (100 * withoutNeutralVolts) / sink.nominal;
    const status = percent > highPercent ? 'over' : percent < lowPercent ? 'under' : 'within';
    if (worst === null || Math.abs(percent - 100) > Math.abs(worst.percent! - 100))
      worst = { ...figures, withoutNeutralVolts, percent, status };
  }
  return worst!;
}

function voltsAcross({ core, volts }: Solved, { a, b }: Sink): number {
  const { referenceRe, referenceIm } = core.network.nodes;
  const re = referenceRe[a]! - referenceRe[b]! + (volts.re[a]! - volts.re[b]!);
  const im = referenceIm[a]! - referenceIm[b]! + (volts.im[a]! - volts.im[b]!);
  return magnitude([re, im]);
}

function voltsAt({ network }: Core, volts: Volts, node: number): number {
  const { referenceRe, referenceIm } = network.nodes;
  return magnitude([referenceRe[node]! + volts.re[node]!, referenceIm[node]! + volts.im[node]!]);
}
