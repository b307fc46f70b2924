import { type Conductor, type Job, type Source, SYSTEM_CONDUCTORS } from '@farlug/solver/job';
import { celsiusAt, thermalOf } from './ampacity.ts';
import { type Complex, complex, inverse, isZero, scale, ZERO } from './complex.ts';
import { conductorOhms } from './conductors.ts';
import { D, type Decimal, NIL, ROOT3, UNITY } from './decimal.ts';
import { nominalPhasors, splitOhms, windingPairs } from './systems.ts';
import { nodeOf, type Topology } from './topology.ts';

/** Admittance `y` stamped as y·u·uᵀ over the nodes of `ends`: a wire is (1, −1), a winding pair has four. */
export interface Element {
  of: { kind: 'run' | 'transformer' | 'source' | 'reference'; id: string; conductor?: Conductor };
  ends: readonly (readonly [node: string, factor: Decimal])[];
  y: Complex;
  r: Decimal;
  /** A conductor at operating temperature: what it comes to while `amps` flow. `y` and `r` are those at rated temperature. */
  warm?: { celsius: (amps: Decimal) => Decimal; ohms: (celsius: Decimal) => Complex };
}

export const PLUS = UNITY;
export const MINUS = UNITY.neg();

export const EARTH = 'earth|';

export interface Network {
  elements: Element[];
  /** Nodes joined by conductors of no impedance. */
  joined: (readonly [string, string])[];
  fixed: Map<string, Complex>;
}

/** All admittances and fixed nodes. */
export const networkOf = (job: Job, topology: Topology): Network => {
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
      const thermal = run.temperature === 'operating' && !run.ohms ? thermalOf(job, run, conductor) : null;
      const z = conductorOhms(job, run, conductor, thermal?.rated ?? null);
      if (isZero(z)) {
        joined.push([from, to]);
        continue;
      }
      const wire: Element = {
        of: { kind: 'run', id: run.id, conductor },
        ends: [
          [from, PLUS],
          [to, MINUS],
        ],
        y: inverse(z),
        r: z.re,
      };
      if (thermal)
        wire.warm = {
          celsius: (amps) => celsiusAt(thermal, amps),
          ohms: (celsius) => conductorOhms(job, run, conductor, celsius),
        };
      elements.push(wire);
    }
  }

  job.sources.forEach((source, index) => {
    if (source.off) return;
    const z = sourceOhms(job, source);
    const ratio = D(source.openVolts ?? source.volts).div(source.volts);
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
          [behind, PLUS],
          [node, MINUS],
        ],
        y: inverse(z),
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
      const share = UNITY.div(a);
      elements.push({
        of: { kind: 'transformer', id: t.id },
        ends: [
          [place(t.from, primary[0]), share],
          [place(t.from, primary[1]), share.neg()],
          [place(t.to, secondary[0]), MINUS],
          [place(t.to, secondary[1]), PLUS],
        ],
        y: inverse(z),
        r: z.re,
      });
    }
    if (SYSTEM_CONDUCTORS[t.system].includes('N')) fixed.set(nodeOf(t.to, 'N'), ZERO);
    else if (t.connection === 'delta-delta' || t.connection === 'wye-delta')
      elements.push({
        of: { kind: 'reference', id: t.id },
        ends: [
          [nodeOf(t.to, 'L1'), PLUS],
          [nodeOf(t.to, 'L2'), PLUS],
          [nodeOf(t.to, 'L3'), PLUS],
        ],
        y: inverse(pairs[0]!.z),
        r: NIL,
      });
  }
  return { elements, joined, fixed };
};

/** Ohms in each line conductor of a source: stated, or from the fault current of its system (model.md 5). */
const sourceOhms = (job: Job, source: Source): Complex => {
  const resistive = job.basis === 'resistance' || job.frequency === 0;
  if (source.impedance) return complex(D(source.impedance.r), resistive ? NIL : D(source.impedance.x));
  if (!source.fault) return ZERO;
  const { amps, xOverR } = source.fault;
  return splitOhms(D(source.volts).div(faultDivisor[source.system].times(amps)), xOverR, resistive);
};

const faultDivisor: Record<Source['system'], Decimal> = {
  'dc-2w': UNITY,
  '1ph-2w': UNITY,
  '1ph-3w': D(2),
  '1ph-3w-wye': ROOT3,
  '3ph-3w': ROOT3,
  '3ph-4w': ROOT3,
  '3ph-4w-delta': ROOT3,
};
