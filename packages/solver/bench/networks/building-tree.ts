// Seeded networks shaped like buildings: utility legs, main boards, risers by floor, panels, circuits with taps.
// Runs come in the order of their far ends and parents come first, as a person would enter them.

import { randomFrom } from '../../test/support/random.ts';

/** mm² (IEC 60228), Ω/km of class 2 copper at 20 °C (IEC 60228 table 2), and a rating to choose a size by. */
const SIZES: readonly (readonly [mm2: number, ohmPerKm: number, amps: number])[] = [
  [1.5, 12.1, 17.5],
  [2.5, 7.41, 24],
  [4, 4.61, 32],
  [6, 3.08, 41],
  [10, 1.83, 57],
  [16, 1.15, 76],
  [25, 0.727, 101],
  [35, 0.524, 125],
  [50, 0.387, 151],
  [70, 0.268, 192],
  [95, 0.193, 232],
  [120, 0.153, 269],
  [150, 0.124, 300],
  [185, 0.0991, 341],
  [240, 0.0754, 400],
  [300, 0.0601, 458],
  [400, 0.047, 546],
  [500, 0.0366, 626],
  [630, 0.0283, 720],
];

/** What a bus is, by how deep it lies. */
export const KIND = { utility: 0, board: 1, riser: 2, panel: 3, tap: 4, outlet: 5 } as const;

export interface BuildingTree {
  buses: number;
  /** Run e joins bus from[e] to bus to[e]; `buses` is the source. The first runs are the tree, the rest close rings. */
  from: Int32Array;
  to: Int32Array;
  metres: Float64Array;
  ohmsPerMetre: Float64Array;
  mm2: Float64Array;
  sets: Int32Array;
  kind: Uint8Array;
  /** Amperes drawn at each bus. */
  amps: Float64Array;
  /** The circuit that a bus belongs to, −1 for panels and feeders. */
  circuit: Int32Array;
}

/** Uniform numbers in [0, 1). */
export function uniform(seed: number): () => number {
  const { between } = randomFrom(seed);
  return () => between(0, 1);
}

class Growing {
  readonly parent: number[] = [];
  readonly metres: number[] = [];
  readonly kind: number[] = [];
  readonly circuit: number[] = [];
  readonly amps: number[] = [];
  /** Pairs of buses that a ring may join: the end of a circuit and its panel; panels with their building. */
  readonly circuitEnds: [end: number, panel: number][] = [];
  readonly panels: [bus: number, building: number][] = [];
  readonly boards: number[] = [];
  private readonly limit: number;

  constructor(limit: number) {
    this.limit = limit;
  }
  get full(): boolean {
    return this.parent.length >= this.limit;
  }
  add(parent: number, metres: number, kind: number, circuit = -1, amps = 0): number {
    this.parent.push(parent);
    this.metres.push(metres);
    this.kind.push(kind);
    this.circuit.push(circuit);
    return this.amps.push(amps) - 1;
  }
}

function growCircuit(net: Growing, random: () => number, panel: number, circuit: number): void {
  let tap = panel;
  for (let left = 3 + Math.floor(random() * 7), first = true; left > 0 && !net.full; left--, first = false) {
    tap = net.add(tap, first ? 6 + 24 * random() : 2 + 5 * random(), KIND.tap, circuit, 0.2 + 1.2 * random());
    if (random() < 0.25 && !net.full) net.add(tap, 1 + 3 * random(), KIND.outlet, circuit, 0.2 + random());
  }
  net.circuitEnds.push([tap, panel]);
}

function growBuilding(net: Growing, random: () => number, building: number, mains: number): void {
  const board = net.add(mains, 10 + 10 * random(), KIND.board);
  net.boards.push(board);
  for (let risers = 3 + Math.floor(random() * 3); risers > 0; risers--) {
    let riser = board;
    const floors = 4 + Math.floor(random() * 8);
    for (let floor = 0; floor < floors && !net.full; floor++) {
      riser = net.add(riser, floor > 0 ? 3.5 + random() : 10 + 30 * random(), KIND.riser);
      for (let panels = random() < 0.4 ? 2 : 1; panels > 0 && !net.full; panels--) {
        const panel = net.add(riser, 3 + 15 * random(), KIND.panel);
        net.panels.push([panel, building]);
        for (let circuits = 18 + Math.floor(random() * 24); circuits > 0 && !net.full; circuits--)
          growCircuit(net, random, panel, net.circuitEnds.length);
      }
    }
  }
}

