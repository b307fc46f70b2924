import { emfMismatch } from './check-systems.ts';
import type { Report } from './draft.ts';
import type { Job, Transformer } from './schema.ts';
import type { BusSystem } from './systems.ts';
import { derived, emfBetween, magnitude, pairConductors } from './systems.ts';
import type { Conductor, System, TransformerConnection } from './vocabulary.ts';
import { SYSTEM_CONDUCTORS } from './vocabulary.ts';

const SECONDARIES: Record<TransformerConnection, readonly System[]> = {
  'delta-wye': ['3ph-4w'],
  'wye-wye': ['3ph-4w'],
  'delta-delta': ['3ph-3w', '3ph-4w-delta'],
  'wye-delta': ['3ph-3w', '3ph-4w-delta'],
  'single-phase': ['1ph-2w', '1ph-3w'],
};
const LARGEST_RATIO = 0.1;

/** Connections, systems and volts of transformers that do not fit each other or their buses. */
export function checkTransformers(job: Job, systems: ReadonlyMap<string, BusSystem>, report: Report): void {
  job.transformers.forEach((t, i) => {
    const path = `transformers[${i}]`;
    const allowed = SECONDARIES[t.connection];
    if (!allowed.includes(t.system))
      report(
        `${path}.system`,
        t.connection === 'wye-wye'
          ? `must be 3ph-4w: wye-wye needs a neutral on both sides; is ${t.system}`
          : `must be ${allowed.join(' or ')} on a ${t.connection} secondary; is ${t.system}`,
      );
    const single = t.connection === 'single-phase';
    if (single && t.primary === 'three-phase')
      report(`${path}.primary`, 'must be the pair that a single-phase transformer sits on, such as L1-L2');
    else if (!single && t.primary !== 'three-phase')
      report(`${path}.primary`, `must be three-phase on a ${t.connection} transformer; is ${t.primary}`);
    else checkPrimary(job, i, systems, report);
  });
}

const checkPrimary = (
  job: Job,
  index: number,
  systems: ReadonlyMap<string, BusSystem>,
  report: Report,
): void => {
  const t = job.transformers[index]!;
  const path = `transformers[${index}]`;
  const from = systems.get(t.from);
  if (!from) return;
  const missing = needed(t).filter((c) => !from.conductors.includes(c));
  if (missing.length > 0) {
    const why =
      t.connection === 'wye-wye' && missing.includes('N') ? ': wye-wye needs a neutral on both sides' : '';
    report(
      `${path}.from`,
      `must have ${missing.join(', ')}; bus "${t.from}" has ${from.conductors.join(', ')}${why}`,
    );
    return;
  }
  const [a, b] = needed(t) as [Conductor, Conductor];
  const across = magnitude(emfBetween(from.origin.emfs, a, b)!);
  if (Math.abs(t.primaryVolts - across) > LARGEST_RATIO * across)
    report(
      `${path}.primaryVolts`,
      `must be within 10 % of the ${Number(across.toFixed(1))} V at "${t.from}"; is ${t.primaryVolts}`,
    );
  const to = systems.get(t.to)?.origin;
  const own = derived(job, index, from.origin);
  if (!own || !to || to.transformer === index) return;
  const mismatch = emfMismatch(own.emfs, to.emfs, SYSTEM_CONDUCTORS[t.system]);
  if (mismatch)
    report(`${path}.to`, `must join equal systems; "${t.to}" is ${to.system} at ${to.volts} V: ${mismatch}`);
};

const needed = (t: Transformer): readonly Conductor[] => {
  if (t.primary !== 'three-phase') return pairConductors(t.primary);
  return t.connection === 'wye-wye' ? ['L1', 'L2', 'L3', 'N'] : ['L1', 'L2', 'L3'];
};
