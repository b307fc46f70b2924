import type { Conductor, Job, Phasor, Scenario } from '../job/index.ts';
import { CONDUCTORS } from '../job/index.ts';
import { magnitude } from '../job/systems.ts';
import { buildCore, type Core } from '../judge/core.ts';
import { type Credits, diversityCredits } from '../judge/credits.ts';
import { designDemand, scenarioDemand } from '../judge/demand.ts';
import { solveDemand } from '../judge/operating.ts';
import type { State } from '../judge/solve-state.ts';
import { conditionEstimate } from '../linear/index.ts';
import { nodeNames } from './node-names.ts';
import { collectBranches, collectCurrents, type Named, type Part } from './parts.ts';
import { writeOut } from './write-out.ts';

/**
 * One node's equation: own·V(node) + Σ y·V(other) = right, in siemens, volts and amperes. Terms hold every neighbour,
 * those of given voltage too.
 */
export interface NodeEquation {
  node: string;
  bus: string;
  /** `null` for the star point that a transformer has to itself. */
  conductor: Conductor | null;
  /** Its voltage is given: an ideal source or a bonded neutral. Such a node has no equation. */
  given: boolean;
  /** Other names of the node: runs of no impedance join them. */
  also: string[];
  own: Phasor;
  terms: { node: string; y: Phasor }[];
  right: Phasor;
  volts: Phasor;
  /** What Kirchhoff's law is out by there, amperes, summed over branch currents and not over the matrix. */
  kclAmps: number;
  /** Written out in names, and with numbers. */
  symbols: string;
  text: string;
}

export interface Equations {
  ok: true;
  /** The state that is written out: `each-circuit` and `starting` are turns of design demand, which is shown. */
  scenario: 'design' | 'everything-on' | 'light';
  equations: NodeEquation[];
  /** Of the nodes whose voltage is not given: y·solution = right, where right holds all other nodes' voltages. */
  matrix: { nodes: string[]; y: Phasor[][]; right: Phasor[] };
  solution: Phasor[];
  impedances: Named[];
  currents: Named[];
  /** Volts of the nodes that the equations name and that are not written out themselves. */
  neighbours: Named[];
  /** The largest `kclAmps` against the largest current of any branch there. */
  kclResidual: number;
  /** Estimate of the whole matrix's condition number: how much a relative error of its entries may grow in the volts. */
  condition: number;
}

export type EquationsOutcome = Equations | { ok: false; at: string; reason: string };

/**
 * Writes the node-voltage equations by inspection (model: equations) for the nodes of some buses, or of all: on the
 * diagonal the sum of the admittances that meet at the node, off it minus the admittance that joins two nodes, at
 * the right the currents that flow in. Refused: an unknown bus, a network that cannot be solved.
 */
export function nodalEquations(
  job: Job,
  options: { buses?: readonly string[]; scenario?: Scenario } = {},
): EquationsOutcome {
  const core = buildCore(job);
  if ('kind' in core) return { ok: false, at: core.at, reason: core.reason };
  const unknown = options.buses?.find((id) => !core.network.buses.index.has(id));
  if (unknown !== undefined)
    return { ok: false, at: `bus ${unknown}`, reason: 'no bus of the job has this id' };
  const credits = diversityCredits(core);
  if (credits && 'kind' in credits) return { ok: false, at: credits.at, reason: credits.reason };
  const scenario =
    options.scenario === 'everything-on' || options.scenario === 'light' ? options.scenario : 'design';
  const demand = scenario === 'design' ? designDemand(core) : scenarioDemand(core, scenario);
  const state = solveDemand(core, demand, credits);
  if ('kind' in state) return { ok: false, at: state.at, reason: state.reason };
  return writeEquations(core, state, credits, scenario, chosenNodes(core, options.buses));
}

/** Nodes of some buses in the order of buses and conductors, star points after their bus. */
function chosenNodes(core: Core, buses: readonly string[] | undefined): number[] {
  const { nodes, buses: all } = core.network;
  const chosen = new Set<number>();
  const stars = new Map<number, number[]>();
  for (let node = 0; node < nodes.count; node++)
    if (nodes.slotOf[node]! < 0) {
      const bus = nodes.busOf[node]!;
      stars.set(bus, [...(stars.get(bus) ?? []), node]);
    }
  for (const id of buses ?? all.ids) {
    const bus = all.index.get(id)!;
    for (let slot = 0; slot < 4; slot++) {
      const node = nodes.at[4 * bus + slot]!;
      if (node >= 0) chosen.add(node);
    }
    for (const node of stars.get(bus) ?? []) chosen.add(node);
  }
  return [...chosen];
}

