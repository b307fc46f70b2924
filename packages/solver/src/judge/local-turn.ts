import { type PathSolver, pathSolver, solveSmall } from '../linear/index.ts';
import type { Sink } from '../network/index.ts';
import type { Core } from './core.ts';
import type { Extra } from './demand.ts';
import { type Drawn, sinkAdmittance, sinkCurrent } from './sink-current.ts';
import type { State } from './solve-state.ts';
import type { Volts } from './volts.ts';

/** A change of one load against the state that turns start from. */
export interface Change {
  load: number;
  /** What it drew, and what it draws now, as a current at nominal angle or as an admittance. */
  before: Drawn | null;
  after: Drawn | null;
  /** The load is stamped as an admittance before (and after, unless `afterCurrent`). */
  stamped: boolean;
  afterCurrent?: boolean;
}

/** More admittance changes than this are worth a factor of their own. */
export const MOST_ADMITTANCES = 40;

/**
 * Solves changes of a few loads by superposition on the factor of a state whose currents are all fixed, at a few
 * nodes, in the time of their paths to the source. Changed admittances enter by Sherman, Morrison and Woodbury.
 */
export class LocalTurns {
  readonly solver: PathSolver;
  private readonly core: Core;
  private readonly state: State;
  private watched: number[] = [];
  /** Node → the call of `watch` that it was last seen in. */
  private readonly watchedIn: Int32Array;
  private watching = 0;
  private readonly current = new Float64Array(2);

  constructor(core: Core, state: State) {
    this.core = core;
    this.state = state;
    this.solver = pathSolver(state.stamped.factor);
    this.watchedIn = new Int32Array(core.network.nodes.count);
  }

  /** Nodes whose voltages are wanted; the changes' own nodes must be among them. */
  watch(nodes: Iterable<number>): void {
    const { unknownOf } = this.state.stamped.layout;
    this.watching++;
    this.watched = [];
    for (const node of nodes) {
      if (unknownOf[node]! < 0 || this.watchedIn[node] === this.watching) continue;
      this.watchedIn[node] = this.watching;
      this.watched.push(node);
    }
    this.solver.reach(this.watched.map((node) => unknownOf[node]!));
  }

  /** Adds amps·(unit current of a sink) to the right side as a current that leaves a and returns at b. */
  private put(sink: Sink, re: number, im: number): void {
    const { unknownOf } = this.state.stamped.layout;
    const a = unknownOf[sink.a]!;
    const b = unknownOf[sink.b]!;
    if (a >= 0) this.solver.add(a, -re, -im);
    if (b >= 0) this.solver.add(b, re, im);
  }

  private putDrawn(sink: Sink, drawn: Drawn, sign: 1 | -1): void {
    sinkCurrent(sink, drawn, 'nominal', this.core.network, null, this.current);
    this.put(sink, sign * this.current[0]!, sign * this.current[1]!);
  }

  /** Change of the watched nodes' volts by fixed currents alone, into `out`. */
  private collect(out: Volts): void {
    const { unknownOf } = this.state.stamped.layout;
    for (const node of this.watched) {
      out.re[node] = this.solver.re(unknownOf[node]!);
      out.im[node] = this.solver.im(unknownOf[node]!);
    }
  }

  /** Writes what a current alone changes at the watched nodes into `out`, which holds anything elsewhere. */
  respond(extra: Extra, out: Volts): void {
    this.solver.clear();
    for (const sink of extra.sinks) this.putDrawn(sink, extra.drawn, 1);
    this.solver.solve();
    this.collect(out);
  }

  /** Writes the watched nodes' volts after the changes into `out`, which holds anything elsewhere. */
  solve(changes: readonly Change[], extra: Extra | null, out: Volts): boolean {
    const { volts } = this.state;
    this.solver.clear();
    const admittances: { sink: Sink; re: number; im: number }[] = [];
    for (const { load, before, after, stamped, afterCurrent } of changes)
      for (const sink of this.core.loads[load]!.sinks) {
        if (!stamped) {
          if (before) this.putDrawn(sink, before, -1);
          if (after) this.putDrawn(sink, after, 1);
          continue;
        }
        const [re0, im0] = before ? sinkAdmittance(sink, before) : [0, 0];
        const [re1, im1] = after && !afterCurrent ? sinkAdmittance(sink, after) : [0, 0];
        if (re1 !== re0 || im1 !== im0) admittances.push({ sink, re: re1 - re0, im: im1 - im0 });
        if (after && afterCurrent) this.putDrawn(sink, after, 1);
      }
    if (extra) for (const sink of extra.sinks) this.putDrawn(sink, extra.drawn, 1);
    this.solver.solve();
    this.collect(out);
    for (const node of this.watched) {
      out.re[node]! += volts.re[node]!;
      out.im[node]! += volts.im[node]!;
    }
    return admittances.length === 0 || this.correct(admittances, out);
  }

  /** Adds the effect of changed admittances: t = (I + D·WᵀZW)⁻¹·D·Wᵀv are the currents through them. */
  private correct(list: readonly { sink: Sink; re: number; im: number }[], out: Volts): boolean {
    const k = list.length;
    const { referenceRe, referenceIm } = this.core.network.nodes;
    const columns = list.map(({ sink }) => {
      this.solver.clear();
      this.put(sink, 1, 0);
      this.solver.solve();
      const column = { re: new Float64Array(this.watched.length), im: new Float64Array(this.watched.length) };
      const { unknownOf } = this.state.stamped.layout;
      for (const [i, node] of this.watched.entries()) {
        column.re[i] = this.solver.re(unknownOf[node]!);
        column.im[i] = this.solver.im(unknownOf[node]!);
      }
      return column;
    });
    const placeOf = new Map(this.watched.map((node, i) => [node, i]));
    const across = (of: Float64Array, { a, b }: Sink): number => {
      const i = placeOf.get(a);
      const j = placeOf.get(b);
      return (i === undefined ? 0 : of[i]!) - (j === undefined ? 0 : of[j]!);
    };
    const matrix = new Float64Array(2 * k * k);
    const right = new Float64Array(2 * k);
    for (const [r, { sink, re, im }] of list.entries()) {
      for (const [c, column] of columns.entries()) {
        const vRe = across(column.re, sink);
        const vIm = across(column.im, sink);
        const at = 2 * (r * k + c);
        // A column is the response to a current that leaves a: minus the driving-point impedance.
        matrix[at] = (r === c ? 1 : 0) - (re * vRe - im * vIm);
        matrix[at + 1] = -(re * vIm + im * vRe);
      }
      const vRe = referenceRe[sink.a]! - referenceRe[sink.b]! + (out.re[sink.a]! - out.re[sink.b]!);
      const vIm = referenceIm[sink.a]! - referenceIm[sink.b]! + (out.im[sink.a]! - out.im[sink.b]!);
      right[2 * r] = re * vRe - im * vIm;
      right[2 * r + 1] = re * vIm + im * vRe;
    }
    if (!solveSmall(matrix, right, k, 1)) return false;
    for (const [c, column] of columns.entries()) {
      const tRe = right[2 * c]!;
      const tIm = right[2 * c + 1]!;
      for (const [i, node] of this.watched.entries()) {
        out.re[node]! += tRe * column.re[i]! - tIm * column.im[i]!;
        out.im[node]! += tRe * column.im[i]! + tIm * column.re[i]!;
      }
    }
    return true;
  }
}
