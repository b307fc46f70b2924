import type { Job } from '@farlug/solver/job';
import { add, type Complex, inverse, mul, scale, sub, ZERO } from './complex.ts';
import type { Decimal } from './decimal.ts';
import { type Equations, equationsOf, type Sink, unknownsOf } from './equations.ts';
import { currentsOf, type Settled, settle } from './followers.ts';
import { type Element, MINUS, type Network, networkOf, PLUS } from './network.ts';
import { type Piece, pieceAdmittance, pieceCurrent, type ServedLoad } from './sinks.ts';
import type { State, VoltageAt } from './state.ts';
import type { Topology } from './topology.ts';

export class NotServed extends Error {}

/** Above this nothing conducts as its table says. */
const HOTTEST_C = 2000;

export interface Solved {
  /** With the ohms of the temperatures that the state brings about. */
  elements: Element[];
  fixed: Network['fixed'];
  voltage: VoltageAt;
  /** Current through an element in the sense of its u. */
  through: (element: Element) => Complex;
  /** Response of all voltages to sinks, every EMF and load current set to zero. */
  respond: (sinks: Sink[]) => VoltageAt;
  /** Voltages of the same state with so many times `extra` drawn as well. */
  with: (extra: Sink[]) => (times: Decimal) => VoltageAt;
  /** What flows from outside into the merged node that `node` belongs to. */
  takenAt: (node: string) => Complex;
  /** Current out of `plus` of a piece of a load, impedance loads included. */
  drawnBy: (load: ServedLoad, piece: Piece) => Complex;
}

/**
 * Readies a job for one solve per state. Currents that follow the voltage, loads' and those that warmth brings about, are
 * iterated all together until nothing moves in the first 22 digits. Nodes in `alsoHeld` stand at given voltages.
 */
export const stateSolver = (
  job: Job,
  topology: Topology,
  loads: ServedLoad[],
  alsoHeld: ReadonlyMap<string, Complex> = new Map(),
): ((state: State) => Solved) => {
  const network = networkOf(job, topology);
  for (const [node, v] of alsoHeld) network.fixed.set(node, v);
  const unknowns = unknownsOf(network);
  const { merged, held, row } = unknowns;
  const wires = network.elements.filter((element) => element.warm);
  const known = new Map<string, Equations>();

  const reader =
    (values: readonly Complex[], heldAt: (root: string) => Complex): VoltageAt =>
    (node) => {
      const root = merged.get(node)!;
      const k = row.get(root);
      return k === undefined ? heldAt(root) : values[k]!;
    };
  const reads = (values: readonly Complex[]) => reader(values, (root) => held.get(root)!);
  const readsChange = (values: readonly Complex[]) => reader(values, () => ZERO);

  const impedances = (state: State) =>
    loads.flatMap(({ load, pieces }) => {
      const drawn = state.drawn.get(load.id)!;
      if (drawn.behaviour !== 'impedance') return [];
      return pieces.map((piece) => ({
        ends: [
          [piece.plus, PLUS],
          [piece.minus, MINUS],
        ] as Element['ends'],
        y: pieceAdmittance(piece, drawn),
      }));
    });
  /** Factored once for all states whose impedance loads are the same. */
  const equationsFor = (state: State): Equations => {
    const stamped = [...state.drawn].filter(([, drawn]) => drawn.behaviour === 'impedance');
    const key = stamped.map(([id, { amps }]) => `${id} ${amps}`).join('|');
    if (!known.has(key)) known.set(key, equationsOf(unknowns, [...network.elements, ...impedances(state)]));
    return known.get(key)!;
  };

  return (state) => {
    const equations = equationsFor(state);
    const { steady, followers } = currentsOf(loads, state, wires);
    const still = equations.solve(steady);
    const settled = (also: Sink[], start: Complex[] | null): Settled => {
      const base = also.length === 0 ? still : equations.solve([...steady, ...also]);
      const found = settle(followers, wires, start, (sinks) => {
        const moved = sinks.length === 0 ? null : equations.respond(sinks);
        return reads(base.map((v, k) => (moved ? add(v, moved[k]!) : v)));
      });
      if (!found) throw new NotServed('no solution');
      if (found.celsius.some((each) => each.gt(HOTTEST_C)))
        throw new NotServed('conductor temperatures do not settle');
      return found;
    };
    const { amps, voltage, celsius } = settled([], null);
    const warmed = new Map(
      wires.map((wire, k) => {
        const z = wire.warm!.ohms(celsius[k]!);
        return [wire, { ...wire, y: inverse(z), r: z.re }];
      }),
    );
    const elements = network.elements.map((element) => warmed.get(element) ?? element);

    const through = (element: Element): Complex =>
      mul(
        element.y,
        element.ends.reduce((sum, [node, u]) => add(sum, scale(voltage(node), u)), ZERO),
      );
    const drawnBy = (item: ServedLoad, piece: Piece): Complex =>
      pieceCurrent(piece, state.drawn.get(item.load.id)!, sub(voltage(piece.plus), voltage(piece.minus)));
    return {
      elements,
      fixed: network.fixed,
      voltage,
      through,
      drawnBy,
      takenAt: (node) => {
        const root = merged.get(node);
        let sum = ZERO;
        const leave = (at: string, current: () => Complex, u: Decimal) => {
          if (merged.get(at) === root) sum = add(sum, scale(current(), u));
        };
        for (const element of elements)
          for (const [at, u] of element.ends) leave(at, () => through(element), u);
        const drawn = loads.flatMap((item) =>
          item.pieces.map((piece) => ({ ...piece, current: () => drawnBy(item, piece) })),
        );
        const credits = state.credits.map((each) => ({ ...each, current: () => each.amps }));
        for (const { plus, minus, current } of [...drawn, ...credits]) {
          leave(plus, current, PLUS);
          leave(minus, current, MINUS);
        }
        return sum;
      },
      respond: (sinks) => {
        const now =
          wires.length === 0 ? equations : equationsOf(unknowns, [...elements, ...impedances(state)]);
        return readsChange(now.respond(sinks));
      },
      with: (extra) => {
        if (followers.length === 0) {
          const each = readsChange(equations.respond(extra));
          return (times) => (node) => add(voltage(node), scale(each(node), times));
        }
        let start = amps;
        return (times) => {
          const more = settled(
            extra.map((sink) => ({ ...sink, amps: scale(sink.amps, times) })),
            start,
          );
          start = more.amps;
          return more.voltage;
        };
      },
    };
  };
};
