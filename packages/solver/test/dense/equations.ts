import { add, type Complex, mul, scale, sub, ZERO } from './complex.ts';
import { backSolve, type Factors, factor, type Matrix } from './lu.ts';
import { EARTH, type Element, type Network } from './network.ts';
import { flood } from './topology.ts';

/** Where every node of a network stands: nodes joined without impedance are one, some held at an EMF, the rest unknown. */
export interface Unknowns {
  /** The node that stands for a node and those merged with it. */
  merged: ReadonlyMap<string, string>;
  held: ReadonlyMap<string, Complex>;
  /** Row of each unknown, last named first: leaves before what feeds them, which leaves most of the matrix empty. */
  row: ReadonlyMap<string, number>;
}

export const unknownsOf = (network: Network): Unknowns => {
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
  const free = [...new Set(merged.values())].filter((node) => !held.has(node)).reverse();
  return { merged, held, row: new Map(free.map((node, k) => [node, k])) };
};

/** A current that leaves the network at `plus` and returns at `minus`. */
export interface Sink {
  plus: string;
  minus: string;
  amps: Complex;
}

/** The node equations of model.md 4, factored. */
export interface Equations {
  /** Voltages of all unknowns while `sinks` flow. */
  solve: (sinks: readonly Sink[]) => Complex[];
  /** What the same sinks do with every EMF at zero. */
  respond: (sinks: readonly Sink[]) => Complex[];
}

export const equationsOf = (
  { merged, held, row }: Unknowns,
  stamps: readonly Pick<Element, 'ends' | 'y'>[],
): Equations => {
  const n = row.size;
  const matrix: Matrix = Array.from({ length: n }, () => Array.from({ length: n }));
  const fromEmfs = Array.from({ length: n }, () => ZERO);
  for (const { ends, y } of stamps)
    for (const [a, ua] of ends) {
      const k = row.get(merged.get(a)!);
      if (k === undefined) continue;
      for (const [b, ub] of ends) {
        const root = merged.get(b)!;
        const entry = scale(y, ua.times(ub));
        const j = row.get(root);
        if (j === undefined) fromEmfs[k] = sub(fromEmfs[k]!, mul(entry, held.get(root)!));
        else matrix[k]![j] = add(matrix[k]![j] ?? ZERO, entry);
      }
    }
  const factors: Factors = factor(matrix);
  const rightSide = (start: readonly Complex[], sinks: readonly Sink[]): Complex[] => {
    const right = [...start];
    for (const { plus, minus, amps } of sinks) {
      const from = row.get(merged.get(plus)!);
      const to = row.get(merged.get(minus)!);
      if (from !== undefined) right[from] = sub(right[from]!, amps);
      if (to !== undefined) right[to] = add(right[to]!, amps);
    }
    return right;
  };
  const nothing = fromEmfs.map(() => ZERO);
  return {
    solve: (sinks) => backSolve(factors, rightSide(fromEmfs, sinks)),
    respond: (sinks) => backSolve(factors, rightSide(nothing, sinks)),
  };
};
