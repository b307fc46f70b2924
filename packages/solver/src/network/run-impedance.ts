import type { Conductor, Job, Phasor, Run } from '../job/index.ts';
import { conductorImpedance, M_PER_KFT, M_PER_KM } from '../tables/impedance.ts';

const M_PER_FT = 0.3048;

/** Length of a run in metres. */
export const lengthMOf = (job: Pick<Job, 'lengthUnit'>, run: Pick<Run, 'length'>): number =>
  job.lengthUnit === 'ft' ? run.length * M_PER_FT : run.length;

export interface ConductorOhms {
  /** (r, x) of the whole length, all sets in parallel, on the job's basis; x is 0 on the resistance basis. */
  ohms: Phasor;
  /** A table figure that another one stands in for: direct current above 0 Hz, or another size's reactance. */
  estimated: boolean;
}
export type RunOhms =
  | { ok: true; line: ConductorOhms; neutral: ConductorOhms }
  | { ok: false; message: string };

/** Ohm per metre that the run states itself; neither temperature nor frequency applies. */
function statedOhms(run: Run, neutral: boolean): Phasor {
  const stated = run.ohms!;
  const metres = stated.per === 'km' ? M_PER_KM : M_PER_KFT;
  const r = neutral ? (stated.neutral?.r ?? stated.r) : stated.r;
  const x = neutral ? (stated.neutral?.x ?? stated.x) : stated.x;
  return [r / metres, x / metres];
}

/**
 * Impedance of the line conductors and of the neutral of a run (model: z = (r + jx)·length/sets).
 * `temperatureC` per conductor kind replaces the run's own temperature, as the operating-temperature rounds need.
 * Refused: a size that the tables lack.
 */
export function runOhms(job: Job, run: Run, temperatureC?: number): RunOhms {
  const line = conductorOhms(job, run, 'L1', temperatureC);
  if (!line.ok) return line;
  const neutral = conductorOhms(job, run, 'N', temperatureC);
  if (!neutral.ok) return neutral;
  return { ok: true, line, neutral };
}

/** The same for one conductor of a run, at a temperature of its own. */
export function conductorOhms(
  job: Job,
  run: Run,
  conductor: Conductor,
  temperatureC?: number,
): ({ ok: true } & ConductorOhms) | { ok: false; message: string } {
  if (run.length === 0) return { ok: true, ohms: [0, 0], estimated: false };
  const neutral = conductor === 'N';
  const factor = lengthMOf(job, run) / run.sets;
  const reactive = job.basis === 'impedance' && job.frequency > 0;
  if (run.ohms) {
    const [r, x] = statedOhms(run, neutral);
    return { ok: true, ohms: [r * factor, reactive ? x * factor : 0], estimated: false };
  }
  const size = (neutral ? run.neutralSize : null) ?? run.size;
  if (size === null) return { ok: false, message: 'must have a size or its own ohms' };
  const found = conductorImpedance({
    material: run.material,
    size,
    raceway: run.raceway,
    frequencyHz: job.frequency,
    temperatureC: temperatureC ?? (typeof run.temperature === 'number' ? run.temperature : null),
    conductorRows: job.conductorRows,
  });
  if (!found.ok) return found;
  const x = reactive ? found.xOhmPerM * factor : 0;
  return { ok: true, ohms: [found.rOhmPerM * factor, x], estimated: found.estimated };
}
