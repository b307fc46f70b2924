import type { Job, Load } from '../job/index.ts';
import { loadRating } from '../job/load-rating.ts';
import type { Network } from './network.ts';
import { PAIR_INDEX, PAIR_SLOTS } from './pair-table.ts';

const SQRT3 = Math.sqrt(3);

/** One current path of a load: from node a to node b. A three-phase load has three, one along a run twice as many. */
export interface Sink {
  load: number;
  a: number;
  b: number;
  /** Share of the load's amount that flows here: 1, or a half at each end of the run it is spread along. */
  share: number;
  /** Unit phasor of the nominal EMF from a to b, and its volts. */
  unitRe: number;
  unitIm: number;
  nominal: number;
}

/** A load in amperes of one of its paths, all quantity; negative for generation. */
export interface LoadModel {
  /** `null` where nothing feeds it. */
  served: boolean;
  full: number;
  design: number;
  minimum: number;
  /** cos φ and sin φ; sin is positive where the current lags. */
  cos: number;
  sin: number;
  starting: { amps: number; cos: number; sin: number } | null;
  generates: boolean;
  sinks: Sink[];
  /** Index of the run that it is spread along, −1 for a load at a bus. */
  along: number;
  /** Its bus, −1 for one along a run. */
  bus: number;
}

const sine = (cos: number, leading: boolean): number => {
  const square = 1 - cos * cos;
  const size = square > 0 ? Math.sqrt(square) : 0;
  return leading ? -size : size;
};

/** The oriented pairs of nodes' slots that a load draws from: (slot, slot, pair index, sign). */
const pathsOf = (load: Load): readonly (readonly [number, number, number, number])[] => {
  if (load.terminals === 'three-phase')
    return [
      [0, 1, PAIR_INDEX['L1-L2'], 1],
      [1, 2, PAIR_INDEX['L2-L3'], 1],
      [2, 0, PAIR_INDEX['L1-L3'], -1],
    ];
  const pair = PAIR_INDEX[load.terminals];
  return [[PAIR_SLOTS[pair]![0], PAIR_SLOTS[pair]![1], pair, 1]];
};

/**
 * Loads as current paths between nodes (model: loads). Amps come from the nominal volts between the terminals; a
 * three-phase load is three equal paths of amps/√3. A current sink spread evenly along a run acts on both ends like
 * half of it at each; its own voltage in between is worked out where it is judged.
 */
export function buildLoads(network: Network): LoadModel[] {
  const { job, buses, nodes, feeding } = network;
  const runIndex = new Map(job.runs.map((run, i) => [run.id, i]));
  return job.loads.map((load, i) => {
    const along = load.along === null ? -1 : runIndex.get(load.along)!;
    const run = job.runs[along];
    const ends = run ? [buses.index.get(run.from)!, buses.index.get(run.to)!] : [buses.index.get(load.bus!)!];
    const system = buses.system[ends[0]!] ?? null;
    const paths = pathsOf(load);
    const live = !run || feeding.runLive[along] === 1;
    const pairs = paths.map(([, , pair]) => system?.pairs[pair] ?? null);
    const served =
      live &&
      ends.every((bus) =>
        paths.every(
          ([s, t], k) => nodes.at[4 * bus + s]! >= 0 && nodes.at[4 * bus + t]! >= 0 && pairs[k] !== null,
        ),
      );
    if (!served) return absent(along, run ? -1 : ends[0]!);
    const sinks = ends.flatMap((bus) =>
      paths.map(([s, t, , sign], k): Sink => {
        const { unit, nominal } = pairs[k]!;
        return {
          load: i,
          a: nodes.at[4 * bus + s]!,
          b: nodes.at[4 * bus + t]!,
          share: 1 / ends.length,
          unitRe: sign * unit[0],
          unitIm: sign * unit[1],
          nominal,
        };
      }),
    );
    return { ...amounts(job, load, pairs[0]!.nominal), served: true, sinks, along, bus: run ? -1 : ends[0]! };
  });
}

const absent = (along: number, bus: number): LoadModel => ({
  served: false,
  full: 0,
  design: 0,
  minimum: 0,
  cos: 1,
  sin: 0,
  starting: null,
  generates: false,
  sinks: [],
  along,
  bus,
});

/** `volts`: nominal, of the pair or between lines. */
function amounts(job: Job, load: Load, volts: number) {
  const direct = job.frequency === 0;
  const paths = load.terminals === 'three-phase' ? SQRT3 : 1;
  const rating = loadRating(load, volts, job.frequency) ?? { amps: 0, powerFactor: 1, leading: false };
  const full = rating.amps / paths;
  const generates = full < 0;
  const demanded =
    load.demandVa === null ? full * load.demand : load.demandVa / (paths === 1 ? volts : 3 * volts);
  const startingCos = direct ? 1 : (load.starting?.powerFactor ?? 1);
  return {
    full,
    design: generates ? 0 : demanded,
    minimum: generates ? full : full * load.minimum,
    cos: rating.powerFactor,
    sin: sine(rating.powerFactor, rating.leading),
    starting: load.starting && {
      amps: (load.starting.amps * load.quantity) / paths,
      cos: startingCos,
      sin: sine(startingCos, false),
    },
    generates,
  };
}
