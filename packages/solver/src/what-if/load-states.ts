import type { LoadResult, Scenario } from '../job/index.ts';
import type { Core } from '../judge/core.ts';
import type { Credits } from '../judge/credits.ts';
import { type Demand, scenarioDemand, startingDemand, turnDemand, turnsOf } from '../judge/demand.ts';
import { solveFrom } from '../judge/operating.ts';
import { ampsOf, type Drawn, sinkCurrent } from '../judge/sink-current.ts';
import type { State } from '../judge/solve-state.ts';
import { type Volts, zeroVolts } from '../judge/volts.ts';
import { type PathSolver, pathSolver } from '../linear/index.ts';
import type { Refusal } from '../network/index.ts';

/** Loads whose figures are of one state of the network. `demand` is `null` where that is the state given. */
interface Group {
  loads: number[];
  demand: Demand | null;
  /** Loads that may draw otherwise than at design demand. */
  changed: readonly number[];
}

/** A state that a load's figures are of; `volts` hold at the nodes that were asked for. */
export type LoadState = Pick<State, 'stamped' | 'volts' | 'demand'>;

/** Loads by the state that `scenario` takes their figures from; `results` say which turn was the worst. */
function groupsOf(core: Core, scenario: Scenario, results: readonly LoadResult[]): Group[] {
  const groups = new Map<string, Group>();
  for (const [load, { served }] of core.loads.entries()) {
    if (!served) continue;
    let key = '';
    let make = (): Omit<Group, 'loads'> => ({ demand: null, changed: [] });
    if (scenario === 'starting' && core.loads[load]!.starting) {
      key = `starting ${load}`;
      make = () => ({ demand: startingDemand(core, load), changed: [load] });
    } else if (scenario === 'each-circuit') {
      const circuit = core.circuits.ofLoad[load]!;
      const turn = turnsOf(core, circuit).find(({ name }) => name === results[load]!.turn)!;
      key = `${circuit} ${turn.name}`;
      make = () => ({
        demand: turnDemand(core, circuit, turn),
        changed: core.circuits.list[circuit]!.loads,
      });
    }
    const found = groups.get(key);
    if (found) found.loads.push(load);
    else groups.set(key, { loads: [load], ...make() });
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
  for (const { loads, demand, changed } of groupsOf(core, scenario, results)) {
    let at: LoadState | Refusal = state;
    let own = solver;
    if (demand && isLinear(core) && changed.every((load) => core.job.loads[load]!.behaviour === 'current')) {
      superpose(core, state, solver, demand, changed, loads.flatMap(nodesOf), scratch);
      at = { stamped: state.stamped, volts: scratch, demand };
    } else if (demand) {
      at = solveFrom(core, state, demand, credits);
      if ('kind' in at) return at;
      own = pathSolver(at.stamped.factor);
    }
    const refused = visit(loads, at, own);
    if (refused) return refused;
  }
  return null;
}

/** Whether every current is fixed or flows through a fixed admittance, in any state. */
export const isLinear = (core: Core): boolean => !core.iterates && core.job.angle === 'nominal';

/** Volts at `nodes` in a state that differs from another in the fixed currents of a few loads alone, into `out`. */
function superpose(
  core: Core,
  from: State,
  solver: PathSolver,
  demand: Demand,
  changed: readonly number[],
  nodes: readonly number[],
  out: Volts,
): void {
  const { unknownOf } = from.stamped.layout;
  const touched = changed.flatMap((load) => core.loads[load]!.sinks.flatMap(({ a, b }) => [a, b]));
  const unknowns = [...nodes, ...touched].map((node) => unknownOf[node]!).filter((u) => u >= 0);
  solver.reach(unknowns);
  solver.clear();
  const current = new Float64Array(2);
  const put = (load: number, drawn: Drawn, sign: 1 | -1): void => {
    for (const sink of core.loads[load]!.sinks) {
      sinkCurrent(sink, drawn, 'nominal', core.network, null, current);
      const a = unknownOf[sink.a]!;
      const b = unknownOf[sink.b]!;
      if (a >= 0) solver.add(a, -sign * current[0]!, -sign * current[1]!);
      if (b >= 0) solver.add(b, sign * current[0]!, sign * current[1]!);
    }
  };
  for (const load of changed) {
    const model = core.loads[load]!;
    put(load, ampsOf(model, from.demand.amps[load]!), -1);
    put(load, load === demand.starting ? model.starting! : ampsOf(model, demand.amps[load]!), 1);
  }
  solver.solve();
  for (const node of nodes) {
    const u = unknownOf[node]!;
    out.re[node] = from.volts.re[node]! + (u < 0 ? 0 : solver.re(u));
    out.im[node] = from.volts.im[node]! + (u < 0 ? 0 : solver.im(u));
  }
}
