import { analyse, type BranchValues, type Factor, factor, type Symbolic } from '../linear/index.ts';
import type { Element } from './element.ts';
import type { Network } from './network.ts';
import { type Refusal, refusal } from './refusal.ts';
import type { Sink } from './sinks.ts';

/** The unknowns of a network and the pattern of its admittance matrix, impedance loads included. */
export interface Layout {
  network: Network;
  /** Node → unknown, −1 for a fixed node. */
  unknownOf: Int32Array;
  nodeOf: Int32Array;
  symbolic: Symbolic;
  /** Sinks that may be stamped as admittances. */
  impedanceSinks: readonly Sink[];
}

/** An element on one conductor pair, or a winding: pairs of its free nodes, for the pattern. */
const freePairs = (nodes: readonly number[], unknownOf: Int32Array): (readonly [number, number])[] => {
  const free = [...new Set(nodes)].map((n) => unknownOf[n]!).filter((u) => u >= 0);
  return free.flatMap((a, i) => free.slice(i + 1).map((b) => [a, b] as const));
};

export function layOut(network: Network, impedanceSinks: readonly Sink[]): Layout {
  const { nodes, elements } = network;
  const unknownOf = new Int32Array(nodes.count).fill(-1);
  const nodeOf: number[] = [];
  for (let n = 0; n < nodes.count; n++) if (!nodes.fixed[n]) unknownOf[n] = nodeOf.push(n) - 1;
  const a: number[] = [];
  const b: number[] = [];
  const couple = (at: readonly number[]) => {
    for (const [i, j] of freePairs(at, unknownOf)) {
      a.push(i);
      b.push(j);
    }
  };
  for (const e of elements) couple(e.nodes);
  for (const sink of impedanceSinks) couple([sink.a, sink.b]);
  const symbolic = analyse(nodeOf.length, a, b);
  return { network, unknownOf, nodeOf: Int32Array.from(nodeOf), symbolic, impedanceSinks };
}

/** A factored admittance matrix, and the right side that the references leave (see `Nodes.referenceRe`). */
export interface Stamped {
  layout: Layout;
  factor: Factor;
  elements: readonly Element[];
  /** − Y·reference + source currents, by unknown: zero wherever the references already balance. */
  baseRe: Float64Array;
  baseIm: Float64Array;
}

/** Adds element after element to branch values; shared by everything that stamps. */
class Stamper {
  readonly values: BranchValues;
  readonly baseRe: Float64Array;
  readonly baseIm: Float64Array;
  private pair = 0;
  private readonly layout: Layout;

  constructor(layout: Layout) {
    const n = layout.nodeOf.length;
    const pairs = layout.symbolic.pairA.length;
    this.layout = layout;
    this.values = {
      branchRe: new Float64Array(pairs),
      branchIm: new Float64Array(pairs),
      shuntRe: new Float64Array(n),
      shuntIm: new Float64Array(n),
    };
    this.baseRe = new Float64Array(n);
    this.baseIm = new Float64Array(n);
  }

  /** y·u·uᵀ on `nodes`, and minus the current that the references drive through it. */
  add(
    nodes: readonly number[],
    u: readonly number[],
    yRe: number,
    yIm: number,
    emfRe: number,
    emfIm: number,
  ): void {
    const { unknownOf, network } = this.layout;
    const { referenceRe, referenceIm } = network.nodes;
    const { branchRe, branchIm, shuntRe, shuntIm } = this.values;
    // Nodes may coincide where runs of no impedance merged them: their entries of u add up.
    const distinct = [...new Set(nodes)];
    const weight = distinct.map((n) => {
      let sum = 0;
      for (let k = 0; k < nodes.length; k++) if (nodes[k] === n) sum += u[k]!;
      return sum;
    });
    let driveRe = -emfRe;
    let driveIm = -emfIm;
    let freeSum = 0;
    const free: number[] = [];
    for (let k = 0; k < distinct.length; k++) {
      const n = distinct[k]!;
      driveRe += weight[k]! * referenceRe[n]!;
      driveIm += weight[k]! * referenceIm[n]!;
      if (unknownOf[n]! >= 0) {
        free.push(k);
        freeSum += weight[k]!;
      }
    }
    const currentRe = yRe * driveRe - yIm * driveIm;
    const currentIm = yRe * driveIm + yIm * driveRe;
    for (let i = 0; i < free.length; i++) {
      const k = free[i]!;
      const at = unknownOf[distinct[k]!]!;
      shuntRe[at]! += weight[k]! * freeSum * yRe;
      shuntIm[at]! += weight[k]! * freeSum * yIm;
      this.baseRe[at]! -= weight[k]! * currentRe;
      this.baseIm[at]! -= weight[k]! * currentIm;
      for (let j = i + 1; j < free.length; j++) {
        const at = this.pair++;
        const product = -weight[k]! * weight[free[j]!]!;
        branchRe[at] = product * yRe;
        branchIm[at] = product * yIm;
      }
    }
  }
}

/**
 * Stamps and factors. `conductance` gives for each impedance sink its admittance (re, im), siemens.
 * Refused: a matrix that is singular at some node, naming its bus.
 */
export function stamp(
  layout: Layout,
  elements: readonly Element[],
  admittance: (sink: Sink) => readonly [re: number, im: number],
): Stamped | Refusal {
  const stamper = new Stamper(layout);
  for (const e of elements) stamper.add(e.nodes, e.u, e.yRe, e.yIm, e.emfRe, e.emfIm);
  for (const sink of layout.impedanceSinks) {
    const [re, im] = admittance(sink);
    stamper.add([sink.a, sink.b], [1, -1], re, im, 0, 0);
  }
  const outcome = factor(layout.symbolic, stamper.values);
  if (!outcome.ok) {
    const { nodes, buses } = layout.network;
    const bus = buses.ids[nodes.busOf[layout.nodeOf[outcome.unknown]!]!]!;
    return refusal(
      `bus ${bus}`,
      'its voltage is not determined: nothing ties one of its conductors to a source',
    );
  }
  return { layout, factor: outcome.factor, elements, baseRe: stamper.baseRe, baseIm: stamper.baseIm };
}
