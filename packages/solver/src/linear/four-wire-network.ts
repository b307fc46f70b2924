import { type BlockFactor, blockFactor, factorBlocks, solveBlocks } from './block-elimination.ts';
import { addProduct, addSymmetric, addTimes, addUnit, invert, PACKED, type Values } from './blocks.ts';
import { type Forest, forestOf } from './forest.ts';
import { type Rings, ringsOf } from './rings.ts';
import { type SpecialSteps, specialSteps } from './special-steps.ts';

/** Symmetric admittance blocks at buses, siemens, 10 values each: impedance loads, earth electrodes. */
export interface Shunts {
  bus: Int32Array;
  yRe: Values;
  yIm: Values;
}

const NO_STEPS = new Int32Array(0);

/**
 * A network of buses with four coupled conductors, current sinks and shunts. Analysed once for its topology, given
 * impedances as often as they change, solved for any currents.
 *
 * Every step k of the forest obeys x_k = own_k + X_k·x_up. X is the unit block wherever no shunt lies beyond: there the
 * sweep needs neither factor nor inverse. Else X = (1 + Z·S)⁻¹ for a run Z with all the admittance S that lies at and
 * beyond its far end; inside a piece of rings it is the answer to a unit voltage at the piece's top.
 */
export class FourWireNetwork {
  readonly forest: Forest;
  readonly rings: Rings | null;
  private readonly factor: BlockFactor | null;
  private readonly stepOf: Int32Array | null;
  private special: SpecialSteps;
  private zRe: Values = new Float64Array(0);
  private zIm: Values = new Float64Array(0);
  /** X and, while it is worked out, S by slot, 16 values each. */
  private xRe: Values = new Float64Array(0);
  private xIm: Values = new Float64Array(0);
  private sRe: Values = new Float64Array(0);
  private sIm: Values = new Float64Array(0);
  /** Currents by step, the source's last; volts of the rings by position. */
  private readonly cRe: Values;
  private readonly cIm: Values;
  private readonly ringRe: Values;
  private readonly ringIm: Values;
  private readonly partRe: Values = new Float64Array(16);
  private readonly partIm: Values = new Float64Array(16);

  /** Buses 0 … buses − 1 and the source `buses`; run e joins from[e] and to[e]. */
  constructor(buses: number, from: Int32Array, to: Int32Array) {
    this.forest = forestOf(buses, from, to);
    this.rings = ringsOf(this.forest);
    const { count, bus } = this.forest;
    this.factor = this.rings && blockFactor(this.rings.elimination);
    this.stepOf = bus && stepsOf(buses, bus);
    this.special = specialSteps(this.forest, this.rings, NO_STEPS);
    this.cRe = new Float64Array(4 * count + 4);
    this.cIm = new Float64Array(4 * count + 4);
    this.ringRe = new Float64Array(4 * (this.rings?.step.length ?? 0));
    this.ringIm = new Float64Array(4 * (this.rings?.step.length ?? 0));
  }

  /**
   * Takes impedance blocks by run, ohm, 10 values each (the arrays may be kept), and shunts at buses that are reached.
   * Returns −1, or the bus at which the matrix is singular.
   */
  setValues(zRe: Values, zIm: Values, shunts: Shunts | null = null): number {
    const { forest, rings, factor } = this;
    this.zRe = zRe;
    this.zIm = zIm;
    const at = shunts ? (this.stepOf ? shunts.bus.map((bus) => this.stepOf![bus]!) : shunts.bus) : NO_STEPS;
    this.special = specialSteps(forest, rings, at);
    const { step, up, slot, ring, slots, slotOf } = this.special;
    this.xRe = new Float64Array(16 * slots);
    this.xIm = new Float64Array(16 * slots);
    this.sRe = new Float64Array(16 * slots);
    this.sIm = new Float64Array(16 * slots);
    if (shunts)
      for (let i = 0; i < at.length; i++)
        addFull(shunts.yRe, shunts.yIm, 10 * i, this.sRe, this.sIm, 16 * slotOf[at[i]!]!);
    if (rings && factor) this.fillRings(rings, factor);
    for (let i = step.length - 1, piece = 0; i >= 0; i--) {
      const k = step[i]!;
      if (ring[i]! < 0) {
        if (!this.foldRun(k, slot[i]!, up[i]!)) return this.busOf(k);
      } else if (rings!.firstStep[piece] === k) {
        const missing = this.foldPiece(rings!, factor!, piece++, slot[i]! >= 0);
        if (missing >= 0) return this.busOf(rings!.step[rings!.elimination.order[missing]!]!);
      }
    }
    return -1;
  }

