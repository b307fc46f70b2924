import {
  type BusResult,
  type Job,
  type JobFile,
  jobSchema,
  type LoadResult,
  type Phasor,
  type RunResult,
  type Scenario,
  type Solution,
  type Verdict,
} from '@farlug/solver/job';
import { carries, worstOf } from './carried.ts';
import { circuitsOf } from './circuits.ts';
import { abs, add, type Complex, complex, conj, mul, polar, scale, sub, ZERO } from './complex.ts';
import { extraSinks, largestBefore } from './headroom.ts';
import { exceeds, type Judgement, judge } from './limits.ts';
import { creditsOf, type Scenarios, scenariosOf } from './scenario.ts';
import { type ServedLoad, servedLoads } from './sinks.ts';
import type { FixedSink, Solved } from './solve.ts';
import {
  belowNominal,
  circuitOf,
  livePairs,
  pathBetween,
  type Reading,
  readLoad,
  readPair,
  SAME_PERCENT,
  type Split,
  splitOf,
} from './split.ts';
import { nodeOf, supplyAt, type Topology, topologyOf } from './topology.ts';

interface Figures {
  reading: Reading;
  split: Split;
  judgement: Judgement;
  turn: LoadResult['turn'];
}

/**
 * Solves a job file densely and prints `farlug-solution/1`, written from the model's definitions alone.
 * `withHeadroom: false` leaves the headroom `null`: on iterated jobs it costs most of the time.
 */
export const solveDense = (file: JobFile, scenario: Scenario, withHeadroom = true): Solution => {
  const job = jobSchema.parse(file);
  const topology = topologyOf(job);
  const loads = servedLoads(job, topology);
  const scenarios = scenariosOf(job, topology, loads);
  const shown =
    scenario === 'everything-on' || scenario === 'light' ? scenarios.whole(scenario) : scenarios.design;
  const results = loadResults(job, topology, loads, scenarios, scenario, shown, withHeadroom);
  return {
    format: 'farlug-solution/1',
    scenario,
    buses: topology.buses.map((bus) => busResult(job, topology, shown, scenarios.design, bus)),
    runs: runResults(job, topology, loads, shown, results),
    loads: results,
    totals: totalsOf(job, topology, loads, shown, scenario),
    warnings: [],
  };
};

const loadResults = (
  job: Job,
  topology: Topology,
  loads: ServedLoad[],
  scenarios: Scenarios,
  scenario: Scenario,
  shown: Solved,
  withHeadroom: boolean,
): LoadResult[] => {
  const circuits = circuitsOf(job);
  const statesImpedance = job.sources.some((s) => !s.off && (s.impedance !== null || s.fault !== null));
  return job.loads.map((load): LoadResult => {
    const item = loads.find((each) => each.load.id === load.id);
    if (!item) return unserved(load.id, load.terminals);
    const circuit = circuitOf(circuits, load);
    const start = scenarios.starting.get(load.id);
    const startingPercent = start ? belowNominal(readLoad(topology, start, load, item.places)) : null;
    const figures = (solved: Solved, turn: LoadResult['turn'] = null): Figures => {
      const reading = readLoad(topology, solved, load, item.places);
      const split = splitOf(job, topology, solved, reading, circuit.begins);
      const path = pathBetween(job, supplyAt(topology, reading.bus)!.sourceBus, reading.bus);
      const pathM = path.reduce((sum, step) => sum + step.metres, 0);
      const judged = statesImpedance ? startingPercent : null;
      return { reading, split, judgement: judge(job, load, reading, split, pathM, judged), turn };
    };
    const turns = scenarios.turns.filter((turn) => turn.on.has(load.id));
    const worstTurn = (extra: (at: Figures) => FixedSink[]): Figures => {
      const list = turns.map((turn) => {
        const base = figures(turn.solved, turn.label);
        const sinks = extra(base);
        return sinks.length === 0 ? base : figures(turn.solved.again(sinks), turn.label);
      });
      return list.reduce((worst, f) =>
        f.reading.dropPercent > worst.reading.dropPercent + SAME_PERCENT ? f : worst,
      );
    };
    const full = worstTurn(() => []);
    const own =
      scenario === 'each-circuit' ? full : figures(scenario === 'starting' && start ? start : shown);
    const over = full.judgement.verdict === 'over';
    const headroomAmps =
      full.judgement.excess === null || !withHeadroom
        ? null
        : over
          ? 0
          : largestBefore(
              (amps) =>
                worstTurn((at) => (amps === 0 ? [] : extraSinks(item, at.reading.bus, amps))).judgement
                  .excess!,
            );
    const { reading, split, judgement } = own;
    return {
      id: load.id,
      terminals: load.terminals,
      volts: reading.volts,
      dropVolts: reading.dropVolts,
      dropPercent: reading.dropPercent,
      sourcePercent: split.source,
      servicePercent: split.service,
      transformerPercent: split.transformer,
      feederPercent: split.feeder,
      branchPercent: split.branch,
      totalPercent: judgement.total,
      limitPercent: judgement.totalLimit,
      verdict: judgement.verdict,
      reasons: judgement.broken,
      turn: own.turn,
      headroomAmps,
      thevenin: thevenin(scenarios.design, item, full.reading.bus),
      startingPercent,
    };
  });
};

