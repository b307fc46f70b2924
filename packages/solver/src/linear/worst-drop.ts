import { RangeMaximum } from './range-maximum.ts';
import { solveReal } from './real-elimination.ts';
import type { RealNetwork } from './real-network.ts';
import type { Rings } from './rings.ts';

/**
 * The largest drop of a solved network while single runs and loads change. What hangs on a step is a range of places
 * (its tour of the tree), and a change of the run to it moves the whole range alike: O(log n) for a run, O(log n) for
 * each run on the way to the source for a load. A change in a ring solves its piece again and nothing else.
 */
export class WorstDrop {
  private readonly network: RealNetwork;
  private readonly drops: RangeMaximum;
  /** Steps in the order of their places, and each step's range. */
  private readonly place: Int32Array;
  private readonly end: Int32Array;
  private readonly stepAt: Int32Array;
  private readonly stepOfBus: Int32Array | null;
  private readonly stepOfRun: Int32Array | null;
  /** Ohms by run. */
  private readonly ohms: Float64Array;
  private readonly amps: Float64Array;
  private readonly ringOf: Int32Array | null;
  private readonly pieceOf: Int32Array;
  private readonly ringRuns: Map<number, RingRun>;
  private readonly unitVolts: Float64Array;

  /**
   * `network` as solved for `ohms` by run and `amps` by bus, which gave `volts`; only drops at `judged` buses count.
   * The arrays are copied.
   */
  constructor(
    network: RealNetwork,
    ohms: Float64Array,
    amps: Float64Array,
    volts: Float64Array,
    judged: (bus: number) => boolean,
  ) {
    const { forest, rings } = network;
    const { count, bus, run } = forest;
    this.network = network;
    this.ohms = ohms.slice();
    if (!run) network.ohms = this.ohms;
    this.amps = amps.slice();
    const tour = tourOf(forest.near);
    this.place = tour.place;
    this.end = tour.end;
    this.stepAt = new Int32Array(count);
    const values = new Float64Array(count);
    for (let k = 0; k < count; k++) {
      const at = this.place[k]!;
      this.stepAt[at] = k;
      const b = bus ? bus[k]! : k;
      values[at] = judged(b) ? volts[b]! : Number.NEGATIVE_INFINITY;
    }
    this.drops = new RangeMaximum(values);
    this.stepOfBus = bus && inverse(bus, amps.length);
    this.stepOfRun = run && inverse(run, ohms.length);
    this.ringOf = rings && inverse(rings.step, count + 1);
    this.pieceOf = rings ? piecesByPosition(rings) : new Int32Array(0);
    this.unitVolts = new Float64Array(network.ringVolts.length);
    this.ringRuns = rings ? ringRunsOf(rings, this.pieceOf) : new Map();
  }

  /** Volts of the largest drop, and the bus where it is. */
  get volts(): number {
    return this.drops.maximum;
  }
  get bus(): number {
    const step = this.stepAt[this.drops.place]!;
    const { bus } = this.network.forest;
    return bus ? bus[step]! : step;
  }

  /** The run gets other ohms, above zero. */
  setOhms(run: number, ohms: number): void {
    const { network } = this;
    const change = ohms - this.ohms[run]!;
    this.ohms[run] = ohms;
    const ring = this.ringRuns.get(run);
    if (ring) {
      network.factorPieces(network.rings!, this.ohms, ring.piece, ring.piece + 1);
      this.solvePiece(network.rings!, ring.piece);
      return;
    }
    const k = this.stepOf(run);
    if (k < 0) return;
    network.ohms[k] = ohms;
    this.drops.add(this.place[k]!, this.end[k]!, change * network.current[k]!);
  }

  /** The load at a bus draws other amperes. */
  setAmps(bus: number, amps: number): void {
    const { network } = this;
    const { near, count } = network.forest;
    const change = amps - this.amps[bus]!;
    this.amps[bus] = amps;
    for (let k = this.stepOfBus ? this.stepOfBus[bus]! : bus; k < count && k >= 0; ) {
      network.current[k] = network.current[k]! + change;
      const ring = this.ringOf ? this.ringOf[k]! : -1;
      if (ring >= 0) {
        const rings = network.rings!;
        this.solvePiece(rings, this.pieceOf[rings.elimination.position[ring]!]!);
        k = rings.top[ring]!;
      } else {
        this.drops.add(this.place[k]!, this.end[k]!, change * network.ohms[k]!);
        k = near[k]!;
      }
    }
  }

  /** The largest drop for each of some other ohms of one run, which keeps those that it has. */
  ofSizes(run: number, ohms: ArrayLike<number>, out: Float64Array): void {
    const ring = this.ringRuns.get(run);
    if (ring) {
      this.ofSizesInRing(run, ring, ohms, out);
      return;
    }
    const k = this.stepOf(run);
    const { drops, network } = this;
    const from = k < 0 ? 0 : this.place[k]!;
    const end = k < 0 ? 0 : this.end[k]!;
    const inside = drops.maximumOf(from, end);
    const before = drops.maximumOf(0, from);
    const after = drops.maximumOf(end, this.stepAt.length);
    const outside = Math.max(before, after);
    const amps = k < 0 ? 0 : network.current[k]!;
    for (let i = 0; i < ohms.length; i++) {
      const moved = inside + (ohms[i]! - this.ohms[run]!) * amps;
      out[i] = Math.max(moved, outside);
    }
  }

