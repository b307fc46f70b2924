import type { Job, Load } from '@farlug/solver/job';
import type { Circuit } from './circuits.ts';
import { abs, conj, mul, sub } from './complex.ts';
import { metresOf } from './conductors.ts';
import { D, type Decimal, NIL, sumOf } from './decimal.ts';
import { type Ends, sidesOf } from './sinks.ts';
import type { VoltageAt } from './state.ts';
import { nodeOf, nominalBetween, supplyAt, type Topology } from './topology.ts';

export interface Reading {
  ends: Ends;
  bus: string;
  volts: Decimal;
  dropVolts: Decimal;
  dropPercent: Decimal;
  nominalVolts: Decimal;
}

const hasPair = (topology: Topology, bus: string, ends: Ends): boolean =>
  ends.every((c) => topology.live.has(nodeOf(bus, c)));

export const readPair = (topology: Topology, at: VoltageAt, bus: string, ends: Ends): Reading => {
  const supply = supplyAt(topology, bus)!;
  const nominalVolts = abs(nominalBetween(supply, ...ends));
  const volts = abs(sub(at(nodeOf(bus, ends[0])), at(nodeOf(bus, ends[1]))));
  const dropVolts = nominalVolts.times(supply.openRatio).minus(volts);
  const dropPercent = dropVolts.times(100).div(nominalVolts);
  return { ends, bus, volts, dropVolts, dropPercent, nominalVolts };
};

/** Whether the voltage at a reading points away from the nominal EMF there. */
export const pointsAway = (topology: Topology, at: VoltageAt, bus: string, ends: Ends): boolean => {
  const v = sub(at(nodeOf(bus, ends[0])), at(nodeOf(bus, ends[1])));
  return mul(v, conj(nominalBetween(supplyAt(topology, bus)!, ...ends))).re.lte(0);
};

/** Of two pairs, ends or turns whose percents differ by rounding alone, the first counts. */
export const SAME_PERCENT = D('1e-11');
export const exceedsPercent = (a: Reading, b: Reading): boolean =>
  a.dropPercent.gt(b.dropPercent.plus(SAME_PERCENT));

/** The reading that supplies a load's figures: of its sides and places the one with the largest percent. */
export const readLoad = (topology: Topology, at: VoltageAt, load: Load, places: string[]): Reading =>
  places
    .flatMap((bus) => sidesOf(load).map((ends) => readPair(topology, at, bus, ends)))
    .reduce((worst, reading) => (exceedsPercent(reading, worst) ? reading : worst));

/** The pairs of a bus that are live, line-neutral first. */
export const livePairs = (topology: Topology, bus: string): Ends[] =>
  (
    [
      ['L1', 'N'],
      ['L2', 'N'],
      ['L3', 'N'],
      ['L1', 'L2'],
      ['L2', 'L3'],
      ['L1', 'L3'],
    ] as Ends[]
  ).filter((ends) => hasPair(topology, bus, ends));

/** q(b) of model.md 6: same pair in the load's own system, else the mean over line-line pairs. */
const percentAt = (topology: Topology, at: VoltageAt, bus: string, home: string, ends: Ends): Decimal => {
  const same = topology.region.get(bus) === topology.region.get(home);
  if (same && hasPair(topology, bus, ends)) return readPair(topology, at, bus, ends).dropPercent;
  const pairs = livePairs(topology, bus);
  const lines = pairs.filter(([, minus]) => minus !== 'N');
  const list = lines.length > 0 ? lines : pairs;
  return sumOf(list.map((p) => readPair(topology, at, bus, p).dropPercent)).div(list.length);
};

export interface Split {
  source: Decimal;
  service: Decimal;
  transformer: Decimal;
  feeder: Decimal;
  branch: Decimal;
}

interface Step {
  kind: 'service' | 'feeder' | 'branch' | 'transformer';
  near: string;
  far: string;
  metres: Decimal;
}

/** Fewest steps from one bus to another over closed runs and transformers, ties in file order. */
export const pathBetween = (job: Job, from: string, to: string): Step[] => {
  const known = paths.get(job) ?? new Map<string, Map<string, Step[]>>();
  paths.set(job, known);
  if (!known.has(from)) known.set(from, pathsFrom(job, from));
  return known.get(from)!.get(to)!;
};

const paths = new WeakMap<Job, Map<string, Map<string, Step[]>>>();

const pathsFrom = (job: Job, from: string): Map<string, Step[]> => {
  const edges = [
    ...job.runs
      .filter((run) => !run.open)
      .map((run) => ({ kind: run.kind, from: run.from, to: run.to, metres: metresOf(job, run.length) })),
    ...job.transformers.map((t) => ({ kind: 'transformer' as const, from: t.from, to: t.to, metres: NIL })),
  ];
  const arrived = new Map<string, Step[]>([[from, []]]);
  for (const [near, steps] of arrived) {
    for (const edge of edges) {
      const far = edge.from === near ? edge.to : edge.to === near ? edge.from : null;
      if (far === null || arrived.has(far)) continue;
      arrived.set(far, [...steps, { kind: edge.kind, near, far, metres: edge.metres }]);
    }
  }
  return arrived;
};

/** The five parts of the percent at a reading; `begins` are the buses where its circuit begins. */
export const splitOf = (
  job: Job,
  topology: Topology,
  at: VoltageAt,
  reading: Reading,
  begins: string[],
): Split => {
  const { ends, bus: home } = reading;
  const sourceBus = supplyAt(topology, home)!.sourceBus;
  const read = new Map<string, Decimal>();
  const q = (bus: string): Decimal => {
    if (!read.has(bus)) read.set(bus, percentAt(topology, at, bus, home, ends));
    return read.get(bus)!;
  };
  const starts = begins
    .filter((bus) => topology.region.get(bus) === topology.region.get(home) && hasPair(topology, bus, ends))
    .map((bus) => ({ bus, percent: readPair(topology, at, bus, ends).dropPercent }));
  const start = starts.reduce<(typeof starts)[number] | null>(
    (low, each) => (low === null || each.percent.lt(low.percent) ? each : low),
    null,
  );
  const branch = start ? reading.dropPercent.minus(start.percent) : NIL;
  const path = pathBetween(job, sourceBus, start?.bus ?? home);
  const along = (kind: Step['kind']) =>
    sumOf(path.filter((step) => step.kind === kind).map((step) => q(step.far).minus(q(step.near))));
  const source = q(sourceBus);
  const service = along('service');
  const transformer = along('transformer');
  const feeder = reading.dropPercent.minus(source).minus(service).minus(transformer).minus(branch);
  return { source, service, transformer, feeder, branch };
};

export const circuitOf = (circuits: Circuit[], load: Load): Circuit =>
  circuits.find((circuit) => circuit.loads.has(load.id))!;

export const belowNominal = (reading: Reading): Decimal =>
  reading.nominalVolts.minus(reading.volts).times(100).div(reading.nominalVolts);
