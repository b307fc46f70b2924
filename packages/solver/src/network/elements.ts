import type { Conductor, Job } from '../job/index.ts';
import { nominalEmfs } from '../job/systems.ts';
import type { Buses } from './bus-systems.ts';
import { type Element, element } from './element.ts';
import type { Feeding } from './feeding.ts';
import { isZero, type JobOhms } from './job-ohms.ts';
import type { Nodes } from './nodes.ts';
import { SLOT } from './pair-table.ts';
import { STAR, type Winding } from './windings.ts';

/**
 * Every admittance of the network but those of loads. Star points that a wye has to itself are appended to the
 * nodes; their count is returned with the elements. Runs of no impedance have no element.
 */
export function buildElements(
  job: Job,
  buses: Buses,
  ohms: JobOhms,
  feeding: Feeding,
  nodes: Nodes,
  windings: Winding[][],
): { elements: Element[]; starBuses: number[] } {
  const elements: Element[] = [];
  const starBuses: number[] = [];
  const bus = (id: string): number => 4 * buses.index.get(id)!;

  for (const [i, source] of job.sources.entries()) {
    const [r, x] = ohms.sources[i]!;
    if (source.off || isZero([r, x])) continue;
    const ratio = (source.openVolts ?? source.volts) / source.volts;
    const emfs = nominalEmfs(source.system, source.volts);
    for (const [c, emf] of Object.entries(emfs) as [Conductor, readonly [number, number]][])
      if (c !== 'N') {
        const node = nodes.at[bus(source.bus) + SLOT[c]]!;
        elements.push(element('source', i, SLOT[c], [node], [1], r, x, emf[0] * ratio, emf[1] * ratio));
      }
  }
  for (const [i, run] of job.runs.entries()) {
    if (!feeding.runLive[i]) continue;
    for (const [s, z] of ohms.runs[i]!.entries()) {
      const from = nodes.at[bus(run.from) + s]!;
      const to = nodes.at[bus(run.to) + s]!;
      if (!z || isZero(z) || from < 0) continue;
      elements.push(element('run', i, s, [from, to], [1, -1], z[0], z[1]));
    }
  }
  for (const [i, t] of job.transformers.entries()) {
    if (!feeding.transformerLive[i]) continue;
    const star = windings[i]!.some((w) => w.primary[1] === STAR) ? nodes.count + starBuses.length : -1;
    if (star >= 0) starBuses.push(bus(t.from) / 4);
    const primary = (terminal: Winding['primary'][number]) =>
      terminal === STAR ? star : nodes.at[bus(t.from) + SLOT[terminal]]!;
    const secondary = (c: Conductor) => nodes.at[bus(t.to) + SLOT[c]]!;
    for (const w of windings[i]!) {
      const at = [
        primary(w.primary[0]),
        primary(w.primary[1]),
        secondary(w.secondary[0]),
        secondary(w.secondary[1]),
      ];
      const turns = 1 / w.ratio;
      elements.push(element('winding', i, -1, at, [turns, -turns, -1, 1], w.ohms[0], w.ohms[1]));
    }
    if (t.system === '3ph-3w') {
      const lines = (['L1', 'L2', 'L3'] as const).map(secondary);
      const [r, x] = windings[i]![0]!.ohms;
      elements.push(element('centroid', i, -1, lines, [1, 1, 1], r, x));
    }
  }
  return { elements, starBuses };
}