/** Grows buildings until there are `buses` of them; `rings` is the number of further runs that close rings. */
export function buildingTree(buses: number, rings = 0, seed = 12_345): BuildingTree {
  const random = uniform(seed);
  const net = new Growing(buses);
  let mains = -1;
  for (let building = 0; !net.full; building++) {
    if (building % 10 === 0) mains = -1;
    mains = net.add(mains, 50 + 200 * random(), KIND.utility);
    if (!net.full) growBuilding(net, random, building, mains);
  }
  const closing = closeRings(net, random, rings);
  return sized(net, closing);
}

type Ring = readonly [from: number, to: number, metres: number];

/** Four of five rings bring a circuit's end back to its panel; the others join panels or main boards. */
function closeRings(net: Growing, random: () => number, rings: number): Ring[] {
  const { circuitEnds, panels, boards } = net;
  const made: Ring[] = [];
  for (let tries = 0; made.length < rings && tries < 20 * rings; tries++) {
    const which = random();
    const pick = random();
    let ring: Ring;
    if (which < 0.8 || panels.length < 6) {
      const [end, panel] = circuitEnds[Math.floor(pick * circuitEnds.length)]!;
      ring = [panel, end, 6 + 24 * random()];
    } else if (which < 0.95) {
      const at = Math.floor(pick * panels.length);
      const [a, one] = panels[at]!;
      const [b, other] = panels[Math.min(panels.length - 1, at + 1 + Math.floor(random() * 6))]!;
      if (one !== other) continue;
      ring = [b, a, 10 + 40 * random()];
    } else {
      const at = Math.floor(pick * boards.length);
      ring = [boards[(at + 1 + Math.floor(random() * 3)) % boards.length]!, boards[at]!, 60 + 100 * random()];
    }
    if (ring[0] !== ring[1]) made.push(ring);
  }
  return made;
}

/** The smallest size, and as many in parallel as it takes, that carries what lies beyond; utility legs are thick. */
function sized(net: Growing, rings: readonly Ring[]): BuildingTree {
  const buses = net.parent.length;
  const carried = Float64Array.from(net.amps);
  for (let i = buses - 1; i >= 0; i--) if (net.parent[i]! >= 0) carried[net.parent[i]!]! += carried[i]!;
  const runs = buses + rings.length;
  const tree: BuildingTree = {
    buses,
    from: new Int32Array(runs),
    to: new Int32Array(runs),
    metres: new Float64Array(runs),
    ohmsPerMetre: new Float64Array(runs),
    mm2: new Float64Array(runs),
    sets: new Int32Array(runs),
    kind: Uint8Array.from(net.kind),
    amps: Float64Array.from(net.amps),
    circuit: Int32Array.from(net.circuit),
  };
  const largest = SIZES[16]!;
  for (let i = 0; i < buses; i++) {
    const need = carried[i]! * (net.kind[i]! <= KIND.panel ? 0.5 : 1) * 1.1;
    const sets = Math.max(1, Math.ceil(need / largest[2]));
    const fits = SIZES.find(([, , amps]) => amps >= need / sets)!;
    const [mm2, ohmPerKm] = net.kind[i]! >= KIND.tap && fits === SIZES[0] ? SIZES[1]! : fits;
    tree.from[i] = net.parent[i]! < 0 ? buses : net.parent[i]!;
    tree.to[i] = i;
    tree.metres[i] = net.metres[i]!;
    tree.ohmsPerMetre[i] = (ohmPerKm / 1000 / sets) * (net.kind[i] === KIND.utility ? 1 / 700 : 1);
    tree.mm2[i] = mm2;
    tree.sets[i] = sets;
  }
  for (const [k, [from, to, metres]] of rings.entries()) {
    const e = buses + k;
    tree.from[e] = from;
    tree.to[e] = to;
    tree.metres[e] = metres;
    tree.ohmsPerMetre[e] = tree.ohmsPerMetre[to]!;
    tree.mm2[e] = tree.mm2[to]!;
    tree.sets[e] = tree.sets[to]!;
  }
  return tree;
}