function writeEquations(
  core: Core,
  state: State,
  credits: Credits | null,
  scenario: Equations['scenario'],
  chosen: readonly number[],
): Equations {
  const { nodes } = core.network;
  const names = nodeNames(core.network);
  const volts = (node: number): Phasor => [
    nodes.referenceRe[node]! + state.volts.re[node]!,
    nodes.referenceIm[node]! + state.volts.im[node]!,
  ];
  const place = new Map(chosen.map((node, i) => [node, i]));
  const parts = chosen.map((): Part[] => []);
  const put = (node: number, part: Part): void => {
    const at = place.get(node);
    if (at !== undefined) parts[at]!.push(part);
  };
  collectBranches(core, state, names, put);
  collectCurrents(core, state, credits, put);

  const impedances = new Map<string, Named>();
  const currents = new Map<string, Named>();
  let largest = 0;
  let worst = 0;
  const equations = chosen.map((node, i): NodeEquation => {
    const sums = new Map<number, [number, number]>();
    const right: [number, number] = [0, 0];
    const out: [number, number] = [0, 0];
    for (const part of parts[i]!) {
      if (part.kind === 'branch') {
        impedances.set(part.named.name, part.named);
        for (const { node: other, y } of part.terms) {
          const sum = sums.get(other) ?? [0, 0];
          sums.set(other, [sum[0] + y[0], sum[1] + y[1]]);
        }
        right[0] += part.driven[0];
        right[1] += part.driven[1];
      } else {
        currents.set(part.named.name, part.named);
        right[0] += part.sign * part.named.value[0];
        right[1] += part.sign * part.named.value[1];
      }
      out[0] += part.leaves[0];
      out[1] += part.leaves[1];
      largest = Math.max(largest, magnitude(part.leaves));
    }
    const given = nodes.fixed[node] === 1;
    const kclAmps = given ? 0 : magnitude(out);
    worst = Math.max(worst, kclAmps);
    const slot = nodes.slotOf[node]!;
    const own = sums.get(node) ?? [0, 0];
    const terms = [...sums].filter(([other]) => other !== node);
    const written = writeOut(names.of(node), parts[i]!, own, terms, right, names.of, volts(node), given);
    return {
      node: names.of(node),
      bus: core.network.buses.ids[nodes.busOf[node]!]!,
      conductor: slot < 0 ? null : CONDUCTORS[slot]!,
      given,
      also: names.also(node),
      own,
      terms: terms.map(([other, y]) => ({ node: names.of(other), y })),
      right,
      volts: volts(node),
      kclAmps,
      ...written,
    };
  });

  const free = equations.flatMap(({ given }, i) => (given ? [] : [i]));
  const column = new Map(free.map((i, c) => [equations[i]!.node, c]));
  const matrix: Equations['matrix'] = { nodes: [...column.keys()], y: [], right: [] };
  const voltsOf = new Map(Array.from({ length: nodes.count }, (_, n) => [names.of(n), volts(n)] as const));
  for (const i of free) {
    const { own, terms, right, node } = equations[i]!;
    const row = free.map((): Phasor => [0, 0]);
    row[column.get(node)!] = own;
    let [re, im] = right;
    for (const term of terms) {
      const c = column.get(term.node);
      if (c !== undefined) row[c] = term.y;
      else {
        const [vRe, vIm] = voltsOf.get(term.node)!;
        re -= term.y[0] * vRe - term.y[1] * vIm;
        im -= term.y[0] * vIm + term.y[1] * vRe;
      }
    }
    matrix.y.push(row);
    matrix.right.push([re, im]);
  }
  return {
    ok: true,
    scenario,
    equations,
    matrix,
    solution: free.map((i) => equations[i]!.volts),
    impedances: [...impedances.values()],
    currents: [...currents.values()],
    neighbours: neighboursOf(equations, voltsOf),
    kclResidual: largest === 0 ? 0 : worst / largest,
    condition: conditionEstimate(state.stamped.factor),
  };
}

function neighboursOf(equations: readonly NodeEquation[], voltsOf: ReadonlyMap<string, Phasor>): Named[] {
  const own = new Set(equations.map(({ node }) => node));
  const others = new Set(equations.flatMap(({ terms }) => terms.map(({ node }) => node)));
  return [...others]
    .filter((node) => !own.has(node))
    .map((node) => ({ name: `V(${node})`, about: `node ${node}`, value: voltsOf.get(node)! }));
}
