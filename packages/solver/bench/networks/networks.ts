import { type BuildingTree, buildingTree, KIND, uniform } from './building-tree.ts';

/** A network with one conductor: resistances of its runs and amperes at its buses. `buses` is the source. */
export interface RealNetwork {
  buses: number;
  from: Int32Array;
  to: Int32Array;
  ohms: Float64Array;
  amps: Float64Array;
}

/**
 * Three lines and a neutral. Impedances and admittances of a run are symmetric 4 × 4 blocks, upper triangle row by
 * row (10 values); currents and shunts are by bus and conductor.
 */
export interface FourWireNetwork {
  buses: number;
  from: Int32Array;
  to: Int32Array;
  zRe: Float64Array;
  zIm: Float64Array;
  ampsRe: Float64Array;
  ampsIm: Float64Array;
  /** Siemens to earth. */
  shunt: Float64Array;
}

export function realNetwork(unknowns: number, rings: number): RealNetwork {
  const { buses, from, to, metres, ohmsPerMetre, amps } = buildingTree(unknowns, rings);
  return { buses, from, to, ohms: metres.map((m, e) => m * ohmsPerMetre[e]!), amps };
}

/** The same buses and runs numbered and listed at random. */
export function shuffled(net: RealNetwork, seed = 4242): RealNetwork {
  const random = uniform(seed);
  const order = (n: number) => {
    const list = Int32Array.from({ length: n }, (_, i) => i);
    for (let i = n - 1; i > 0; i--) {
      const j = Math.floor(random() * (i + 1));
      [list[i], list[j]] = [list[j]!, list[i]!];
    }
    return list;
  };
  const name = order(net.buses);
  const run = order(net.from.length);
  const named = (bus: number) => (bus === net.buses ? bus : name[bus]!);
  const amps = new Float64Array(net.buses);
  for (let i = 0; i < net.buses; i++) amps[name[i]!] = net.amps[i]!;
  return {
    buses: net.buses,
    from: run.map((e) => named(net.from[e]!)),
    to: run.map((e) => named(net.to[e]!)),
    ohms: Float64Array.from(run, (e) => net.ohms[e]!),
    amps,
  };
}

export { uniform };

const MU0_PER_2PI = 2e-7;

/** Self and mutual reactances of four parallel round wires in a bundle (Carson 1926 without earth return), ohm/m. */
function reactance(i: number, j: number, mm2: number): number {
  const radius = Math.sqrt(mm2 / Math.PI) / 1000;
  const apart = 2.6 * radius;
  const distance = i === j ? 0.7788 * radius : Math.abs(i - j) === 2 ? Math.SQRT2 * apart : apart;
  return 2 * Math.PI * 50 * MU0_PER_2PI * Math.log(1 / distance);
}

/** Three of four circuits are on one line; power factors lie between 0.85 and 0.99. */
function drawFourWire(tree: BuildingTree): { ampsRe: Float64Array; ampsIm: Float64Array } {
  const random = uniform(777);
  const ampsRe = new Float64Array(4 * tree.buses);
  const ampsIm = new Float64Array(4 * tree.buses);
  for (let i = 0; i < tree.buses; i++) {
    if (tree.amps[i] === 0) continue;
    const circuit = tree.circuit[i]!;
    const single = circuit >= 0 && circuit % 5 !== 0;
    for (let line = 0; line < 3; line++) {
      if (single && line !== circuit % 3) continue;
      const amps = tree.amps[i]! * (single ? 1 : 0.4);
      const angle = [0, -2, 2][line]! * (Math.PI / 3) - Math.acos(0.85 + 0.14 * random());
      const re = amps * Math.cos(angle);
      const im = amps * Math.sin(angle);
      ampsRe[4 * i + line]! += re;
      ampsIm[4 * i + line]! += im;
      ampsRe[4 * i + 3]! -= re;
      ampsIm[4 * i + 3]! -= im;
    }
  }
  return { ampsRe, ampsIm };
}

export function fourWireNetwork(unknowns: number, rings: number, earthed: boolean): FourWireNetwork {
  const tree = buildingTree(Math.round(unknowns / 4), rings);
  const { buses, from, to, metres, ohmsPerMetre, mm2, sets, kind } = tree;
  const zRe = new Float64Array(10 * from.length);
  const zIm = new Float64Array(10 * from.length);
  for (let e = 0; e < from.length; e++) {
    const utility = e < buses && kind[e] === KIND.utility ? 1 / 700 : 1;
    let q = 10 * e;
    for (let i = 0; i < 4; i++)
      for (let j = i; j < 4; j++, q++) {
        zRe[q] = i === j ? metres[e]! * ohmsPerMetre[e]! * 1.2 : 0;
        zIm[q] = (reactance(i, j, mm2[e]!) * metres[e]! * utility) / sets[e]!;
      }
  }
  const shunt = new Float64Array(4 * buses);
  if (earthed) for (let i = 0; i < buses; i++) if (kind[i] === KIND.board) shunt[4 * i + 3] = 0.2;
  return { buses, from, to, zRe, zIm, shunt, ...drawFourWire(tree) };
}
