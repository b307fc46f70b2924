import type { Job, Load } from '@farlug/solver/job';
import type { Circuit } from './circuits.ts';
import { abs, sub } from './complex.ts';
import { type Ends, sidesOf } from './sinks.ts';
import type { Solved } from './solve.ts';
import { nodeOf, nominalBetween, supplyAt, type Topology } from './topology.ts';

export interface Reading {
  ends: Ends;
  bus: string;
  volts: number;
  dropVolts: number;
  dropPercent: number;
  nominalVolts: number;
}

const hasPair = (topology: Topology, bus: string, ends: Ends): boolean =>
  ends.every((c) => topology.live.has(nodeOf(bus, c)));

export const readPair = (topology: Topology, solved: Solved, bus: string, ends: Ends): Reading => {
  const supply = supplyAt(topology, bus)!;
  const nominalVolts = abs(nominalBetween(supply, ...ends));
  const volts = abs(sub(solved.voltage(nodeOf(bus, ends[0])), solved.voltage(nodeOf(bus, ends[1]))));
  const dropVolts = nominalVolts * supply.openRatio - volts;
  return { ends, bus, volts, dropVolts, dropPercent: (100 * dropVolts) / nominalVolts, nominalVolts };
};

/** Of two ends or turns whose percents differ by rounding alone, the first counts. */
export const SAME_PERCENT = 1e-11;

/** The reading that supplies a load's figures: of its sides and places the one with the largest percent. */
export const readLoad = (topology: Topology, solved: Solved, load: Load, places: string[]): Reading =>
  places
    .flatMap((bus) => sidesOf(load).map((ends) => readPair(topology, solved, bus, ends)))
    .reduce((worst, reading) => (reading.dropPercent > worst.dropPercent + SAME_PERCENT ? reading : worst));

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
const percentAt = (topology: Topology, solved: Solved, bus: string, home: string, ends: Ends): number => {
  const same = topology.region.get(bus) === topology.region.get(home);
  if (same && hasPair(topology, bus, ends)) return readPair(topology, solved, bus, ends).dropPercent;
  const pairs = livePairs(topology, bus);
  const lines = pairs.filter(([, minus]) => minus !== 'N');
  const list = lines.length > 0 ? lines : pairs;
  const percents = list.map((p) => readPair(topology, solved, bus, p).dropPercent);
  return percents.reduce((sum, q) => sum + q, 0) / percents.length;
};

export interface Split {
  source: number;
  service: number;
  transformer: number;
  feeder: number;
  branch: number;
}

interface Step {
  kind: 'service' | 'feeder' | 'branch' | 'transformer';
  near: string;
  far: string;
  metres: number;
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
  const perUnit = job.lengthUnit === 'ft' ? 0.3048 : 1;
  const edges = [
    ...job.runs
      .filter((run) => !run.open)
      .map((run) => ({ kind: run.kind, from: run.from, to: run.to, metres: run.length * perUnit })),
    ...job.transformers.map((t) => ({ kind: 'transformer' as const, from: t.from, to: t.to, metres: 0 })),
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
  solved: Solved,
  reading: Reading,
  begins: string[],
): Split => {
  const { ends, bus: home } = reading;
  const sourceBus = supplyAt(topology, home)!.sourceBus;
  const q = (bus: string) => percentAt(topology, solved, bus, home, ends);
  const starts = begins
    .filter((bus) => topology.region.get(bus) === topology.region.get(home) && hasPair(topology, bus, ends))
    .map((bus) => ({ bus, percent: readPair(topology, solved, bus, ends).dropPercent }));
  const start = starts.reduce<(typeof starts)[number] | null>(
    (low, each) => (low === null || each.percent < low.percent ? each : low),
    null,
  );
  const branch = start ? reading.dropPercent - start.percent : 0;
  const path = pathBetween(job, sourceBus, start?.bus ?? home);
  const along = (kind: Step['kind']) =>
    path.filter((step) => step.kind === kind).reduce((sum, step) => sum + q(step.far) - q(step.near), 0);
  const source = q(sourceBus);
  const service = along('service');
  const transformer = along('transformer');
  const feeder = reading.dropPercent - source - service - transformer - branch;
  return { source, service, transformer, feeder, branch };
};

export const circuitOf = (circuits: Circuit[], load: Load): Circuit =>
  circuits.find((circuit) => circuit.loads.has(load.id))!;

export const belowNominal = (reading: Reading): number => 100 * (1 - reading.volts / reading.nominalVolts);
