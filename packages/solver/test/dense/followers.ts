import { abs, add, type Complex, complex, inverse, mul, sub, ZERO } from './complex.ts';
import type { Decimal } from './decimal.ts';
import type { Sink } from './equations.ts';
import { fixedPoint } from './fixed-point.ts';
import type { Element } from './network.ts';
import { follows, type Piece, pieceCurrent, type ServedLoad } from './sinks.ts';
import type { State, VoltageAt } from './state.ts';

/** A current that follows the voltage `v` between its ends; `amps` is what it was the round before. */
export interface Follower {
  plus: string;
  minus: string;
  law: (v: Complex, amps: Complex) => Complex;
}

/** Currents of a state: those that stay as they are, and those that follow; what warmth adds comes first. */
export const currentsOf = (
  loads: ServedLoad[],
  state: State,
  wires: Element[],
): { steady: Sink[]; followers: Follower[] } => {
  const steady: Sink[] = [...state.credits];
  const followers = wires.map(addedByWarmth);
  for (const { load, pieces } of loads) {
    const drawn = state.drawn.get(load.id)!;
    if (drawn.behaviour === 'impedance' || drawn.amps.isZero()) continue;
    const current = (piece: Piece, v: Complex | null) => pieceCurrent(piece, drawn, v);
    for (const piece of pieces) {
      const { plus, minus } = piece;
      if (follows(drawn)) followers.push({ plus, minus, law: (v) => current(piece, v) });
      else steady.push({ plus, minus, amps: current(piece, null) });
    }
  }
  return { steady, followers };
};

/** Degrees of a wire whose ohms at rated temperature would let through `amps` less than it does at `v`. */
const celsiusOf = (wire: Element, v: Complex, amps: Complex): Decimal =>
  wire.warm!.celsius(abs(add(mul(wire.y, v), amps)));

/** What the warmth of a wire adds to the current that its ohms at rated temperature would let through. */
const addedByWarmth = (wire: Element): Follower => ({
  plus: wire.ends[0]![0],
  minus: wire.ends[1]![0],
  law: (v, amps) => {
    const y = inverse(wire.warm!.ohms(celsiusOf(wire, v, amps)));
    return mul(sub(y, wire.y), v);
  },
});

export interface Settled {
  amps: Complex[];
  voltage: VoltageAt;
  /** Of the wires that follow their current. */
  celsius: Decimal[];
}

/**
 * Followers and voltages that agree, `null` where there are none: rounds from `start` (or from what the voltages without
 * any follower lead to), each with the voltages that `voltagesWith` finds beside the followers' currents.
 */
export const settle = (
  followers: Follower[],
  wires: Element[],
  start: Complex[] | null,
  voltagesWith: (sinks: Sink[]) => VoltageAt,
): Settled | null => {
  const at = (amps: Complex[]) => voltagesWith(followers.map((each, k) => ({ ...each, amps: amps[k]! })));
  const across = (voltage: VoltageAt, { plus, minus }: Follower) => sub(voltage(plus), voltage(minus));
  const next = (amps: Complex[]): Complex[] => {
    const voltage = at(amps);
    return followers.map((each, k) => each.law(across(voltage, each), amps[k]!));
  };
  const nothing = followers.map(() => ZERO);
  const found = fixedPoint(flat(start ?? next(nothing)), (x) => flat(next(paired(x))));
  if (!found) return null;
  const amps = paired(found);
  const voltage = at(amps);
  const celsius = wires.map((wire, k) => celsiusOf(wire, across(voltage, followers[k]!), amps[k]!));
  return { amps, voltage, celsius };
};

const flat = (list: readonly Complex[]): Decimal[] => list.flatMap(({ re, im }) => [re, im]);
const paired = (list: readonly Decimal[]): Complex[] =>
  Array.from({ length: list.length / 2 }, (_, k) => complex(list[2 * k]!, list[2 * k + 1]!));
