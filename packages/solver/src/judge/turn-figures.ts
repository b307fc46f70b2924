import type { Job, LoadResult, Phasor } from '../job/index.ts';
import type { Refusal, Sink } from '../network/index.ts';
import type { Core } from './core.ts';
import { type TurnName, turnsOf } from './demand.ts';
import { pointsAway, SAME_PERCENT } from './drop.ts';
import { excessOf, largestBefore } from './headroom.ts';
import { startingIsJudged } from './limits.ts';
import type { Judge, LoadFigures } from './load-figures.ts';
import type { State } from './solve-state.ts';
import { theveninAt } from './thevenin.ts';
import type { SolvedTurn, TurnSolver } from './turn-solver.ts';
import { verdictOf } from './verdict.ts';

/** What `each-circuit` and `starting` say of one load; `null` for an unserved one. */
export interface TurnFigures {
  each: LoadFigures;
  turn: LoadResult['turn'];
  /** Figures while it starts. */
  starting: LoadFigures | null;
  startingPercent: number | null;
  headroomAmps: number | null;
  thevenin: Phasor | null;
}

/** What is found beside verdicts, and for which loads: a comparison of sizes needs less than a whole solution. */
export interface Wanted {
  /** Headroom and driving-point impedances. */
  headroom: boolean;
  /** Loads by index; the others come back as `unjudged` and without figures. `null`: all. */
  loads: ReadonlySet<number> | null;
  /** A job that differs in the size or length of this run alone: its network is taken over. */
  like?: { job: Job; run: number };
}

const SQRT3 = Math.sqrt(3);

/** Every turn of every circuit and every start. Refused: one that cannot be served, naming the circuit. */
export function turnFigures(
  core: Core,
  design: State,
  judge: Judge,
  solver: TurnSolver,
  wanted: Wanted,
): (TurnFigures | null)[] | Refusal {
  const found: (TurnFigures | null)[] = core.loads.map(() => null);
  const thevenin = theveninAt(core, design);
  for (const [circuit, { loads }] of core.circuits.list.entries()) {
    const served = loads.filter((load) => core.loads[load]!.served && (wanted.loads?.has(load) ?? true));
    if (served.length === 0) continue;
    solver.open(circuit, judge.nodesOf(circuit));
    const starts = new Map<number, Start>();
    for (const load of served) {
      if (!core.loads[load]!.starting) continue;
      const start = startOf(core, judge, solver, load);
      if ('kind' in start) return start;
      starts.set(load, start);
    }
    const turns: { name: TurnName; on: (load: number) => boolean; solved: SolvedTurn }[] = [];
    for (const turn of turnsOf(core, circuit)) {
      const solved = solver.turn(circuit, turn);
      if ('kind' in solved) {
        const name = core.job.loads[served[0]!]!.id;
        return { ...solved, reason: `${solved.reason} (with the circuit of load ${name} full)` };
      }
      turns.push({ ...turn, solved });
    }
    for (const load of served) {
      const start = starts.get(load) ?? null;
      const judgedStart = startingIsJudged(core.job) ? (start?.percent ?? null) : null;
      const on = turns
        .filter((turn) => turn.on(load))
        .map(({ name, solved }) => ({
          name,
          solved,
          figures: judge.figures(solved.volts, load, judgedStart),
        }));
      const worst = worstOf(on, ({ figures }) => figures);
      found[load] = {
        each: worst.figures,
        turn: worst.name,
        starting: start?.figures ?? null,
        startingPercent: start?.percent ?? null,
        headroomAmps: wanted.headroom ? headroom(core, judge, load, on) : null,
        thevenin: wanted.headroom ? thevenin(load, worst.figures.split.bus, worst.figures.split.pair) : null,
      };
    }
  }
  return found;
}

interface Start {
  figures: LoadFigures;
  percent: number;
}

function startOf(core: Core, judge: Judge, solver: TurnSolver, load: number): Start | Refusal {
  const volts = solver.starting(load);
  if ('kind' in volts)
    return { ...volts, reason: `${volts.reason} (while load ${core.job.loads[load]!.id} starts)` };
  const { split } = judge.figures(volts, load, null);
  const { nominal } = core.network.buses.system[split.bus]!.pairs[split.pair]!;
  const percent = 100 * (1 - split.volts / nominal);
  return { percent, figures: judge.figures(volts, load, startingIsJudged(core.job) ? percent : null) };
}

/** Of turns in their order, the one with the largest dropPercent. */
function worstOf<T>(list: readonly T[], figuresOf: (each: T) => LoadFigures): T {
  let worst = list[0] as T;
  for (const each of list)
    if (figuresOf(each).split.dropPercent > figuresOf(worst).split.dropPercent + SAME_PERCENT) worst = each;
  return worst;
}

/**
 * The largest extra current of a load, amperes per line, before one of its own limits trips in its worst turn.
 * The current leaves at the terminals that the figures are of: one end of a run that the load is spread along.
 */
function headroom(
  core: Core,
  judge: Judge,
  load: number,
  on: readonly { solved: SolvedTurn; figures: LoadFigures }[],
): number | null {
  const base = worstOf(on, ({ figures }) => figures).figures;
  const atZero = excessOf(base.judged);
  if (atZero === null) return null;
  if (verdictOf(base.judged) === 'over') return 0;
  const perPath = core.job.loads[load]!.terminals === 'three-phase' ? 1 / SQRT3 : 1;
  const started = base.judged.find((j) => j.name === 'starting')?.value ?? null;
  const list = on.map(({ solved, figures }) => ({ solved, sinks: sinksAt(core, load, figures.split.bus) }));
  const nodes = judge.nodesOfLoad(load);
  return largestBefore(atZero, (amps) => {
    let worst: LoadFigures | null = null;
    let away = false;
    for (const { solved, sinks } of list) {
      const volts = solved.with(load, sinks, amps * perPath, nodes);
      if (!volts) return Number.POSITIVE_INFINITY;
      const figures = judge.figures(volts, load, started);
      if (worst && !(figures.split.dropPercent > worst.split.dropPercent + SAME_PERCENT)) continue;
      worst = figures;
      away = pointsAway(core, volts, figures.split.bus, figures.split.pair);
    }
    // Beyond no volts at all lie states that no network comes to, which yet may be solved where currents follow them.
    if (away && core.iterates) return Number.POSITIVE_INFINITY;
    const excess = worst && excessOf(worst.judged);
    return excess === null || Number.isNaN(excess) ? Number.POSITIVE_INFINITY : excess;
  });
}

/** The paths of a load at one bus, each with the whole of a current. */
function sinksAt(core: Core, load: number, bus: number): Sink[] {
  const { sinks, along } = core.loads[load]!;
  const whole = sinks.map((sink) => ({ ...sink, share: 1 }));
  if (along < 0) return whole;
  const half = whole.length / 2;
  const from = core.network.buses.index.get(core.job.runs[along]!.from)!;
  return bus === from ? whole.slice(0, half) : whole.slice(half);
}