const unserved = (id: string, terminals: LoadResult['terminals']): LoadResult => ({
  id,
  terminals,
  volts: null,
  dropVolts: null,
  dropPercent: null,
  sourcePercent: null,
  servicePercent: null,
  transformerPercent: null,
  feederPercent: null,
  branchPercent: null,
  totalPercent: null,
  limitPercent: null,
  verdict: 'unserved',
  reasons: [],
  turn: null,
  headroomAmps: null,
  thevenin: null,
  startingPercent: null,
});

/** Volts that one ampere through the terminals costs: unit injections; three-phase by symmetrical components. */
const thevenin = (design: Solved, item: ServedLoad, bus: string): Phasor => {
  const a = polar(1, 120);
  if (item.load.terminals === 'three-phase') {
    const at = (line: 'L1' | 'L2' | 'L3') => nodeOf(bus, line);
    const back = mul(a, a);
    const v = design.respond([
      { plus: at('L1'), minus: 'earth|', amps: complex(1) },
      { plus: at('L2'), minus: 'earth|', amps: back },
      { plus: at('L3'), minus: 'earth|', amps: a },
    ]);
    const positive = scale(add(v(at('L1')), add(mul(a, v(at('L2'))), mul(back, v(at('L3'))))), -1 / 3);
    return [positive.re, positive.im];
  }
  const [plus, minus] = item.load.terminals.split('-').map((c) => nodeOf(bus, c as 'L1')) as [string, string];
  const v = design.respond([{ plus, minus, amps: complex(1) }]);
  const z = sub(v(minus), v(plus));
  return [z.re, z.im];
};

const busResult = (job: Job, topology: Topology, shown: Solved, design: Solved, bus: string): BusResult => {
  const isPanel =
    job.buses.some((b) => b.id === bus && b.kind === 'panel') || job.panels.some((p) => p.bus === bus);
  const limit = job.limits.feeder;
  const lit = topology.conductors.get(bus)!.filter((c) => topology.live.has(nodeOf(bus, c)));
  if (lit.length === 0) {
    const dead: BusResult = { id: bus, volts: null, phasors: null };
    return isPanel ? { ...dead, feederPercent: null, verdict: 'unserved' } : dead;
  }
  const pairs = livePairs(topology, bus);
  const volts: NonNullable<BusResult['volts']> = {};
  for (const ends of pairs)
    volts[`${ends[0]}-${ends[1]}` as 'L1-N'] = readPair(topology, shown, bus, ends).volts;
  if (lit.includes('N')) volts.N = abs(shown.voltage(nodeOf(bus, 'N')));
  const phasors: NonNullable<BusResult['phasors']> = {};
  for (const c of lit) {
    const v = shown.voltage(nodeOf(bus, c));
    phasors[c] = [v.re, v.im];
  }
  if (!isPanel) return { id: bus, volts, phasors };
  const worst = pairs
    .map((ends) => readPair(topology, design, bus, ends))
    .reduce((top, reading) => (reading.dropPercent > top.dropPercent ? reading : top));
  const feederPercent = splitOf(job, topology, design, worst, [bus]).feeder;
  const verdict: Verdict = limit === null ? 'unjudged' : exceeds(feederPercent, limit) ? 'over' : 'within';
  return { id: bus, volts, phasors, feederPercent, verdict };
};

