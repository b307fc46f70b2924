import type { Element, Refusal, Sink } from '../network/index.ts';
import type { Core } from './core.ts';
import type { Credits } from './credits.ts';
import { type Demand, type Extra, startingDemand, type Turn, turnAmps, turnDemand } from './demand.ts';
import { type Change, LocalTurns, MOST_ADMITTANCES } from './local-turn.ts';
import { solveFrom } from './operating.ts';
import { ampsOf } from './sink-current.ts';
import type { State } from './solve-state.ts';
import { type Volts, zeroVolts } from './volts.ts';

/** Volts of one turn, and of the same turn with more current; good at the circuit's nodes until the next circuit. */
export interface SolvedTurn {
  volts: Volts;
  /** The admittances that it was solved on: at operating temperatures they are its own. */
  elements: readonly Element[];
  /**
   * The turn with `amps` of one path more through the given paths, at the load's power factor, good at `nodes`; `null`
   * unserved.
   */
  with: (load: number, sinks: readonly Sink[], amps: number, nodes: readonly number[]) => Volts | null;
}

export interface TurnSolver {
  /** Begins a circuit: the nodes whose volts its figures need. */
  open: (circuit: number, nodes: Iterable<number>) => void;
  turn: (circuit: number, turn: Turn) => SolvedTurn | Refusal;
  starting: (load: number) => Volts | Refusal;
}

/** Turns as changes of `design`: by superposition where every current is fixed, else each solved in full. */
export function turnSolver(core: Core, design: State, credits: Credits | null): TurnSolver {
  const full = fullTurns(core, design, credits);
  return core.iterates || core.job.angle === 'local' ? full : linearTurns(core, design, full);
}

const extraOf = (core: Core, load: number, sinks: readonly Sink[], amps: number): Extra => ({
  sinks,
  drawn: ampsOf(core.loads[load]!, amps),
});

function fullTurns(core: Core, design: State, credits: Credits | null): TurnSolver {
  const solved = (demand: Demand) => solveFrom(core, design, demand, credits);
  return {
    open: () => {},
    turn: (circuit, turn) => {
      const demand = turnDemand(core, circuit, turn);
      const state = solved(demand);
      if ('kind' in state) return state;
      return {
        volts: state.volts,
        elements: state.stamped.elements,
        with: (load, sinks, amps) => {
          const more = solved({ ...demand, extra: extraOf(core, load, sinks, amps) });
          return 'kind' in more ? null : more.volts;
        },
      };
    },
    starting: (load) => {
      const state = solved(startingDemand(core, load));
      return 'kind' in state ? state : state.volts;
    },
  };
}

function linearTurns(core: Core, design: State, full: TurnSolver): TurnSolver {
  const { job, loads, network } = core;
  const local = new LocalTurns(core, design);
  /** Reaches a few nodes of one load at a time. */
  const narrow = new LocalTurns(core, design);
  // Volts are lent out circuit by circuit: only the watched nodes of them are ever read.
  const pool: Volts[] = [];
  let lent = 0;
  const lend = (): Volts => {
    pool[lent] ??= zeroVolts(network);
    return pool[lent++]!;
  };
  const admittances = (changes: readonly Change[]) =>
    changes.reduce((sum, { load, stamped }) => sum + (stamped ? loads[load]!.sinks.length : 0), 0);
  const solve = (changes: readonly Change[], extra: Extra | null, out: Volts): boolean =>
    admittances(changes) <= MOST_ADMITTANCES && local.solve(changes, extra, out);
  const designDrawn = (load: number) => ampsOf(loads[load]!, design.demand.amps[load]!);
  const isImpedance = (load: number) => job.loads[load]!.behaviour === 'impedance';

  return {
    open: (_, nodes) => {
      lent = 0;
      local.watch(nodes);
    },
    turn: (circuit, turn) => {
      const changes = core.circuits.list[circuit]!.loads.map(
        (load): Change => ({
          load,
          before: designDrawn(load),
          after: ampsOf(loads[load]!, turnAmps(core, load, turn)),
          stamped: isImpedance(load),
        }),
      );
      const volts = lend();
      if (!solve(changes, null, volts)) return full.turn(circuit, turn);
      const unit = lend();
      const sum = lend();
      let unitOf: readonly Sink[] | null = null;
      const sameMatrix = !changes.some(
        ({ stamped, before, after }) => stamped && before?.amps !== after?.amps,
      );
      /** What one ampere more through `sinks` changes, into `unit`. */
      const respond = (load: number, sinks: readonly Sink[], nodes: readonly number[]): boolean => {
        const extra = extraOf(core, load, sinks, 1);
        if (sameMatrix) {
          narrow.watch([...nodes, ...sinks.flatMap(({ a, b }) => [a, b])]);
          narrow.respond(extra, unit);
          return true;
        }
        if (!solve(changes, extra, unit)) return false;
        for (const node of nodes) {
          unit.re[node]! -= volts.re[node]!;
          unit.im[node]! -= volts.im[node]!;
        }
        return true;
      };
      return {
        volts,
        elements: design.stamped.elements,
        with: (load, sinks, amps, nodes) => {
          if (unitOf !== sinks) {
            if (!respond(load, sinks, nodes)) return null;
            unitOf = sinks;
          }
          for (const node of nodes) {
            sum.re[node] = volts.re[node]! + amps * unit.re[node]!;
            sum.im[node] = volts.im[node]! + amps * unit.im[node]!;
          }
          return sum;
        },
      };
    },
    starting: (load) => {
      const change: Change = {
        load,
        before: designDrawn(load),
        after: loads[load]!.starting,
        stamped: isImpedance(load),
        afterCurrent: true,
      };
      const out = lend();
      return solve([change], null, out) ? out : full.starting(load);
    },
  };
}
