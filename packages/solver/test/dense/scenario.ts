import type { Conductor, Job, Run, Scenario } from '@farlug/solver/job';
import { type Circuit, circuitsOf } from './circuits.ts';
import { type Complex, scale } from './complex.ts';
import { EARTH } from './network.ts';
import type { Drawn, ServedLoad } from './sinks.ts';
import { type FixedSink, NotServed, type Solved, type State, solveState } from './solve.ts';
import { flood, nodeOf, supplyAt, type Topology } from './topology.ts';

export interface Turn {
  circuit: Circuit;
  label: 'all' | 'L1' | 'L2' | 'L3';
  /** Served loads of the circuit that this turn has on. */
  on: Set<string>;
  solved: Solved;
}

export interface Scenarios {
  design: Solved;
  whole: (scenario: Scenario) => Solved;
  turns: Turn[];
  starting: Map<string, Solved>;
}

const isGeneration = ({ size }: ServedLoad): boolean => size.amps < 0;
const behaviourOf = (job: Job, { load }: ServedLoad): Drawn['behaviour'] =>
  load.behaviour === 'current' ? job.angle : load.behaviour;

/** Line amps at design demand: `demandVa` speaks for all quantity and wins over `demand`. */
const designAmps = (item: ServedLoad): number => {
  if (isGeneration(item)) return 0;
  const { load, size } = item;
  return load.demandVa !== null ? load.demandVa / size.vaPerAmp : size.amps * load.demand;
};
const fullAmps = (item: ServedLoad): number => (isGeneration(item) ? 0 : item.size.amps);
const lightAmps = (item: ServedLoad): number =>
  isGeneration(item) ? item.size.amps : item.size.amps * item.load.minimum;

export const scenariosOf = (job: Job, topology: Topology, loads: ServedLoad[]): Scenarios => {
  const stateOf = (amps: (item: ServedLoad) => number, fixedSinks: FixedSink[]): State => ({
    drawn: new Map(
      loads.map((item) => [
        item.load.id,
        { amps: amps(item), lag: item.size.lag, behaviour: behaviourOf(job, item) },
      ]),
    ),
    fixedSinks,
  });
  const solve = (state: State, what: string): Solved => {
    try {
      return solveState(job, topology, loads, state);
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
        on.includes(item) ? fullAmps(item) : own.includes(item) ? 0 : designAmps(item);
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
        const pf = job.frequency === 0 ? 1 : start.powerFactor;
        state.drawn.set(item.load.id, {
          amps: start.amps * item.load.quantity,
          lag: (Math.acos(pf) * 180) / Math.PI,
          behaviour: job.angle,
        });
        return [item.load.id, solve(state, `starting of ${item.load.id}`)] as const;
      }),
  );

  return {
    design,
    turns,
    starting,
    whole: (scenario) => {
      if (scenario === 'everything-on') return solve(stateOf(fullAmps, []), scenario);
      if (scenario === 'light') return solve(stateOf(lightAmps, []), scenario);
      return design;
    },
  };
};

/** What diversity gives back at the far end of each feeder, feeders nearest the loads first (model.md 5). */
export const creditsOf = (job: Job, topology: Topology, loads: ServedLoad[]): FixedSink[] => {
  const diverse = job.runs
    .filter((run) => run.demand < 1 && !run.open)
    .map((run) => ({ run, ...farSide(job, run) }))
    .filter(({ far }) => topology.supply.has(topology.region.get(far)!))
    .sort((a, b) => a.beyond.size - b.beyond.size);
  const credits: FixedSink[] = [];
  for (const { run, far, beyond } of diverse) {
    const flow = flowInto(job, topology, loads, run, far, beyond, credits);
    for (const c of run.conductors)
      credits.push({ plus: EARTH, minus: nodeOf(far, c), amps: scale(flow(c), 1 - run.demand) });
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
  credits: FixedSink[],
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
  const within = ({ minus }: FixedSink) => beyond.has(minus.slice(0, minus.lastIndexOf('|')));
  const solved = solveState(
    piece,
    topology,
    inside,
    {
      drawn: new Map(
        inside.map((item) => [
          item.load.id,
          { amps: designAmps(item), lag: item.size.lag, behaviour: 'nominal' },
        ]),
      ),
      fixedSinks: credits.filter(within),
    },
    new Map(run.conductors.map((c) => [nodeOf(far, c), supply.nominal[c]!])),
  );
  return (conductor) => solved.takenAt(nodeOf(far, conductor));
};
