import type { Conductor, Job } from '../job/index.ts';
import { nominalEmfs } from '../job/systems.ts';
import type { Buses } from './bus-systems.ts';
import type { Feeding } from './feeding.ts';
import { disjointSets } from './groups.ts';
import { isZero, type JobOhms } from './job-ohms.ts';
import { SLOT } from './pair-table.ts';
import { type Refusal, refusal } from './refusal.ts';

/** Nodes: one per fed conductor of a bus, those that a run of no impedance joins being one. */
export interface Nodes {
  count: number;
  /** Node of 4·bus + slot, −1 where there is none. */
  at: Int32Array;
  /** 1 where the voltage is given: an ideal source, a bonded neutral. */
  fixed: Uint8Array;
  /**
   * Volts with no current anywhere. The solution is kept as the difference to it, so that a drop of a thousandth
   * has as many digits as a large one. A fixed node has exactly its reference.
   */
  referenceRe: Float64Array;
  referenceIm: Float64Array;
  /** The bus and slot that a node is named after in messages and equations. */
  busOf: Int32Array;
  slotOf: Int32Array;
}

export function buildNodes(job: Job, buses: Buses, ohms: JobOhms, feeding: Feeding): Nodes | Refusal {
  const { fed, runLive } = feeding;
  const slots = fed.length;
  const sets = disjointSets(slots);
  for (const [i, run] of job.runs.entries()) {
    if (!runLive[i]) continue;
    const from = 4 * buses.index.get(run.from)!;
    const to = 4 * buses.index.get(run.to)!;
    for (const [s, z] of ohms.runs[i]!.entries()) if (z && isZero(z)) sets.join(from + s, to + s);
  }
  const at = new Int32Array(slots).fill(-1);
  const named: number[] = [];
  for (let slot = 0; slot < slots; slot++) {
    if (!fed[slot]) continue;
    const root = sets.find(slot);
    if (at[root] === -1) at[root] = named.push(slot) - 1;
    at[slot] = at[root]!;
  }
  const count = named.length;
  const nodes: Nodes = {
    count,
    at,
    fixed: new Uint8Array(count),
    referenceRe: new Float64Array(count),
    referenceIm: new Float64Array(count),
    busOf: Int32Array.from(named, (slot) => slot >> 2),
    slotOf: Int32Array.from(named, (slot) => slot & 3),
  };
  const conductors = Object.entries(SLOT) as [Conductor, number][];
  for (let n = 0; n < count; n++) {
    const { origin } = buses.system[nodes.busOf[n]!]!;
    const emf = origin.emfs[conductors[nodes.slotOf[n]!]![0]] ?? [0, 0];
    nodes.referenceRe[n] = emf[0] * origin.openRatio;
    nodes.referenceIm[n] = emf[1] * origin.openRatio;
  }
  return fixVoltages(job, buses, ohms, feeding, nodes) ?? nodes;
}

/** Two given voltages nearer than this share of themselves are the same one. */
const SAME = 1e-9;

/** Ideal sources and bonded neutrals. Refused: ideal sources of different EMF joined by zero ohms. */
function fixVoltages(job: Job, buses: Buses, ohms: JobOhms, feeding: Feeding, nodes: Nodes): Refusal | null {
  const fixedBy = new Map<number, string>();
  const fix = (node: number, re: number, im: number, by: string): Refusal | null => {
    const other = fixedBy.get(node);
    if (other !== undefined) {
      const apart = Math.abs(re - nodes.referenceRe[node]!) + Math.abs(im - nodes.referenceIm[node]!);
      if (apart <= SAME * (Math.abs(re) + Math.abs(im))) return null;
      return refusal(
        by,
        `is joined by zero ohms to ${other}, whose voltage differs: give one of them an impedance`,
      );
    }
    fixedBy.set(node, by);
    nodes.fixed[node] = 1;
    nodes.referenceRe[node] = re;
    nodes.referenceIm[node] = im;
    return null;
  };
  for (const [i, source] of job.sources.entries()) {
    if (source.off) continue;
    const bus = 4 * buses.index.get(source.bus)!;
    const ratio = (source.openVolts ?? source.volts) / source.volts;
    const emfs = nominalEmfs(source.system, source.volts);
    for (const [c, [re, im]] of Object.entries(emfs) as [Conductor, readonly [number, number]][]) {
      if (c !== 'N' && !isZero(ohms.sources[i]!)) continue;
      const clash = fix(nodes.at[bus + SLOT[c]]!, re * ratio, im * ratio, `source ${source.id}`);
      if (clash) return clash;
    }
  }
  for (const [i, t] of job.transformers.entries()) {
    const neutral = nodes.at[4 * buses.index.get(t.to)! + SLOT.N]!;
    if (!feeding.transformerLive[i] || t.system === '3ph-3w' || neutral < 0) continue;
    const clash = fix(neutral, 0, 0, `transformer ${t.id}`);
    if (clash) return clash;
  }
  return null;
}
