import type { Conductor, Job } from '@farlug/solver/job';
import { type Thermal, thermalOf } from './ampacity.ts';
import { abs, add, type Complex, mul, scale, sub, ZERO } from './complex.ts';
import { backSolve, type Factors, factor } from './lu.ts';
import { EARTH, type Element, type Network, networkOf } from './network.ts';
import { type Drawn, type Piece, pieceAdmittance, pieceCurrent, type ServedLoad } from './sinks.ts';
import { flood, type Topology } from './topology.ts';

/** A current that leaves the network at `plus` and returns at `minus`, whatever the voltages. */
export interface FixedSink {
  plus: string;
  minus: string;
  amps: Complex;
}

export interface State {
  drawn: Map<string, Drawn>;
  /** Credits of diversity and extra currents. */
  fixedSinks: FixedSink[];
}

export class NotServed extends Error {}

export interface Solved {
  network: Network;
  voltage: (node: string) => Complex;
  /** Current through an element in the sense of its u. */
  through: (element: Element) => Complex;
  /** Response of all voltages to unit currents drawn as `sinks`, every EMF and load current set to zero. */
  respond: (sinks: FixedSink[]) => (node: string) => Complex;
  /** The same state with `extra` drawn as well, solved again. */
  again: (extra: FixedSink[]) => Solved;
  /** What flows from outside into the merged node that `node` belongs to. */
  takenAt: (node: string) => Complex;
  /** Current out of `plus` of a piece of a load, impedance loads included. */
  drawnBy: (load: ServedLoad, piece: Piece) => Complex;
}

type Celsius = Map<string, number>;
const MOST_ROUNDS = 600;

/** One network, one state, solved anew from nothing: dense, no superposition, iterated until nothing moves. */
export const solveState = (
  job: Job,
  topology: Topology,
  loads: ServedLoad[],
  state: State,
  held: ReadonlyMap<string, Complex> = new Map(),
): Solved => {
  const hot = new Map<string, Thermal>();
  for (const run of job.runs) {
    if (run.temperature !== 'operating' || run.open || run.ohms) continue;
    for (const c of run.conductors) hot.set(`${run.id}|${c}`, thermalOf(job, run, c));
  }
  let celsius: Celsius = new Map([...hot].map(([key, thermal]) => [key, thermal.ambient]));
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const solved = solveAt(job, topology, loads, state, celsius, held);
    if (hot.size === 0) return solved;
    const warm = (at: Celsius): Solved => ({
      ...solveAt(job, topology, loads, state, at, held),
      again: (extra) =>
        solveState(job, topology, loads, { ...state, fixedSinks: [...state.fixedSinks, ...extra] }, held),
    });
    const next = temperatures(job, solved, hot);
    const moved = Math.max(...[...next].map(([key, t]) => Math.abs(t - celsius.get(key)!)));
    celsius = next;
    if (moved < 2e-8) return warm(celsius);
    if (!Number.isFinite(moved) || moved > 2000 || round > 120) break;
  }
  throw new NotServed('conductor temperatures do not settle');
};

const temperatures = (job: Job, solved: Solved, hot: Map<string, Thermal>): Celsius => {
  const next: Celsius = new Map([...hot].map(([key, thermal]) => [key, thermal.ambient]));
  for (const element of solved.network.elements) {
    const key = `${element.of.id}|${element.of.conductor}`;
    const thermal = element.of.kind === 'run' ? hot.get(key) : undefined;
    if (!thermal) continue;
    const sets = job.runs.find((run) => run.id === element.of.id)!.sets;
    const share = abs(solved.through(element)) / sets / thermal.fullAmps;
    next.set(key, thermal.ambient + (thermal.rated - thermal.referenceAmbient) * share * share);
  }
  return next;
};

const solveAt = (
  job: Job,
  topology: Topology,
  loads: ServedLoad[],
  state: State,
  celsius: Celsius,
  held: ReadonlyMap<string, Complex>,
): Solved => {
  const network = networkOf(job, topology, (run: string, c: Conductor) => celsius.get(`${run}|${c}`) ?? null);
  for (const [node, v] of held) network.fixed.set(node, v);
  return settle(network, systemOf(network, loads, state), loads, state);
};

type System = ReturnType<typeof systemOf>;