  /**
   * Volts at each bus against the source, for currents put in at each: four values a bus. The outputs also have the
   * source's four, which are zero; where no source reaches a bus they are NaN.
   */
  solve(bRe: Values, bIm: Values, outRe: Values, outIm: Values): void {
    const { bus, count } = this.forest;
    if (!bus) {
      this.cRe.set(bRe);
      this.cIm.set(bIm);
      this.sweep(outRe, outIm);
      return;
    }
    gather(bus, bRe, this.cRe);
    gather(bus, bIm, this.cIm);
    const vRe = new Float64Array(4 * count + 4);
    const vIm = new Float64Array(4 * count + 4);
    this.sweep(vRe, vIm);
    scatter(bus, vRe, outRe);
    scatter(bus, vIm, outIm);
  }

  private sweep(vRe: Values, vIm: Values): void {
    this.sweepIn();
    if (this.factor) solveBlocks(this.factor, 0, this.factor.elimination.n, this.ringRe, this.ringIm);
    this.sweepOut(vRe, vIm);
  }

  /** Currents towards the source: c_up += Xᵀ·c. */
  private sweepIn(): void {
    const { near, count } = this.forest;
    const { step, up, slot, ring } = this.special;
    const { cRe, cIm, ringRe, ringIm } = this;
    const position = this.rings?.elimination.position;
    for (let i = step.length - 1, k = count - 1; k >= 0; i--, k--) {
      const stop = i < 0 ? -1 : step[i]!;
      addUp(near, cRe, cIm, k, stop);
      if (stop < 0) break;
      k = stop;
      if (ring[i]! >= 0) {
        const p = 4 * position![ring[i]!]!;
        for (let j = 0; j < 4; j++) {
          ringRe[p + j] = cRe[4 * k + j]!;
          ringIm[p + j] = cIm[4 * k + j]!;
        }
      }
      const to = 4 * up[i]!;
      if (slot[i]! >= 0) addTimes(true, this.xRe, this.xIm, 16 * slot[i]!, cRe, cIm, 4 * k, cRe, cIm, to);
      else
        for (let j = 0; j < 4; j++) {
          cRe[to + j]! += cRe[4 * k + j]!;
          cIm[to + j]! += cIm[4 * k + j]!;
        }
    }
  }

  /** Volts outwards: v_k = own_k + X_k·v_up. */
  private sweepOut(vRe: Values, vIm: Values): void {
    const { near, run, count } = this.forest;
    const { step, up, slot, ring } = this.special;
    const { cRe, cIm, ringRe, ringIm, partRe, partIm, zRe, zIm } = this;
    const position = this.rings?.elimination.position;
    vRe.fill(0, 4 * count);
    vIm.fill(0, 4 * count);
    for (let i = 0, k = 0; k < count; i++, k++) {
      const stop = i < step.length ? step[i]! : count;
      addOut(near, run, zRe, zIm, cRe, cIm, vRe, vIm, k, stop);
      if (stop === count) break;
      k = stop;
      // `part` is what the step adds by itself: in its second half, for a run with shunts, before X.
      const from = ring[i]! >= 0 ? 4 * position![ring[i]!]! : 0;
      const to = 4 * up[i]!;
      const plain = slot[i]! < 0;
      if (ring[i]! >= 0)
        for (let j = 0; j < 4; j++) {
          vRe[4 * k + j] = ringRe[from + j]! + (plain ? vRe[to + j]! : 0);
          vIm[4 * k + j] = ringIm[from + j]! + (plain ? vIm[to + j]! : 0);
        }
      if (plain) continue;
      const x = 16 * slot[i]!;
      for (let j = 0; j < 4; j++) {
        partRe[j] = vRe[to + j]!;
        partIm[j] = vIm[to + j]!;
      }
      if (ring[i]! < 0) {
        addSymmetric(zRe, zIm, 10 * (run ? run[k]! : k), cRe, cIm, 4 * k, partRe, partIm, 0);
        vRe.fill(0, 4 * k, 4 * k + 4);
        vIm.fill(0, 4 * k, 4 * k + 4);
      }
      addTimes(false, this.xRe, this.xIm, x, partRe, partIm, 0, vRe, vIm, 4 * k);
    }
  }

