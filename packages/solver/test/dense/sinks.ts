import type { Conductor, Job, Load } from '@farlug/solver/job';
import { abs, type Complex, conj, div, mul, polar, scale, unit } from './complex.ts';
import { type LoadSize, loadSize } from './load-size.ts';
import { nodeOf, nominalBetween, supplyAt, type Topology } from './topology.ts';

/** A two-terminal piece of a load: a pair, a side of the delta, or half of a spread load at one end of its run. */
export interface Piece {
  plus: string;
  minus: string;
  nominal: Complex;
  /** Amps in this piece per line amp of the load. */
  share: number;
}

/** A served load with its pieces and its nominal size. */
export interface ServedLoad {
  load: Load;
  size: LoadSize;
  pieces: Piece[];
  /** Where it may be said to sit: its bus, or both ends of its run. */
  places: string[];
}

export type Ends = readonly [plus: Conductor, minus: Conductor];
export const THREE_SIDES: Ends[] = [
  ['L1', 'L2'],
  ['L2', 'L3'],
  ['L3', 'L1'],
];

export const sidesOf = (load: Load): Ends[] =>
  load.terminals === 'three-phase' ? THREE_SIDES : [load.terminals.split('-') as unknown as Ends];

/** The loads whose every terminal is live, in file order. */
export const servedLoads = (job: Job, topology: Topology): ServedLoad[] =>
  job.loads.flatMap((load) => {
    const run = job.runs.find((r) => r.id === load.along);
    const places = run ? [run.from, run.to] : [load.bus!];
    const sides = sidesOf(load);
    const nodes = places.flatMap((bus) => sides.flat().map((c) => nodeOf(bus, c)));
    if (run?.open || !nodes.every((node) => topology.live.has(node))) return [];
    const supply = supplyAt(topology, places[0]!)!;
    const nominalVolts = abs(nominalBetween(supply, ...sides[0]!));
    const share = (load.terminals === 'three-phase' ? 1 / Math.sqrt(3) : 1) / places.length;
    const pieces = places.flatMap((bus) =>
      sides.map(([plus, minus]) => ({
        plus: nodeOf(bus, plus),
        minus: nodeOf(bus, minus),
        nominal: nominalBetween(supply, plus, minus),
        share,
      })),
    );
    return [{ load, size: loadSize(job, load, nominalVolts), pieces, places }];
  });

/** What a load does in one solve: its line amps (signed), lag in degrees, and how it follows the voltage. */
export interface Drawn {
  amps: number;
  lag: number;
  behaviour: 'nominal' | 'local' | 'power' | 'impedance';
}

/** Current out of `plus` of a piece at voltage `v` (impedance pieces sit in Y and draw none here). */
export const pieceCurrent = (piece: Piece, drawn: Drawn, v: Complex): Complex => {
  const amps = drawn.amps * piece.share;
  switch (drawn.behaviour) {
    case 'nominal':
      return mul(unit(piece.nominal), polar(amps, -drawn.lag));
    case 'local':
      return mul(unit(v), polar(amps, -drawn.lag));
    case 'power':
      return conj(div(pieceVa(piece, drawn), v));
    case 'impedance':
      return { re: 0, im: 0 };
  }
};

const pieceVa = (piece: Piece, drawn: Drawn): Complex =>
  polar(abs(piece.nominal) * drawn.amps * piece.share, drawn.lag);

/** y = conj(S)/V² at nominal volts. */
export const pieceAdmittance = (piece: Piece, drawn: Drawn): Complex =>
  scale(conj(pieceVa(piece, drawn)), 1 / abs(piece.nominal) ** 2);
