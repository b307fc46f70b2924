import type { Job, LoadResult, Phasor, Scenario } from '@farlug/solver/job';
import { type Circuit, circuitsOf } from './circuits.ts';
import { add, type Complex, conj, mul, ONE, scale, sub, THIRD } from './complex.ts';
import { D, NIL } from './decimal.ts';
import { extraSinks, type Headroom, largestBefore } from './headroom.ts';
import { type Judgement, judge } from './limits.ts';
import { EARTH } from './network.ts';
import type { Scenarios } from './scenario.ts';
import type { ServedLoad } from './sinks.ts';
import { NotServed, type Solved } from './solve.ts';
import {
  belowNominal,
  circuitOf,
  exceedsPercent,
  pathBetween,
  pointsAway,
  type Reading,
  readLoad,
  type Split,
  splitOf,
} from './split.ts';
import type { VoltageAt } from './state.ts';
import { nodeOf, supplyAt, type Topology } from './topology.ts';

interface Figures {
  reading: Reading;
  split: Split;
  judgement: Judgement;
  /** Its voltage points away from its EMF. */
  away: boolean;
  turn: LoadResult['turn'];
}

/** A served load as it is printed. */
export interface DenseLoad {
  result: LoadResult;
  /** Where headroom ends at a collapse: the least extra amps that were seen to be unserved. */
  collapseAmps: number | null;
}

/** A served load in one scenario, its headroom where that is asked for. */
export const loadResult = (
  job: Job,
  topology: Topology,
  scenarios: Scenarios,
  scenario: Scenario,
  item: ServedLoad,
  withHeadroom: boolean,
): DenseLoad => {
  const { load } = item;
  const circuit: Circuit = circuitOf(circuitsOf(job), load);
  const start = scenarios.starting.get(load.id);
  const startingPercent = start ? belowNominal(readLoad(topology, start.voltage, load, item.places)) : null;
  const statesImpedance = job.sources.some((s) => !s.off && (s.impedance !== null || s.fault !== null));
  const figures = (at: VoltageAt, turn: LoadResult['turn'] = null): Figures => {
    const reading = readLoad(topology, at, load, item.places);
    const split = splitOf(job, topology, at, reading, circuit.begins);
    const path = pathBetween(job, supplyAt(topology, reading.bus)!.sourceBus, reading.bus);
    const pathM = path.reduce((sum, step) => sum.plus(step.metres), NIL);
    const judged = statesImpedance ? startingPercent : null;
    const judgement = judge(job, load, reading, split, pathM, judged);
    return { reading, split, judgement, away: pointsAway(topology, at, reading.bus, reading.ends), turn };
  };
  const { iterated } = scenarios;
  const worst = (list: Figures[]): Figures =>
    list.reduce((top, each) => (exceedsPercent(each.reading, top.reading) ? each : top));

  const turns = scenarios.turns
    .filter((turn) => turn.on.has(load.id))
    .map((turn) => ({ ...turn, full: figures(turn.solved.voltage, turn.label) }));
  const full = worst(turns.map((turn) => turn.full));
  const shown = scenario === 'starting' && start ? start : scenarios.shown(scenario);
  const { reading, split, judgement, turn } = scenario === 'each-circuit' ? full : figures(shown.voltage);

  const headroom = (): Headroom => {
    if (full.judgement.excess === null) return { edge: 'none' };
    if (full.judgement.verdict === 'over') return { edge: 'limit', amps: NIL };
    const more = turns.map((each) => ({
      ...each,
      with: each.solved.with(extraSinks(item, each.full.reading.bus)),
    }));
    return largestBefore((amps) => {
      if (amps.isZero()) return full.judgement.excess;
      try {
        const then = worst(more.map((each) => figures(each.with(amps), each.label)));
        // Solutions beyond no volts at all are none that a network comes to.
        return iterated && then.away ? null : then.judgement.excess;
      } catch (error) {
        if (error instanceof NotServed) return null;
        throw error;
      }
    });
  };
  const most: Headroom = withHeadroom ? headroom() : { edge: 'none' };
  const result: LoadResult = {
    id: load.id,
    terminals: load.terminals,
    volts: reading.volts.toNumber(),
    dropVolts: reading.dropVolts.toNumber(),
    dropPercent: reading.dropPercent.toNumber(),
    sourcePercent: split.source.toNumber(),
    servicePercent: split.service.toNumber(),
    transformerPercent: split.transformer.toNumber(),
    feederPercent: split.feeder.toNumber(),
    branchPercent: split.branch.toNumber(),
    totalPercent: judgement.total.toNumber(),
    limitPercent: judgement.totalLimit?.toNumber() ?? null,
    verdict: judgement.verdict,
    reasons: judgement.broken,
    turn,
    headroomAmps: most.edge === 'none' ? null : most.amps.toNumber(),
    thevenin: thevenin(scenarios.design, item, full.reading.bus),
    startingPercent: startingPercent?.toNumber() ?? null,
  };
  return { result, collapseAmps: most.edge === 'collapse' ? most.unserved.toNumber() : null };
};

export const unserved = (id: string, terminals: LoadResult['terminals']): LoadResult => ({
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

export const phasor = ({ re, im }: Complex): Phasor => [re.toNumber(), im.toNumber()];

/** Volts that one ampere through the terminals costs: unit injections; three-phase by symmetrical components. */
const thevenin = (design: Solved, item: ServedLoad, bus: string): Phasor => {
  if (item.load.terminals !== 'three-phase') {
    const [plus, minus] = item.load.terminals.split('-').map((c) => nodeOf(bus, c as 'L1')) as [
      string,
      string,
    ];
    const v = design.respond([{ plus, minus, amps: ONE }]);
    return phasor(sub(v(minus), v(plus)));
  }
  const at = (line: 'L1' | 'L2' | 'L3') => nodeOf(bus, line);
  const back = conj(THIRD);
  const v = design.respond([
    { plus: at('L1'), minus: EARTH, amps: ONE },
    { plus: at('L2'), minus: EARTH, amps: back },
    { plus: at('L3'), minus: EARTH, amps: THIRD },
  ]);
  const positive = add(v(at('L1')), add(mul(THIRD, v(at('L2'))), mul(back, v(at('L3')))));
  return phasor(scale(positive, D(-1).div(3)));
};
