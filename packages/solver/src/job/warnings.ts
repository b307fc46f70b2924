import { conductorImpedance } from '../tables/impedance.ts';
import { MOTOR_POWER_FACTOR } from '../tables/motors.ts';
import type { Job } from './schema.ts';
import type { Warning } from './solution.ts';

/** What a job leaves to assumption: power factors, estimated table values, sizes that count for nothing. */
export function jobWarnings(job: Job): Warning[] {
  return [...loadWarnings(job), ...sizeWarnings(job), ...neutralWarnings(job)];
}

const loadWarnings = (job: Job): Warning[] =>
  job.frequency === 0
    ? []
    : job.loads.flatMap((load, i) => {
        if (load.powerFactor !== null) return [];
        const text =
          load.hp === null
            ? 'no power factor is stated: 1 is assumed'
            : `no power factor is stated: ${MOTOR_POWER_FACTOR} is assumed for a motor (common practice)`;
        return [{ at: `loads[${i}].powerFactor`, text }];
      });

const sizeWarnings = (job: Job): Warning[] => {
  const estimated: Record<'awg-dc' | 'mm2-dc', { index: number; size: string }[]> = {
    'awg-dc': [],
    'mm2-dc': [],
  };
  const known = new Map<string, 'awg-dc' | 'mm2-dc' | null>();
  job.runs.forEach((run, index) => {
    if (run.ohms) return;
    for (const size of new Set([run.size, run.neutralSize])) {
      if (size === null) continue;
      const key = `${run.material} ${run.raceway} ${size}`;
      let table = known.get(key);
      if (table === undefined) {
        const z = conductorImpedance({
          material: run.material,
          size,
          raceway: run.raceway,
          frequencyHz: job.frequency,
          conductorRows: job.conductorRows,
        });
        table = z.ok && z.estimated ? (z.source as 'awg-dc' | 'mm2-dc') : null;
        known.set(key, table);
      }
      if (table) estimated[table].push({ index, size });
    }
  });
  return (Object.keys(REASONS) as ('awg-dc' | 'mm2-dc')[]).flatMap((table) => {
    const list = estimated[table];
    if (list.length === 0) return [];
    const sizes = [...new Set(list.map((entry) => entry.size))].join(', ');
    const runs = new Set(list.map((entry) => entry.index)).size;
    const at = runs === 1 ? `runs[${list[0]!.index}].size` : 'runs';
    const count = runs === 1 ? '' : ` in ${runs} runs`;
    return [{ at, text: `${sizes}${count}: estimated: ${REASONS[table]}` }];
  });
};

const REASONS = {
  'awg-dc':
    'not in Chapter 9 Table 9: resistance of Table 8 with skin effect, reactance of the nearest area in Table 9',
  'mm2-dc':
    'direct-current resistance of IEC 60228 with skin effect by IEC 60287-1-1, reactance 0.08 mΩ/m at 50 Hz',
} as const;

const neutralWarnings = (job: Job): Warning[] =>
  job.runs.flatMap((run, i) =>
    run.neutralSize !== null && !run.conductors.includes('N')
      ? [{ at: `runs[${i}].neutralSize`, text: 'the run has no N: its neutral size counts for nothing' }]
      : [],
  );
