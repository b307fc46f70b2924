import type { Scenario } from '../job/index.ts';
import type { Sink } from '../network/index.ts';
import type { Core } from './core.ts';
import type { Drawn } from './sink-current.ts';

/** A current through given paths, in amperes of one path. */
export interface Extra {
  sinks: readonly Sink[];
  drawn: Drawn;
}

/** What every load draws in one state of the network. */
export interface Demand {
  /** Amperes of one path of each load, by load. */
  amps: Float64Array;
  /** The load that starts, −1 where none does. */
  starting: number;
  /** Credits of diversity count. */
  credits: boolean;
  /** A further current at nominal angle beside a load. */
  extra: Extra | null;
}

/** `design` with one load starting. */
export const startingDemand = (core: Core, load: number): Demand => ({
  ...designDemand(core),
  starting: load,
});

export const designDemand = (core: Core): Demand => ({
  amps: Float64Array.from(core.loads, (load) => load.design),
  starting: -1,
  credits: true,
  extra: null,
});

/** Demand of a scenario as a whole; the turns of `each-circuit` and `starting` are changes of `design`. */
export function scenarioDemand(core: Core, scenario: Scenario): Demand {
  if (scenario === 'everything-on')
    return {
      ...designDemand(core),
      amps: Float64Array.from(core.loads, (l) => (l.generates ? 0 : l.full)),
      credits: false,
    };
  if (scenario === 'light')
    return { ...designDemand(core), amps: Float64Array.from(core.loads, (l) => l.minimum), credits: false };
  return designDemand(core);
}

export type TurnName = 'L1' | 'L2' | 'L3' | 'all';
/** One turn of a circuit: which of its loads are on, at 1; the others of it are at 0. */
export interface Turn {
  name: TurnName;
  on: (load: number) => boolean;
}

/**
 * Turns of a circuit: all its loads at 1; and where it has line-to-neutral loads on more than one line, one turn for
 * each such line with the line-to-neutral loads of the others at 0.
 */
export function turnsOf(core: Core, circuit: number): Turn[] {
  const loads = core.circuits.list[circuit]!.loads;
  const lineOf = (i: number): string | null => {
    const { terminals } = core.job.loads[i]!;
    return terminals.endsWith('-N') ? terminals.slice(0, 2) : null;
  };
  const lines = [...new Set(loads.map(lineOf))].filter((line) => line !== null).sort();
  const all: Turn = { name: 'all', on: () => true };
  if (lines.length < 2) return [all];
  return [
    all,
    ...lines.map((line) => ({
      name: line as TurnName,
      on: (i: number) => (lineOf(i) ?? line) === line,
    })),
  ];
}

/** Amperes of a circuit's load in a turn: generation counts for nothing. */
export const turnAmps = (core: Core, load: number, turn: Turn): number =>
  turn.on(load) && !core.loads[load]!.generates ? core.loads[load]!.full : 0;

/** `design` with one circuit in one of its turns. */
export function turnDemand(core: Core, circuit: number, turn: Turn): Demand {
  const demand = designDemand(core);
  for (const i of core.circuits.list[circuit]!.loads) demand.amps[i] = turnAmps(core, i, turn);
  return demand;
}