  /** Admittances of the runs in rings, as branches between unknowns and as row sums towards their tops. */
  private fillRings(rings: Rings, factor: BlockFactor): void {
    const { elimination, coupled, tied } = rings;
    factor.shareRe.fill(0);
    factor.shareIm.fill(0);
    factor.sumRe.fill(0);
    factor.sumIm.fill(0);
    for (let e = 0; e < coupled.run.length; e++)
      this.addAdmittance(coupled.run[e]!, factor.shareRe, factor.shareIm, 16 * elimination.place[e]!);
    for (let t = 0; t < tied.run.length; t++)
      this.addAdmittance(tied.run[t]!, factor.sumRe, factor.sumIm, 16 * elimination.position[tied.a[t]!]!);
  }

  private addAdmittance(run: number, toRe: Values, toIm: Values, to: number): void {
    const { partRe, partIm } = this;
    partRe.fill(0);
    partIm.fill(0);
    addFull(this.zRe, this.zIm, 10 * run, partRe, partIm, 0);
    if (!invert(partRe, partIm, 0)) throw new RangeError(`run ${run} has a singular impedance`);
    for (let j = 0; j < 16; j++) {
      toRe[to + j]! += partRe[j]!;
      toIm[to + j]! += partIm[j]!;
    }
  }

  /** X = (1 + Z·S)⁻¹ of a run, and S·X onto what it hangs on; false where it is singular. */
  private foldRun(k: number, slot: number, up: number): boolean {
    const { xRe, xIm, sRe, sIm, partRe, partIm } = this;
    const { run, count } = this.forest;
    const at = 16 * slot;
    partRe.fill(0);
    partIm.fill(0);
    addFull(this.zRe, this.zIm, 10 * (run ? run[k]! : k), partRe, partIm, 0);
    addUnit(xRe, at);
    addProduct(false, partRe, partIm, 0, sRe, sIm, at, xRe, xIm, at);
    if (!invert(xRe, xIm, at)) return false;
    if (up !== count) this.raise(slot, up);
    return true;
  }

  private raise(slot: number, up: number): void {
    const { xRe, xIm, sRe, sIm } = this;
    const to = 16 * this.special.slotOf[up]!;
    addProduct(false, sRe, sIm, 16 * slot, xRe, xIm, 16 * slot, sRe, sIm, to);
  }

