import { type Forest, forestOf } from './forest.ts';
import { factorReal, type RealFactor, solveReal } from './real-elimination.ts';
import { type Rings, ringsOf } from './rings.ts';

/**
 * A network of one conductor with current sinks and nothing else to earth: direct current, or alternating current
 * where every load has the same angle and only resistance counts. Analysed once for its topology, given ohms as often
 * as they change, solved for any sinks.
 *
 * A tree needs no factor: its pivots are the runs' own conductances and L is −1 everywhere, so that currents are added
 * up towards the source and volts outwards (a sweep without a single subtraction). Only rings are eliminated.
 */
export class RealNetwork {
  readonly forest: Forest;
  readonly rings: Rings | null;
  readonly factor: RealFactor | null;
  /** Ohms by step; the caller's own array where steps are numbered like runs. */
  ohms: Float64Array = new Float64Array(0);
  /** After `solve`: amperes through each step's run, or out of its bus into the piece for a step in a ring. */
  readonly current: Float64Array;
  /** After `solve`: volts of each unknown of the rings against its top, by position. */
  readonly ringVolts: Float64Array;
  private readonly shunt: Float64Array;

  /** Buses 0 … buses − 1 and the source `buses`; run e joins from[e] and to[e]. */
  constructor(buses: number, from: Int32Array, to: Int32Array) {
    this.forest = forestOf(buses, from, to);
    this.rings = ringsOf(this.forest);
    this.current = new Float64Array(this.forest.count + 1);
    const inside = this.rings?.elimination;
    this.factor = inside
      ? {
          elimination: inside,
          inverse: new Float64Array(inside.n),
          share: new Float64Array(inside.rows.length),
        }
      : null;
    this.ringVolts = new Float64Array(inside?.n ?? 0);
    this.shunt = new Float64Array(inside?.n ?? 0);
  }

  /** Takes ohms by run, all above zero. The array may be kept: change it, and call this again. */
  setOhms(ohms: Float64Array): void {
    const { run } = this.forest;
    this.ohms = run ? Float64Array.from(run, (e) => ohms[e]!) : ohms;
    if (this.rings) this.factorPieces(this.rings, ohms, 0, this.rings.firstStep.length);
  }

  /** Factors pieces from … end − 1 anew, for ohms by run. */
  factorPieces(
    { elimination, pieces, coupled, tied }: Rings,
    ohms: Float64Array,
    from: number,
    end: number,
  ): void {
    const first = pieces[from]!;
    const last = pieces[end]!;
    const { share } = this.factor!;
    share.fill(0, elimination.columns[first]!, elimination.columns[last]!);
    for (let p = coupled.start[from]!; p < coupled.start[end]!; p++)
      share[elimination.place[p]!]! += 1 / ohms[coupled.run[p]!]!;
    const shunt = this.shunt.fill(0, first, last);
    for (let t = tied.start[from]!; t < tied.start[end]!; t++)
      shunt[elimination.position[tied.a[t]!]!]! += 1 / ohms[tied.run[t]!]!;
    factorReal(this.factor!, shunt, first, last);
  }

  /**
   * Volts lost from the source to each bus, for amperes drawn at each. `volts` also has the source's, zero; where no
   * source reaches a bus it is NaN.
   */
  solve(amps: Float64Array, volts: Float64Array): void {
    const { forest, rings, current, ohms } = this;
    const { count, near, bus } = forest;
    if (bus) {
      for (let k = 0; k < count; k++) current[k] = amps[bus[k]!]!;
      current[count] = 0;
    } else current.set(amps);
    const lost = bus ? new Float64Array(count + 1) : volts;
    lost[count] = 0;
    if (rings) {
      sweepIntoRings(near, current, rings, this.ringVolts);
      solveReal(this.factor!, this.ringVolts, 0, this.ringVolts.length);
      sweepOutOfRings(near, ohms, current, lost, rings, this.ringVolts);
    } else {
      for (let k = count - 1; k >= 0; k--) current[near[k]!]! += current[k]!;
      for (let k = 0; k < count; k++) lost[k] = lost[near[k]!]! + ohms[k]! * current[k]!;
    }
    if (bus) {
      volts.fill(Number.NaN);
      volts[volts.length - 1] = 0;
      for (let k = 0; k < count; k++) volts[bus[k]!] = lost[k]!;
    }
  }
}

/** Currents towards the source: a piece's flow past it into its top, and are the right side of the piece. */
function sweepIntoRings(
  near: Int32Array,
  current: Float64Array,
  { step, top, elimination }: Rings,
  right: Float64Array,
): void {
  for (let u = step.length - 1, k = near.length - 1; k >= 0; u--, k--) {
    for (const ring = u < 0 ? -1 : step[u]!; k > ring; k--) current[near[k]!]! += current[k]!;
    if (u < 0) break;
    current[top[u]!]! += current[k]!;
    right[elimination.position[u]!] = current[k]!;
  }
}

function sweepOutOfRings(
  near: Int32Array,
  ohms: Float64Array,
  current: Float64Array,
  lost: Float64Array,
  { step, top, elimination }: Rings,
  ringVolts: Float64Array,
): void {
  const count = near.length;
  for (let k = 0, u = 0; k < count; u++, k++) {
    for (const ring = u < step.length ? step[u]! : count; k < ring; k++)
      lost[k] = lost[near[k]!]! + ohms[k]! * current[k]!;
    if (k === count) break;
    lost[k] = lost[top[u]!]! + ringVolts[elimination.position[u]!]!;
  }
}
