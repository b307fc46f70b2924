import type { Conductor, Phasor } from '../job/index.ts';
import { CONDUCTORS, PAIRS } from '../job/index.ts';
import type { Element } from '../network/index.ts';
import { LINE_LINE, LINE_NEUTRAL, SLOT } from '../network/index.ts';
import type { Core } from './core.ts';
import { dropAt, SAME_PERCENT } from './drop.ts';
import type { Volts } from './volts.ts';

/** What flows in a run, and what it loses. Amps of all sets together, from its `from` to its `to`. */
export interface RunFlow {
  amps: Partial<Record<Conductor, number>>;
  dropVolts: number | null;
  dropPercent: number | null;
  lossWatts: number;
}

/** Elements of each run, by run. */
export function runElements(core: Core, elements: readonly Element[]): Element[][] {
  const list: Element[][] = core.job.runs.map(() => []);
  for (const e of elements) if (e.kind === 'run') list[e.owner]!.push(e);
  return list;
}

/**
 * Figures of a run: |V_from − V_to|/|z| per conductor; the signed drop of the pair with the largest absolute percent
 * (line to neutral where the run has N, else line to line); Σ I²r. `null` where all of it is merged, open or dead.
 */
export function runFlow(core: Core, volts: Volts, run: number, elements: readonly Element[]): RunFlow | null {
  if (elements.length === 0) return null;
  const { buses, nodes } = core.network;
  const { from, to, conductors } = core.job.runs[run]!;
  const amps: RunFlow['amps'] = {};
  let lossWatts = 0;
  for (const e of elements) {
    const [a, b] = e.nodes as [number, number];
    const dRe = nodes.referenceRe[a]! - nodes.referenceRe[b]! + (volts.re[a]! - volts.re[b]!);
    const dIm = nodes.referenceIm[a]! - nodes.referenceIm[b]! + (volts.im[a]! - volts.im[b]!);
    const square = (dRe * dRe + dIm * dIm) / (e.zRe * e.zRe + e.zIm * e.zIm);
    amps[CONDUCTORS[e.conductor]!] = Math.sqrt(square);
    lossWatts += square * e.zRe;
  }
  let dropVolts: number | null = null;
  let dropPercent: number | null = null;
  const near = buses.index.get(from)!;
  const far = buses.index.get(to)!;
  const has = (p: number): boolean => PAIRS[p]!.split('-').every((c) => conductors.includes(c as Conductor));
  for (const p of conductors.includes('N') ? LINE_NEUTRAL : LINE_LINE) {
    if (!has(p)) continue;
    const one = dropAt(core, volts, near, p);
    const other = dropAt(core, volts, far, p);
    const emf = buses.system[near]!.pairs[p];
    if (!one || !other || !emf) continue;
    const lost = other.dropVolts - one.dropVolts + openApart(core, near, far, p);
    const percent = (100 * lost) / emf.nominal;
    if (dropPercent !== null && Math.abs(percent) <= Math.abs(dropPercent) + SAME_PERCENT) continue;
    dropVolts = lost;
    dropPercent = percent;
  }
  return { amps, dropVolts, dropPercent, lossWatts };
}

/** |V_from| − |V_to| is the difference of the drops, but for a run between sources of different open volts. */
const openApart = (core: Core, near: number, far: number, pair: number): number => {
  const { system } = core.network.buses;
  return system[near]!.pairs[pair]!.openVolts - system[far]!.pairs[pair]!.openVolts;
};

/** Volts of a bus's conductors against the reference of its system. */
export function busPhasors(core: Core, volts: Volts, bus: number): Partial<Record<Conductor, Phasor>> {
  const { nodes } = core.network;
  const list: Partial<Record<Conductor, Phasor>> = {};
  for (const c of CONDUCTORS) {
    const node = nodes.at[4 * bus + SLOT[c]]!;
    if (node >= 0)
      list[c] = [nodes.referenceRe[node]! + volts.re[node]!, nodes.referenceIm[node]! + volts.im[node]!];
  }
  return list;
}