const runResults = (
  job: Job,
  topology: Topology,
  loads: ServedLoad[],
  shown: Solved,
  results: LoadResult[],
): RunResult[] =>
  job.runs.map((run): RunResult => {
    const carried = loads.filter((item) => carries(job, run.id, item)).map((item) => item.load.id);
    const verdict = worstOf(results.filter((r) => carried.includes(r.id)).map((r) => r.verdict));
    const wires = shown.network.elements.filter((e) => e.of.kind === 'run' && e.of.id === run.id);
    if (wires.length === 0)
      return { id: run.id, amps: null, dropVolts: null, dropPercent: null, lossWatts: null, verdict };
    const amps: NonNullable<RunResult['amps']> = {};
    let lossWatts = 0;
    for (const wire of wires) {
      const size = abs(shown.through(wire));
      amps[wire.of.conductor!] = size;
      lossWatts += size * size * wire.r;
    }
    const drops = livePairs(topology, run.from)
      .filter((ends) => ends.every((c) => run.conductors.includes(c)))
      .filter((ends, _, all) => ends[1] === 'N' || !all.some((each) => each[1] === 'N'))
      .map((ends) => {
        const near = readPair(topology, shown, run.from, ends);
        const far = readPair(topology, shown, run.to, ends);
        const dropVolts = near.volts - far.volts;
        return { dropVolts, dropPercent: (100 * dropVolts) / near.nominalVolts };
      });
    const top = drops.reduce<(typeof drops)[number] | null>(
      (most, d) => (most === null || Math.abs(d.dropPercent) > Math.abs(most.dropPercent) ? d : most),
      null,
    );
    return {
      id: run.id,
      amps,
      dropVolts: top?.dropVolts ?? null,
      dropPercent: top?.dropPercent ?? null,
      lossWatts,
      verdict,
    };
  });

const totalsOf = (
  job: Job,
  topology: Topology,
  loads: ServedLoad[],
  shown: Solved,
  scenario: Scenario,
): Solution['totals'] => {
  const power = (v: Complex, amps: Complex) => mul(v, conj(amps)).re;
  let lossWatts = 0;
  for (const element of shown.network.elements) {
    const amps = abs(shown.through(element));
    lossWatts += amps * amps * element.r;
  }
  let loadWatts = 0;
  for (const item of loads)
    for (const piece of item.pieces)
      loadWatts += power(
        sub(shown.voltage(piece.plus), shown.voltage(piece.minus)),
        shown.drawnBy(item, piece),
      );
  const credits = scenario === 'everything-on' || scenario === 'light' ? [] : creditsOf(job, topology, loads);
  for (const { minus, amps } of credits) loadWatts -= power(shown.voltage(minus), amps);
  let delivered = ZERO;
  const seen = new Set<string>();
  for (const [node, emf] of shown.network.fixed) {
    if (seen.has(node)) continue;
    seen.add(node);
    delivered = add(delivered, mul(emf, conj(shown.takenAt(node))));
  }
  return { sourceWatts: delivered.re, loadWatts, lossWatts, kclResidual: 0, iterations: 0 };
};
