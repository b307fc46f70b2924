import type { Conductor, Job, Run, Scenario } from '@farlug/solver/job';
import { type Circuit, circuitsOf } from './circuits.ts';
import { type Complex, scale } from './complex.ts';
import { D, type Decimal, NIL, UNITY } from './decimal.ts';
import type { Sink } from './equations.ts';
import { lagOf } from './load-size.ts';
import { EARTH } from './network.ts';
import type { Drawn, ServedLoad } from './sinks.ts';
import { NotServed, type Solved, stateSolver } from './solve.ts';
import type { State } from './state.ts';
import { flood, nodeOf, supplyAt, type Topology } from './topology.ts';

export interface Turn {
  circuit: Circuit;
  label: 'all' | 'L1' | 'L2' | 'L3';
  /** Served loads of the circuit that this turn has on. */
  on: Set<string>;
  solved: Solved;
}

export interface Scenarios {
  /** Some current follows the voltages. */
  iterated: boolean;
  design: Solved;
  /** What diversity gives back in `design`. */
  credits: Sink[];
  /** The state that buses, runs and totals are of: `design`, or all loads at once. */
  shown: (scenario: Scenario) => Solved;
  turns: Turn[];
  starting: Map<string, Solved>;
}

const isGeneration = ({ size }: ServedLoad): boolean => size.amps.lt(0);
const behaviourOf = (job: Job, { load }: ServedLoad): Drawn['behaviour'] =>
  load.behaviour === 'current' ? job.angle : load.behaviour;

/** Line amps at design demand: `demandVa` speaks for all quantity and wins over `demand`. */
const designAmps = (item: ServedLoad): Decimal => {
  if (isGeneration(item)) return NIL;
  const { load, size } = item;
  return load.demandVa !== null ? D(load.demandVa).div(size.vaPerAmp) : size.amps.times(load.demand);
};
const fullAmps = (item: ServedLoad): Decimal => (isGeneration(item) ? NIL : item.size.amps);
const lightAmps = (item: ServedLoad): Decimal =>
  isGeneration(item) ? item.size.amps : item.size.amps.times(item.load.minimum);

export const scenariosOf = (job: Job, topology: Topology, loads: ServedLoad[]): Scenarios => {
  const stateOf = (amps: (item: ServedLoad) => Decimal, given: Sink[]): State => ({
    drawn: new Map(
      loads.map((item) => [
        item.load.id,
        { amps: amps(item), lag: item.size.lag, behaviour: behaviourOf(job, item) },
      ]),
    ),
    credits: given,
  });
  const solved = stateSolver(job, topology, loads);
  const solve = (state: State, what: string): Solved => {
    try {
      return solved(state);
    } catch (error) {
      if (error instanceof NotServed) throw new NotServed(`${error.message} (${what})`);
      throw error;
    }
  };
  const credits = creditsOf(job, topology, loads);
  const design = solve(stateOf(designAmps, credits), 'design');

  const turns = circuitsOf(job).flatMap((circuit): Turn[] => {
    const own = loads.filter((item) => circuit.loads.has(item.load.id));
    if (own.length === 0) return [];
    const lineOf = (item: ServedLoad) =>
      item.load.terminals.endsWith('-N') ? (item.load.terminals.slice(0, 2) as 'L1' | 'L2' | 'L3') : null;
    const lines = (['L1', 'L2', 'L3'] as const).filter((line) => own.some((item) => lineOf(item) === line));
    const labels = lines.length > 1 ? (['all', ...lines] as const) : (['all'] as const);
    return labels.map((label) => {
      const on = own.filter((item) => label === 'all' || lineOf(item) === null || lineOf(item) === label);
      const amps = (item: ServedLoad) =>
        on.includes(item) ? fullAmps(item) : own.includes(item) ? NIL : designAmps(item);
      return {
        circuit,
        label,
        on: new Set(on.map((item) => item.load.id)),
        solved: solve(stateOf(amps, credits), `circuit of ${own[0]!.load.id}`),
      };
    });
  });

  const starting = new Map(
    loads
      .filter((item) => item.load.starting !== null)
      .map((item) => {
        const start = item.load.starting!;
        const state = stateOf(designAmps, credits);
        state.drawn.set(item.load.id, {
          amps: D(start.amps).times(item.load.quantity),
          lag: lagOf(job.frequency === 0 ? 1 : start.powerFactor),
          behaviour: job.angle,
        });
        return [item.load.id, solve(state, `starting of ${item.load.id}`)] as const;
      }),
  );

  let whole: Solved | null = null;
  const iterated =
    design.elements.some((element) => element.warm) ||
    loads.some((item) => ['power', 'local'].includes(behaviourOf(job, item)));
  return {
    iterated,
    design,
    credits,
    turns,
    starting,
    shown: (scenario) => {
      if (scenario !== 'everything-on' && scenario !== 'light') return design;
      whole ??= solve(stateOf(scenario === 'light' ? lightAmps : fullAmps, []), scenario);
      return whole;
    },
  };
};

