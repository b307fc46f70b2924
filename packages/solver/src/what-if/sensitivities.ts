import { type Job, type LoadResult, PAIRS, type Pair, type Scenario } from '../job/index.ts';
import { magnitude } from '../job/systems.ts';
import { buildCore, type Core } from '../judge/core.ts';
import { diversityCredits } from '../judge/credits.ts';
import { designDemand } from '../judge/demand.ts';
import { solveJob } from '../judge/index.ts';
import { splitLoad } from '../judge/load-split.ts';
import { solveDemand } from '../judge/operating.ts';
import { runElements } from '../judge/run-results.ts';
import type { Volts } from '../judge/volts.ts';
import type { PathSolver } from '../linear/index.ts';
import { type Element, PAIR_SLOTS, type Refusal, refusal } from '../network/index.ts';
import { type Adjoint, fixedAdjoint, followingAdjoint, type Gauge } from './adjoint.ts';
import { type LoadState, visitLoadStates } from './load-states.ts';
import { relevantRuns } from './relevant-runs.ts';
import { type Following, followingOf, voltsThrough } from './slopes.ts';

export interface RunSensitivity {
  run: string;
  /**
   * Change of the load's dropPercent, in percent of nominal volts, when the run gets 1 % longer, all its conductors: to
   * first order. Negative where the load then drops less.
   */
  percentPerPercent: number;
}

export interface LoadSensitivity {
  id: string;
  /** As in the solution; `null` for an unserved load, which has no runs. */
  dropPercent: number | null;
  turn: LoadResult['turn'];
  /** The pair that the drop is of. */
  pair: Pair | null;
  /** Largest first; runs that do not count are left out. */
  runs: RunSensitivity[];
}

export interface Sensitivities {
  kind: 'sensitivities';
  scenario: Scenario;
  /** In the order of the job. */
  loads: LoadSensitivity[];
}

/** Below this share of the load's largest a run does not count. */
const COUNTS = 1e-9;

/**
 * How much the drop at every load hangs on every run: d(dropPercent)/d(ln z) ÷ 100, exact, by the adjoint of the node
 * equations. With δV = −Z·(∂Y/∂p)·V and a symmetric Y, the drop of a load changes by Re Σ i·(ν_from − ν_to) over the
 * conductors of a run, ν being one solve for the load on the factor that is there already: in a radial job with fixed
 * currents the time of its path. Loads of constant power or at local angle and resistance at operating temperature are
 * differentiated too, by the transposed Jacobian, in the time of a few solves of the whole job for each load. A load's
 * pair, end and turn are held: where two of them tie, the change is that of one side. Credits of diversity are held.
 * Refused: what `solveJob` refuses; a load so near to its collapse that it has no first-order change.
 */
export function sensitivities(job: Job, { scenario }: { scenario: Scenario }): Sensitivities | Refusal {
  const outcome = solveJob(job, { scenario, headroom: false });
  if (outcome.kind !== 'solved') return outcome;
  const core = buildCore(job);
  if ('kind' in core) return core;
  const credits = diversityCredits(core);
  if (credits && 'kind' in credits) return credits;
  const design = solveDemand(core, designDemand(core), credits);
  if ('kind' in design) return design;

  const results = outcome.solution.loads;
  let elements = runElements(core, core.network.elements);
  const runsOf = relevantRuns(core);
  const nodesOf = (load: number): number[] => [
    ...core.loads[load]!.sinks.flatMap(({ a, b }) => [a, b]),
    ...runsOf(load).flatMap((run) => elements[run]!.flatMap(({ nodes }) => nodes)),
  ];
  const loads = results.map(
    ({ id, dropPercent, turn }): LoadSensitivity => ({ id, dropPercent, turn, pair: null, runs: [] }),
  );
  let known: readonly Element[] | null = null;
  const visit = (group: readonly number[], state: LoadState, solver: PathSolver): Refusal | null => {
    if (known !== state.stamped.elements) elements = runElements(core, state.stamped.elements);
    known = state.stamped.elements;
    const following = followingOf(core, state);
    if ('kind' in following) return following;
    for (const load of group) {
      const own = loads[load]!;
      const { pair, gauge } = gaugeOf(core, state.volts, load);
      const adjoint =
        following.list.length === 0
          ? fixedAdjoint(state, solver, gauge, nodesOf(load))
          : followingAdjoint(state, following.list, gauge);
      if (!adjoint)
        return refusal(`load ${own.id}`, 'stands so near to its collapse that no first-order change is left');
      own.pair = PAIRS[pair]!;
      own.runs = counted(
        runsOf(load).map((run) => ({
          run: job.runs[run]!.id,
          percentPerPercent: changeBy(core, elements[run]!, state, following, adjoint) / 100,
        })),
      );
    }
    return null;
  };
  const refused = visitLoadStates(core, design, credits, scenario, results, nodesOf, visit);
  return refused ?? { kind: 'sensitivities', scenario, loads };
}

/** dropPercent = 100·(|E| − |V|)/nominal changes by Re(g·δV), g = −100·conj(V)/(|V|·nominal). */
function gaugeOf(core: Core, volts: Volts, load: number): { pair: number; gauge: Gauge } {
  const { nodes, buses } = core.network;
  const { bus, pair } = splitLoad(core, volts, load, []);
  const [a, b] = PAIR_SLOTS[pair]!.map((slot) => nodes.at[4 * bus + slot]!) as [number, number];
  const re = nodes.referenceRe[a]! - nodes.referenceRe[b]! + (volts.re[a]! - volts.re[b]!);
  const im = nodes.referenceIm[a]! - nodes.referenceIm[b]! + (volts.im[a]! - volts.im[b]!);
  const scale = -100 / (magnitude([re, im]) * buses.system[bus]!.pairs[pair]!.nominal);
  return { pair, gauge: { a, b, g: [scale * re, -scale * im] } };
}

/** Change of the gauged quantity by d ln z of a run: Re Σ S·v·(ν_from − ν_to) over its conductors; S·v is mostly i. */
function changeBy(
  core: Core,
  elements: readonly Element[],
  state: LoadState,
  following: Following,
  adjoint: Adjoint,
): number {
  let change = 0;
  for (const e of elements) {
    const [vRe, vIm] = voltsThrough(core, state, e);
    const [p, q, r, s] = following.ofElement(e);
    const [from, to] = [adjoint(e.nodes[0]!), adjoint(e.nodes[1]!)];
    change += (p * vRe + r * vIm) * (from[0] - to[0]) - (q * vRe + s * vIm) * (from[1] - to[1]);
  }
  return change;
}

function counted(runs: RunSensitivity[]): RunSensitivity[] {
  const sizeOf = ({ percentPerPercent }: RunSensitivity) => Math.abs(percentPerPercent);
  const largest = runs.reduce((most, each) => Math.max(most, sizeOf(each)), 0);
  return runs
    .filter((each) => sizeOf(each) > COUNTS * largest)
    .sort((one, other) => sizeOf(other) - sizeOf(one));
}
