import type { Conductor, Job, Load } from '@farlug/solver/job';
import { abs, type Complex, conj, div, mul, scale, unit } from './complex.ts';
import { type Decimal, ROOT3, UNITY } from './decimal.ts';
import { type LoadSize, loadSize } from './load-size.ts';
import { nodeOf, nominalBetween, supplyAt, type Topology } from './topology.ts';

/** A two-terminal piece of a load: a pair, a side of the delta, or half of a spread load at one end of its run. */
export interface Piece {
  plus: string;
  minus: string;
  /** Nominal EMF between its ends: its size and its direction. */
  volts: Decimal;
  direction: Complex;
  /** Amps in this piece per line amp of the load. */
  share: Decimal;
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
    const share = (load.terminals === 'three-phase' ? UNITY.div(ROOT3) : UNITY).div(places.length);
    const emfs = sides.map(([plus, minus]) => nominalBetween(supply, plus, minus));
    const pieces = places.flatMap((bus) =>
      sides.map(([plus, minus], k) => ({
        plus: nodeOf(bus, plus),
        minus: nodeOf(bus, minus),
        volts: abs(emfs[k]!),
        direction: unit(emfs[k]!),
        share,
      })),
    );
    return [{ load, size: loadSize(job, load, nominalVolts), pieces, places }];
  });

/** What a load does in one solve: its line amps (signed), its lag, and how it follows the voltage. */
export interface Drawn {
  amps: Decimal;
  lag: Complex;
  behaviour: 'nominal' | 'local' | 'power' | 'impedance';
}

/** Whether the current depends on the voltage in a way that no matrix holds. */
export const follows = ({ behaviour, amps }: Drawn): boolean =>
  (behaviour === 'power' || behaviour === 'local') && !amps.isZero();

/** Current out of `plus` of a piece at voltage `v` between its ends (given where the current depends on it). */
export const pieceCurrent = (piece: Piece, drawn: Drawn, v: Complex | null): Complex => {
  const amps = drawn.amps.times(piece.share);
  switch (drawn.behaviour) {
    case 'nominal':
      return mul(piece.direction, scale(drawn.lag, amps));
    case 'local':
      return mul(unit(v!), scale(drawn.lag, amps));
    case 'power':
      return conj(div(pieceVa(piece, drawn), v!));
    case 'impedance':
      return mul(pieceAdmittance(piece, drawn), v!);
  }
};

const pieceVa = (piece: Piece, drawn: Drawn): Complex =>
  scale(conj(drawn.lag), piece.volts.times(drawn.amps).times(piece.share));

/** y = conj(S)/V² at nominal volts. */
export const pieceAdmittance = (piece: Piece, drawn: Drawn): Complex =>
  scale(conj(pieceVa(piece, drawn)), UNITY.div(piece.volts.times(piece.volts)));