/** What diversity gives back at the far end of each feeder, feeders nearest the loads first (model.md 5). */
const creditsOf = (job: Job, topology: Topology, loads: ServedLoad[]): Sink[] => {
  const diverse = job.runs
    .filter((run) => run.demand < 1 && !run.open)
    .map((run) => ({ run, ...farSide(job, run) }))
    .filter(({ far }) => topology.supply.has(topology.region.get(far)!))
    .sort((a, b) => a.beyond.size - b.beyond.size);
  const credits: Sink[] = [];
  for (const { run, far, beyond } of diverse) {
    const flow = flowInto(job, topology, loads, run, far, beyond, credits);
    for (const c of run.conductors)
      credits.push({ plus: EARTH, minus: nodeOf(far, c), amps: scale(flow(c), UNITY.minus(run.demand)) });
  }
  return credits;
};

const farSide = (job: Job, cut: Run): { far: string; beyond: Set<string> } => {
  const reach = (starts: string[]) =>
    flood(starts, (bus) =>
      [...job.runs.filter((run) => !run.open && run !== cut), ...job.transformers].flatMap((e) =>
        e.from === bus ? [e.to] : e.to === bus ? [e.from] : [],
      ),
    );
  const fed = reach(job.sources.filter((s) => !s.off).map((s) => s.bus));
  const far = fed.has(cut.to) ? cut.from : cut.to;
  return { far, beyond: reach([far]) };
};

/**
 * Current per conductor that flows into the piece of network beyond a feeder: that piece is solved by itself,
 * its near end held at nominal EMF, every load beyond as a nominal-angle current sink at design demand.
 */
const flowInto = (
  job: Job,
  topology: Topology,
  loads: ServedLoad[],
  run: Run,
  far: string,
  beyond: Set<string>,
  credits: Sink[],
): ((conductor: Conductor) => Complex) => {
  const supply = supplyAt(topology, far)!;
  const piece: Job = {
    ...job,
    angle: 'nominal',
    sources: [],
    runs: job.runs
      .filter((r) => r !== run && beyond.has(r.from))
      .map((r) => ({ ...r, temperature: r.temperature === 'operating' ? null : r.temperature })),
    transformers: job.transformers.filter((t) => beyond.has(t.from)),
  };
  const inside = loads.filter((item) => item.places.every((bus) => beyond.has(bus)));
  const within = ({ minus }: Sink) => beyond.has(minus.slice(0, minus.lastIndexOf('|')));
  const held = new Map(run.conductors.map((c) => [nodeOf(far, c), supply.nominal[c]!]));
  const solved = stateSolver(
    piece,
    topology,
    inside,
    held,
  )({
    drawn: new Map(
      inside.map((item) => [
        item.load.id,
        { amps: designAmps(item), lag: item.size.lag, behaviour: 'nominal' },
      ]),
    ),
    credits: credits.filter(within),
  });
  return (conductor) => solved.takenAt(nodeOf(far, conductor));
};