/** Solves with the factors at hand, and again from the new voltages while any load follows them. */
const settle = (network: Network, system: System, loads: ServedLoad[], state: State): Solved => {
  let voltages = system.solve(loads, state, null);
  const iterated = [...state.drawn.values()].some((d) => d.behaviour === 'power' || d.behaviour === 'local');
  for (let round = 0; iterated; round++) {
    const next = system.solve(loads, state, voltages);
    const moved = Math.max(...next.map((v, k) => abs(sub(v, voltages[k]!))));
    const top = Math.max(...next.map(abs));
    voltages = next;
    if (moved <= 1e-13 * top) break;
    if (round > MOST_ROUNDS || !Number.isFinite(moved)) {
      throw new NotServed('no solution');
    }
  }
  const voltage = (node: string) => system.read(voltages, node);
  const through = (element: Element): Complex =>
    mul(
      element.y,
      element.ends.reduce((sum, [node, u]) => add(sum, scale(voltage(node), u)), ZERO),
    );
  const drawnBy = (item: ServedLoad, piece: Piece): Complex => {
    const drawn = state.drawn.get(item.load.id)!;
    const v = sub(voltage(piece.plus), voltage(piece.minus));
    return drawn.behaviour === 'impedance'
      ? mul(pieceAdmittance(piece, drawn), v)
      : pieceCurrent(piece, drawn, v);
  };
  return {
    network,
    voltage,
    through,
    drawnBy,
    takenAt: (node) => {
      const root = system.merged.get(node);
      let sum = ZERO;
      const leave = (at: string, amps: Complex) => {
        if (system.merged.get(at) === root) sum = add(sum, amps);
      };
      for (const element of network.elements) {
        const amps = through(element);
        for (const [at, u] of element.ends) leave(at, scale(amps, u));
      }
      for (const item of loads) {
        for (const piece of item.pieces) {
          const amps = drawnBy(item, piece);
          leave(piece.plus, amps);
          leave(piece.minus, scale(amps, -1));
        }
      }
      for (const { plus, minus, amps } of state.fixedSinks) {
        leave(plus, amps);
        leave(minus, scale(amps, -1));
      }
      return sum;
    },
    respond: (sinks) => {
      const answer = system.respond(sinks);
      return (node) => system.read(answer, node, true);
    },
    again: (extra) =>
      settle(network, system, loads, { ...state, fixedSinks: [...state.fixedSinks, ...extra] }),
  };
};

/** The node equations over merged nodes, factored once, with the fixed nodes moved to the right side. */
const systemOf = (network: Network, loads: ServedLoad[], state: State) => {
  const neighbours = new Map<string, string[]>();
  for (const [a, b] of network.joined) {
    neighbours.set(a, [...(neighbours.get(a) ?? []), b]);
    neighbours.set(b, [...(neighbours.get(b) ?? []), a]);
  }
  const merged = new Map<string, string>();
  const held = new Map<string, Complex>();
  const enter = (node: string) => {
    if (merged.has(node)) return;
    const group = flood([node], (n) => neighbours.get(n) ?? []);
    for (const n of group) merged.set(n, node);
    const anchor = [...group].find((n) => network.fixed.has(n));
    if (anchor) held.set(node, network.fixed.get(anchor)!);
  };
  enter(EARTH);
  for (const node of network.fixed.keys()) enter(node);
  for (const element of network.elements) for (const [node] of element.ends) enter(node);
  for (const [a] of network.joined) enter(a);

  const free = [...new Set(merged.values())].filter((node) => !held.has(node));
  const place = new Map(free.map((node, k) => [node, k]));
  const n = free.length;
  const re = new Float64Array(n * n);
  const im = new Float64Array(n * n);
  const injected: Complex[] = free.map(() => ZERO);
  const stamp = (ends: Element['ends'], y: Complex) => {
    for (const [a, ua] of ends) {
      const row = place.get(merged.get(a)!);
      if (row === undefined) continue;
      for (const [b, ub] of ends) {
        const root = merged.get(b)!;
        const column = place.get(root);
        const entry = scale(y, ua * ub);
        if (column === undefined) injected[row] = sub(injected[row]!, mul(entry, held.get(root)!));
        else {
          re[row * n + column] = re[row * n + column]! + entry.re;
          im[row * n + column] = im[row * n + column]! + entry.im;
        }
      }
    }
  };
  for (const element of network.elements) stamp(element.ends, element.y);
  for (const { load, pieces } of loads) {
    const drawn = state.drawn.get(load.id)!;
    if (drawn.behaviour !== 'impedance') continue;
    for (const piece of pieces)
      stamp(
        [
          [piece.plus, 1],
          [piece.minus, -1],
        ],
        pieceAdmittance(piece, drawn),
      );
  }
  const factors: Factors = factor(n, re, im);
  const draw = (right: Complex[], node: string, amps: Complex) => {
    const row = place.get(merged.get(node)!);
    if (row !== undefined) right[row] = sub(right[row]!, amps);
  };
  const read = (values: Complex[], node: string, still = false): Complex => {
    const root = merged.get(node)!;
    const k = place.get(root);
    if (k !== undefined) return values[k]!;
    return still ? ZERO : held.get(root)!;
  };
  return {
    read,
    merged,
    solve: (all: ServedLoad[], now: State, before: Complex[] | null): Complex[] => {
      const right = injected.slice();
      for (const { load, pieces } of all) {
        const drawn = now.drawn.get(load.id)!;
        for (const piece of pieces) {
          const v = before ? sub(read(before, piece.plus), read(before, piece.minus)) : piece.nominal;
          const amps = pieceCurrent(piece, drawn, v);
          draw(right, piece.plus, amps);
          draw(right, piece.minus, scale(amps, -1));
        }
      }
      for (const { plus, minus, amps } of now.fixedSinks) {
        draw(right, plus, amps);
        draw(right, minus, scale(amps, -1));
      }
      return backSolve(factors, right);
    },
    respond: (sinks: FixedSink[]): Complex[] => {
      const right = free.map(() => ZERO);
      for (const { plus, minus, amps } of sinks) {
        draw(right, plus, amps);
        draw(right, minus, scale(amps, -1));
      }
      return backSolve(factors, right);
    },
  };
};
