import type { LoadResult, Scenario } from '../job/index.ts';
import type { Core } from '../judge/core.ts';
import type { Credits } from '../judge/credits.ts';
import {
  type Demand,
  scenarioDemand,
  startingDemand,
  turnAmps,
  turnDemand,
  turnsOf,
} from '../judge/demand.ts';
import { solveFrom } from '../judge/operating.ts';
import { ampsOf, type Drawn, sinkCurrent } from '../judge/sink-current.ts';
import type { State } from '../judge/solve-state.ts';
import { type Volts, zeroVolts } from '../judge/volts.ts';
import { type PathSolver, pathSolver } from '../linear/index.ts';
import type { Refusal } from '../network/index.ts';

/** Loads whose figures are of one state of the network, and how it differs from the state given. */
interface Group {
  loads: number[];
  /** `null` where it is the state given. */
  change: Change | null;
}
interface Change {
  demand: () => Demand;
  /** Loads that may draw otherwise than at design demand, and what each draws in this state. */
  changed: readonly number[];
  drawn: (load: number) => Drawn;
}

/** A state that a load's figures are of; `volts` hold at the nodes that were asked for. */
export interface LoadState extends Pick<State, 'stamped' | 'volts'> {
  /** `null` where nothing follows the voltage. */
  demand: Demand | null;
}

/** Loads by the state that `scenario` takes their figures from; `results` say which turn was the worst. */
function groupsOf(core: Core, scenario: Scenario, results: readonly LoadResult[]): Group[] {
  const groups = new Map<string, Group>();
  const put = (load: number, key: string, change: () => Change | null): void => {
    const found = groups.get(key);
    if (found) found.loads.push(load);
    else groups.set(key, { loads: [load], change: change() });
  };
  for (const [load, { served, starting }] of core.loads.entries()) {
    if (!served) continue;
    if (scenario === 'starting' && starting)
      put(load, `starting ${load}`, () => ({
        demand: () => startingDemand(core, load),
        changed: [load],
        drawn: () => starting,
      }));
    else if (scenario === 'each-circuit') {
      const circuit = core.circuits.ofLoad[load]!;
      const { turn: name } = results[load]!;
      put(load, `${circuit} ${name}`, () => {
        const turn = turnsOf(core, circuit).find((each) => each.name === name)!;
        return {
          demand: () => turnDemand(core, circuit, turn),
          changed: core.circuits.list[circuit]!.loads,
          drawn: (each) => ampsOf(core.loads[each]!, turnAmps(core, each, turn)),
        };
      });
    } else put(load, '', () => null);
  }
  return [...groups.values()];
}

/**
 * Visits the loads together that share a state. Where all currents are fixed a turn is the design state and what its
 * own loads change, solved along their paths on the one factor; elsewhere each turn is solved in full. `nodesOf` says
 * at which nodes a load's volts are wanted. Returns the refusal of a state that has no solution, or of a visit.
 */
export function visitLoadStates(
  core: Core,
  design: State,
  credits: Credits | null,
  scenario: Scenario,
  results: readonly LoadResult[],
  nodesOf: (load: number) => readonly number[],
  visit: (loads: readonly number[], state: LoadState, solver: PathSolver) => Refusal | null,
): Refusal | null {
  const whole = scenario === 'everything-on' || scenario === 'light';
  const state = whole ? solveFrom(core, design, scenarioDemand(core, scenario), credits) : design;
  if ('kind' in state) return state;
  const solver = pathSolver(state.stamped.factor);
  const scratch = zeroVolts(core.network);
  const linear = isLinear(core);
  for (const { loads, change } of groupsOf(core, scenario, results)) {
    let at: LoadState | Refusal = linear ? { ...state, demand: null } : state;
    let own = solver;
    if (change && linear && change.changed.every((load) => core.job.loads[load]!.behaviour === 'current')) {
      superpose(core, state, solver, change, loads.flatMap(nodesOf), scratch);
      at = { stamped: state.stamped, volts: scratch, demand: null };
    } else if (change) {
      at = solveFrom(core, state, change.demand(), credits);
      if ('kind' in at) return at;
      own = pathSolver(at.stamped.factor);
    }
    const refused = visit(loads, at, own);
    if (refused) return refused;
  }
  return null;
}

/** Whether every current is fixed or flows through a fixed admittance, in any state. */
const isLinear = (core: Core): boolean => !core.iterates && core.job.angle === 'nominal';

/** Volts at `nodes` in a state that differs from another in the fixed currents of a few loads alone, into `out`. */
function superpose(
  core: Core,
  from: State,
  solver: PathSolver,
  { changed, drawn }: Change,
  nodes: readonly number[],
  out: Volts,
): void {
  const { unknownOf } = from.stamped.layout;
  const touched = changed.flatMap((load) => core.loads[load]!.sinks.flatMap(({ a, b }) => [a, b]));
  const unknowns = [...nodes, ...touched].map((node) => unknownOf[node]!).filter((u) => u >= 0);
  solver.reach(unknowns);
  solver.clear();
  const current = new Float64Array(2);
  const put = (load: number, amount: Drawn, sign: 1 | -1): void => {
    for (const sink of core.loads[load]!.sinks) {
      sinkCurrent(sink, amount, 'nominal', core.network, null, current);
      const a = unknownOf[sink.a]!;
      const b = unknownOf[sink.b]!;
      if (a >= 0) solver.add(a, -sign * current[0]!, -sign * current[1]!);
      if (b >= 0) solver.add(b, sign * current[0]!, sign * current[1]!);
    }
  };
  for (const load of changed) {
    put(load, ampsOf(core.loads[load]!, from.demand.amps[load]!), -1);
    put(load, drawn(load), 1);
  }
  solver.solve();
  for (const node of nodes) {
    const u = unknownOf[node]!;
    out.re[node] = from.volts.re[node]! + (u < 0 ? 0 : solver.re(u));
    out.im[node] = from.volts.im[node]! + (u < 0 ? 0 : solver.im(u));
  }
}