  /** Factors a piece; where a shunt lies in it or beyond, works out X of its steps and raises them onto its top. */
  private foldPiece(rings: Rings, factor: BlockFactor, piece: number, shunted: boolean): number {
    const { elimination, pieces, step, top } = rings;
    const from = pieces[piece]!;
    const end = pieces[piece + 1]!;
    if (!shunted) return factorBlocks(factor, from, end);
    const { sRe, sIm, xRe, xIm } = this;
    const { slotOf } = this.special;
    const tiedRe = factor.sumRe.slice(16 * from, 16 * end);
    const tiedIm = factor.sumIm.slice(16 * from, 16 * end);
    for (let p = from; p < end; p++) {
      const at = 16 * slotOf[step[elimination.order[p]!]!]!;
      for (let j = 0; j < 16; j++) {
        factor.sumRe[16 * p + j]! += sRe[at + j]!;
        factor.sumIm[16 * p + j]! += sIm[at + j]!;
      }
    }
    const missing = factorBlocks(factor, from, end);
    if (missing >= 0) return missing;
    // The answer to a unit voltage at the top on each conductor in turn: one column of X.
    const { ringRe, ringIm } = this;
    for (let c = 0; c < 4; c++) {
      for (let p = from; p < end; p++)
        for (let j = 0; j < 4; j++) {
          ringRe[4 * p + j] = tiedRe[16 * (p - from) + 4 * j + c]!;
          ringIm[4 * p + j] = tiedIm[16 * (p - from) + 4 * j + c]!;
        }
      solveBlocks(factor, from, end, ringRe, ringIm);
      for (let p = from; p < end; p++) {
        const at = 16 * slotOf[step[elimination.order[p]!]!]!;
        for (let j = 0; j < 4; j++) {
          xRe[at + 4 * j + c] = ringRe[4 * p + j]!;
          xIm[at + 4 * j + c] = ringIm[4 * p + j]!;
        }
      }
    }
    const hangsOn = top[elimination.order[from]!]!;
    if (hangsOn !== this.forest.count)
      for (let p = from; p < end; p++) this.raise(slotOf[step[elimination.order[p]!]!]!, hangsOn);
    return -1;
  }

  private busOf(step: number): number {
    return this.forest.bus ? this.forest.bus[step]! : step;
  }
}

/** The tight loops: plain runs k … stop + 1 downwards, and k … stop − 1 upwards. */
function addUp(near: Int32Array, cRe: Values, cIm: Values, from: number, stop: number): void {
  for (let k = from; k > stop; k--) {
    const at = 4 * k;
    const to = 4 * near[k]!;
    cRe[to] = cRe[to]! + cRe[at]!;
    cIm[to] = cIm[to]! + cIm[at]!;
    cRe[to + 1] = cRe[to + 1]! + cRe[at + 1]!;
    cIm[to + 1] = cIm[to + 1]! + cIm[at + 1]!;
    cRe[to + 2] = cRe[to + 2]! + cRe[at + 2]!;
    cIm[to + 2] = cIm[to + 2]! + cIm[at + 2]!;
    cRe[to + 3] = cRe[to + 3]! + cRe[at + 3]!;
    cIm[to + 3] = cIm[to + 3]! + cIm[at + 3]!;
  }
}

function addOut(
  near: Int32Array,
  run: Int32Array | null,
  zRe: Values,
  zIm: Values,
  cRe: Values,
  cIm: Values,
  vRe: Values,
  vIm: Values,
  from: number,
  stop: number,
): void {
  for (let k = from; k < stop; k++) {
    const at = 4 * k;
    const up = 4 * near[k]!;
    for (let j = 0; j < 4; j++) {
      vRe[at + j] = vRe[up + j]!;
      vIm[at + j] = vIm[up + j]!;
    }
    addSymmetric(zRe, zIm, 10 * (run ? run[k]! : k), cRe, cIm, at, vRe, vIm, at);
  }
}

function addFull(sRe: Values, sIm: Values, from: number, aRe: Values, aIm: Values, to: number): void {
  for (let j = 0; j < 16; j++) {
    aRe[to + j]! += sRe[from + PACKED[j]!]!;
    aIm[to + j]! += sIm[from + PACKED[j]!]!;
  }
}

function stepsOf(buses: number, bus: Int32Array): Int32Array {
  const steps = new Int32Array(buses).fill(-1);
  for (let k = 0; k < bus.length; k++) steps[bus[k]!] = k;
  return steps;
}

function gather(bus: Int32Array, from: Values, into: Values): void {
  for (let k = 0; k < bus.length; k++) for (let j = 0; j < 4; j++) into[4 * k + j] = from[4 * bus[k]! + j]!;
  into.fill(0, 4 * bus.length);
}

function scatter(bus: Int32Array, from: Values, into: Values): void {
  into.fill(Number.NaN);
  into.fill(0, into.length - 4);
  for (let k = 0; k < bus.length; k++) for (let j = 0; j < 4; j++) into[4 * bus[k]! + j] = from[4 * k + j]!;
}