  /**
   * One solution of the piece for a unit current through the run, z = A⁻¹(e_a − e_b), serves every size: the volts
   * change by −t·z with t = δ·(v_a − v_b) / (1 + δ·(z_a − z_b)), δ being the change of conductance (Sherman and
   * Morrison 1950).
   */
  private ofSizesInRing(
    run: number,
    { piece, a, b }: RingRun,
    ohms: ArrayLike<number>,
    out: Float64Array,
  ): void {
    const { rings, ringVolts, factor } = this.network;
    const from = rings!.pieces[piece]!;
    const end = rings!.pieces[piece + 1]!;
    const z = this.unitVolts.fill(0, from, end);
    z[a] = 1;
    if (b >= 0) z[b] = -1;
    solveReal(factor!, z, from, end);
    const volts = ringVolts[a]! - (b < 0 ? 0 : ringVolts[b]!);
    const unit = z[a]! - (b < 0 ? 0 : z[b]!);
    const { own, outside } = this.ownMaxima(rings!, from, end);
    for (let i = 0; i < ohms.length; i++) {
      const change = 1 / ohms[i]! - 1 / this.ohms[run]!;
      const t = (change * volts) / (1 + change * unit);
      let worst = outside;
      for (let p = from; p < end; p++) {
        const moved = own[p - from]! - t * z[p]!;
        if (moved > worst) worst = moved;
      }
      out[i] = worst;
    }
  }

  /** Largest drop of what hangs on each position of a piece and on no other of it, and of all the rest. */
  private ownMaxima(rings: Rings, from: number, end: number): { own: Float64Array; outside: number } {
    const { drops, place } = this;
    const stepAt = (p: number) => rings.step[rings.elimination.order[p]!]!;
    const members = Array.from({ length: end - from }, (_, i) => from + i);
    members.sort((p, q) => place[stepAt(p)]! - place[stepAt(q)]!);
    const own = new Float64Array(end - from).fill(Number.NEGATIVE_INFINITY);
    let outside = Number.NEGATIVE_INFINITY;
    let at = 0;
    const open: number[] = [];
    const upTo = (next: number) => {
      const most = drops.maximumOf(at, next);
      const owner = open.at(-1);
      if (owner === undefined) outside = Math.max(outside, most);
      else own[owner - from] = Math.max(own[owner - from]!, most);
      at = next;
    };
    for (const p of members) {
      const start = place[stepAt(p)]!;
      while (open.length > 0 && this.end[stepAt(open.at(-1)!)]! <= start) {
        upTo(this.end[stepAt(open.at(-1)!)]!);
        open.pop();
      }
      upTo(start);
      open.push(p);
    }
    for (; open.length > 0; open.pop()) upTo(this.end[stepAt(open.at(-1)!)]!);
    upTo(this.stepAt.length);
    return { own, outside };
  }

  /** Solves a piece for the currents into it, and moves what hangs on each of its steps with it. */
  private solvePiece(rings: Rings, piece: number): void {
    const { network, drops } = this;
    const { ringVolts, current } = network;
    const { order, position } = rings.elimination;
    const from = rings.pieces[piece]!;
    const end = rings.pieces[piece + 1]!;
    const was = ringVolts.slice(from, end);
    for (let p = from; p < end; p++) ringVolts[p] = current[rings.step[order[p]!]!]!;
    solveReal(network.factor!, ringVolts, from, end);
    for (let p = from; p < end; p++) {
      const k = rings.step[order[p]!]!;
      const parent = this.ringOf![network.forest.near[k]!]!;
      const q = parent < 0 ? -1 : position[parent]!;
      const byParent = q < from || q >= end ? 0 : ringVolts[q]! - was[q - from]!;
      drops.add(this.place[k]!, this.end[k]!, ringVolts[p]! - was[p - from]! - byParent);
    }
  }

  private stepOf(run: number): number {
    if (this.stepOfRun) return this.stepOfRun[run]!;
    return run < this.network.forest.count ? run : -1;
  }
}

/** A run in a ring: its piece, and the positions of its ends, the second −1 where it ends at the piece's top. */
interface RingRun {
  piece: number;
  a: number;
  b: number;
}

function ringRunsOf(rings: Rings, pieceOf: Int32Array): Map<number, RingRun> {
  const { position } = rings.elimination;
  const runs = new Map<number, RingRun>();
  for (const { run, a, b } of [rings.coupled, rings.tied])
    for (let i = 0; i < run.length; i++) {
      const from = position[a[i]!]!;
      runs.set(run[i]!, { piece: pieceOf[from]!, a: from, b: b[i]! < 0 ? -1 : position[b[i]!]! });
    }
  return runs;
}

function piecesByPosition({ pieces }: Rings): Int32Array {
  const pieceOf = new Int32Array(pieces.at(-1)!);
  for (let g = 0; g + 1 < pieces.length; g++) pieceOf.fill(g, pieces[g]!, pieces[g + 1]!);
  return pieceOf;
}

/** Places of the steps in a tour of the tree, children right after their parents, and where each one's range ends. */
function tourOf(near: Int32Array): { place: Int32Array; end: Int32Array } {
  const count = near.length;
  const size = new Int32Array(count + 1).fill(1);
  for (let k = count - 1; k >= 0; k--) size[near[k]!]! += size[k]!;
  const place = new Int32Array(count);
  const end = new Int32Array(count);
  // next[k]: the first free place in k's range; the source's range begins at 0.
  const next = new Int32Array(count + 1);
  for (let k = 0; k < count; k++) {
    place[k] = next[near[k]!]!;
    end[k] = place[k]! + size[k]!;
    next[near[k]!] = end[k]!;
    next[k] = place[k]! + 1;
  }
  return { place, end };
}

/** list[result[i]] = i; −1 where i is not in it. */
function inverse(list: Int32Array, length: number): Int32Array {
  const found = new Int32Array(length).fill(-1);
  for (let i = 0; i < list.length; i++) found[list[i]!] = i;
  return found;
}
