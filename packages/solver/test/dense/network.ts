import { type Conductor, type Job, type Source, SYSTEM_CONDUCTORS } from '@farlug/solver/job';
import { type Complex, complex, div, isZero, ONE, scale, ZERO } from './complex.ts';
import { conductorOhms } from './conductors.ts';
import { nominalPhasors, windingPairs } from './systems.ts';
import { nodeOf, type Topology } from './topology.ts';

/** Admittance `y` stamped as y·u·uᵀ over the nodes of `ends`: a wire is (1, −1), a winding pair has four. */
export interface Element {
  of: { kind: 'run' | 'transformer' | 'source' | 'reference'; id: string; conductor?: Conductor };
  ends: readonly (readonly [node: string, factor: number])[];
  y: Complex;
  r: number;
}

export const EARTH = 'earth|';

export interface Network {
  elements: Element[];
  /** Nodes joined by conductors of no impedance. */
  joined: (readonly [string, string])[];
  fixed: Map<string, Complex>;
}

/** All admittances and fixed nodes; `celsius` gives conductor temperatures where a run asks for the operating one. */
export const networkOf = (
  job: Job,
  topology: Topology,
  celsius: (run: string, conductor: Conductor) => number | null,
): Network => {
  const elements: Element[] = [];
  const joined: (readonly [string, string])[] = [];
  const fixed = new Map<string, Complex>([[EARTH, ZERO]]);
  const live = (node: string) => topology.live.has(node);

  for (const run of job.runs) {
    if (run.open) continue;
    for (const conductor of run.conductors) {
      const from = nodeOf(run.from, conductor);
      const to = nodeOf(run.to, conductor);
      if (!live(from)) continue;
      const z = conductorOhms(job, run, conductor, celsius(run.id, conductor));
      if (isZero(z)) joined.push([from, to]);
      else
        elements.push({
          of: { kind: 'run', id: run.id, conductor },
          ends: [
            [from, 1],
            [to, -1],
          ],
          y: div(ONE, z),
          r: z.re,
        });
    }
  }

  job.sources.forEach((source, index) => {
    if (source.off) return;
    const z = sourceOhms(job, source);
    const ratio = (source.openVolts ?? source.volts) / source.volts;
    for (const conductor of SYSTEM_CONDUCTORS[source.system]) {
      const node = nodeOf(source.bus, conductor);
      const emf = scale(nominalPhasors(source.system, source.volts)[conductor]!, ratio);
      if (conductor === 'N' || isZero(z)) {
        fixed.set(node, emf);
        continue;
      }
      const behind = `source ${index}|${conductor}`;
      fixed.set(behind, emf);
      elements.push({
        of: { kind: 'source', id: source.id, conductor },
        ends: [
          [behind, 1],
          [node, -1],
        ],
        y: div(ONE, z),
        r: z.re,
      });
    }
  });

  for (const t of job.transformers) {
    if (!live(nodeOf(t.to, 'L1'))) continue;
    const place = (bus: string, end: string): string =>
      end === 'earth' ? EARTH : end === 'star' ? `star of ${t.id}|` : nodeOf(bus, end as Conductor);
    const pairs = windingPairs(t, job.basis);
    if (!pairs.flatMap((w) => w.primary).every((e) => e === 'star' || live(place(t.from, e)))) continue;
    for (const { primary, secondary, a, z } of pairs) {
      elements.push({
        of: { kind: 'transformer', id: t.id },
        ends: [
          [place(t.from, primary[0]), 1 / a],
          [place(t.from, primary[1]), -1 / a],
          [place(t.to, secondary[0]), -1],
          [place(t.to, secondary[1]), 1],
        ],
        y: div(ONE, z),
        r: z.re,
      });
    }
    if (SYSTEM_CONDUCTORS[t.system].includes('N')) fixed.set(nodeOf(t.to, 'N'), ZERO);
    else if (t.connection === 'delta-delta' || t.connection === 'wye-delta')
      elements.push({
        of: { kind: 'reference', id: t.id },
        ends: [
          [nodeOf(t.to, 'L1'), 1],
          [nodeOf(t.to, 'L2'), 1],
          [nodeOf(t.to, 'L3'), 1],
        ],
        y: div(ONE, pairs[0]!.z),
        r: 0,
      });
  }
  return { elements, joined, fixed };
};

/** Ohms in each line conductor of a source: stated, or from the fault current of its system (model.md 5). */
const sourceOhms = (job: Job, source: Source): Complex => {
  const resistive = job.basis === 'resistance' || job.frequency === 0;
  if (source.impedance) return complex(source.impedance.r, resistive ? 0 : source.impedance.x);
  if (!source.fault) return ZERO;
  const { amps, xOverR } = source.fault;
  const size = source.volts / (amps * faultDivisor[source.system]);
  const r = size / Math.sqrt(1 + xOverR * xOverR);
  return complex(r, resistive ? 0 : r * xOverR);
};

const faultDivisor: Record<Source['system'], number> = {
  'dc-2w': 1,
  '1ph-2w': 1,
  '1ph-3w': 2,
  '1ph-3w-wye': Math.sqrt(3),
  '3ph-3w': Math.sqrt(3),
  '3ph-4w': Math.sqrt(3),
  '3ph-4w-delta': Math.sqrt(3),
};
