import type { Job } from '../job/index.ts';
import { type Buses, buildBuses } from './bus-systems.ts';
import type { Element } from './element.ts';
import { buildElements } from './elements.ts';
import { type Feeding, followFeeding } from './feeding.ts';
import { type JobOhms, jobOhms } from './job-ohms.ts';
import { buildNodes, type Nodes } from './nodes.ts';
import type { Refusal } from './refusal.ts';
import { type Winding, windingsOf } from './windings.ts';

/** The network of a job without its loads, in SI units. */
export interface Network {
  job: Job;
  buses: Buses;
  ohms: JobOhms;
  feeding: Feeding;
  windings: Winding[][];
  /** Conductors of buses first, then star points that a transformer has to itself. */
  nodes: Nodes;
  elements: Element[];
}

/**
 * Job → network: buses and their systems, nodes, admittances.
 * Refused, as a value that names the place: a bus with no path to a source, ideal sources of different EMF joined
 * by zero ohms, a run whose size the tables lack.
 */
export function buildNetwork(job: Job): Network | Refusal {
  const buses = buildBuses(job);
  if ('kind' in buses) return buses;
  const ohms = jobOhms(job);
  if ('kind' in ohms) return ohms;
  const windings = job.transformers.map((t) => windingsOf(job, t));
  const feeding = followFeeding(job, buses, ohms, windings);
  const nodes = buildNodes(job, buses, ohms, feeding);
  if ('kind' in nodes) return nodes;
  const { elements, starBuses } = buildElements(job, buses, ohms, feeding, nodes, windings);
  return { job, buses, ohms, feeding, windings, nodes: withStars(nodes, starBuses), elements };
}

/** Star points start from the mean of the lines around them: zero but for a mid-point delta. */
function withStars(nodes: Nodes, starBuses: number[]): Nodes {
  if (starBuses.length === 0) return nodes;
  const extended = <T extends Float64Array | Int32Array>(of: T, last: (bus: number) => number): T => {
    const Kind = of.constructor as new (length: number) => T;
    const next = new Kind(of.length + starBuses.length);
    next.set(of);
    for (const [i, bus] of starBuses.entries()) next[of.length + i] = last(bus);
    return next;
  };
  const mean = (of: Float64Array) => (bus: number) =>
    (of[nodes.at[4 * bus]!]! + of[nodes.at[4 * bus + 1]!]! + of[nodes.at[4 * bus + 2]!]!) / 3;
  const fixed = new Uint8Array(nodes.count + starBuses.length);
  fixed.set(nodes.fixed);
  return {
    ...nodes,
    count: nodes.count + starBuses.length,
    fixed,
    referenceRe: extended(nodes.referenceRe, mean(nodes.referenceRe)),
    referenceIm: extended(nodes.referenceIm, mean(nodes.referenceIm)),
    busOf: extended(nodes.busOf, (bus) => bus),
    slotOf: extended(nodes.slotOf, () => -1),
  };
}
