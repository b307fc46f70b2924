import { CONDUCTORS, type Phasor } from '../job/index.ts';
import type { Core } from '../judge/core.ts';
import type { Credits } from '../judge/credits.ts';
import { ampsOf, sinkAdmittance, sinkCurrent } from '../judge/sink-current.ts';
import { flowsOf, type State } from '../judge/solve-state.ts';
import { nodeNames } from './node-names.ts';

/** An impedance, a current or a voltage by the name that the written equations give it. */
export interface Named {
  name: string;
  /** What it is, in words. */
  about: string;
  /** Ohm, ampere or volt. */
  value: Phasor;
}

/** What one branch or one current adds to the equation of one node. */
export type Part =
  | {
      kind: 'branch';
      named: Named;
      /** Coefficient of each node's volts: `weight` over the impedance, and as siemens. */
      terms: { node: number; weight: number; y: Phasor }[];
      /** What its EMF drives into the node, amperes. */
      driven: Phasor;
      emf: Phasor | null;
      leaves: Phasor;
    }
  | { kind: 'current'; named: Named; sign: 1 | -1; leaves: Phasor };

type Names = ReturnType<typeof nodeNames>;
type Put = (node: number, part: Part) => void;

/** Runs, windings, source impedances and impedance loads: i = y·(Σ u·V − emf), of which u_k·i leaves node k. */
export function collectBranches(core: Core, state: State, names: Names, put: Put): void {
  const { job, network, loads } = core;
  const { nodes } = network;
  const branches = state.stamped.elements.map((e) => ({ ...e, named: nameOf(core, e) }));
  for (const [i, load] of loads.entries()) {
    if (job.loads[i]!.behaviour !== 'impedance' || state.demand.amps[i] === 0) continue;
    for (const sink of load.sinks) {
      const [yRe, yIm] = sinkAdmittance(sink, ampsOf(load, state.demand.amps[i]!));
      const square = yRe * yRe + yIm * yIm;
      const { id } = job.loads[i]!;
      const pair = `${names.of(sink.a)}, ${names.of(sink.b)}`;
      branches.push({
        kind: 'run',
        owner: -1,
        conductor: -1,
        nodes: [sink.a, sink.b],
        u: [1, -1],
        zRe: yRe / square,
        zIm: -yIm / square,
        yRe,
        yIm,
        emfRe: 0,
        emfIm: 0,
        named: {
          name: `Z(${id}; ${pair})`,
          about: `load ${id} as an impedance`,
          value: [yRe / square, -yIm / square],
        },
      });
    }
  }
  for (const { nodes: at, u, yRe, yIm, emfRe, emfIm, named } of branches) {
    let dRe = -emfRe;
    let dIm = -emfIm;
    for (const [k, node] of at.entries()) {
      dRe += u[k]! * (nodes.referenceRe[node]! + state.volts.re[node]!);
      dIm += u[k]! * (nodes.referenceIm[node]! + state.volts.im[node]!);
    }
    const iRe = yRe * dRe - yIm * dIm;
    const iIm = yRe * dIm + yIm * dRe;
    for (const node of new Set(at)) {
      const weight = weightOf(at, u, node);
      if (weight === 0) continue;
      put(node, {
        kind: 'branch',
        named,
        terms: [...new Set(at)].map((other) => {
          const w = weight * weightOf(at, u, other);
          return { node: other, weight: w, y: [w * yRe, w * yIm] };
        }),
        driven: [weight * (yRe * emfRe - yIm * emfIm), weight * (yRe * emfIm + yIm * emfRe)],
        emf: emfRe === 0 && emfIm === 0 ? null : [emfRe, emfIm],
        leaves: [weight * iRe, weight * iIm],
      });
    }
  }
}

const weightOf = (at: readonly number[], u: readonly number[], node: number): number =>
  at.reduce((sum, other, k) => (other === node ? sum + u[k]! : sum), 0);

function nameOf(core: Core, e: State['stamped']['elements'][number]): Named {
  const { job } = core;
  const letter = job.basis === 'impedance' && job.frequency > 0 ? 'Z' : 'R';
  const value: Phasor = [e.zRe, e.zIm];
  if (e.kind === 'run') {
    const { id } = job.runs[e.owner]!;
    const conductor = CONDUCTORS[e.conductor]!;
    return { name: `${letter}(${id}.${conductor})`, about: `run ${id}, conductor ${conductor}`, value };
  }
  if (e.kind === 'source') {
    const { id } = job.sources[e.owner]!;
    const conductor = CONDUCTORS[e.conductor]!;
    return { name: `${letter}(${id}.${conductor})`, about: `source ${id}, conductor ${conductor}`, value };
  }
  const { id } = job.transformers[e.owner]!;
  if (e.kind === 'centroid')
    return { name: `${letter}(${id}.centre)`, about: `transformer ${id}, reference of its delta`, value };
  const own = core.network.elements.filter((other) => other.kind === 'winding' && other.owner === e.owner);
  const winding = own.findIndex((other) => other.nodes.every((node, k) => node === e.nodes[k])) + 1;
  return {
    name: `${letter}(${id}.${winding})`,
    about: `transformer ${id}, winding ${winding}, seen from its secondary`,
    value,
  };
}

/** Currents of loads, each by the line that it leaves, and what diversity gives back. */
export function collectCurrents(core: Core, state: State, credits: Credits | null, put: Put): void {
  const { job, network } = core;
  const { nodes } = network;
  const out = new Float64Array(2);
  const lines = new Map<string, { node: number; named: Named; sign: 1 | -1 }>();
  for (const { sink, drawn, rule } of flowsOf(core, state.demand)) {
    sinkCurrent(sink, drawn, rule, network, state.volts, out);
    const load = job.loads[sink.load]!;
    const ends = load.along === null ? '' : ` at ${network.buses.ids[nodes.busOf[sink.a]!]!}`;
    for (const [node, sign] of [
      [sink.a, 1],
      [sink.b, -1],
    ] as const) {
      const threePhase = load.terminals === 'three-phase';
      const line = threePhase ? `.${CONDUCTORS[nodes.slotOf[node]!]}` : '';
      const name = `I(${load.id}${line}${ends})`;
      const key = `${name} ${node}`;
      const known = lines.get(key);
      const flips = threePhase ? sign : 1;
      if (known)
        known.named.value = [known.named.value[0] + flips * out[0]!, known.named.value[1] + flips * out[1]!];
      else
        lines.set(key, {
          node,
          sign: threePhase ? 1 : sign,
          named: {
            name,
            about: `load ${load.id}${line.replace('.', ', line ')}`,
            value: [flips * out[0]!, flips * out[1]!],
          },
        });
    }
  }
  for (const { node, sign, named } of lines.values())
    put(node, {
      kind: 'current',
      named,
      sign: sign === 1 ? -1 : 1,
      leaves: [sign * named.value[0], sign * named.value[1]],
    });
  if (!state.demand.credits || !credits) return;
  const names = nodeNames(network);
  for (let node = 0; node < nodes.count; node++) {
    const value: Phasor = [credits.re[node]!, credits.im[node]!];
    if (value[0] === 0 && value[1] === 0) continue;
    const name = `J(${names.of(node)})`;
    put(node, {
      kind: 'current',
      named: { name, about: `what diversity gives back at ${names.of(node)}`, value },
      sign: 1,
      leaves: [-value[0], -value[1]],
    });
  }
}
