import type { Job, Run } from '../job/index.ts';
import { runSize } from '../job/run-ratings.ts';
import { conductorImpedance, M_PER_KFT, M_PER_KM } from '../tables/impedance.ts';
import { formatNumber, formatSize } from '../units/format.ts';
import type { HandConductor } from './formulas.ts';

export interface ConductorFigures {
  /** As printed in the table or stated by the run, per 1000 ft or per km as the job counts lengths. */
  conductor: HandConductor;
  /** The same in words: `R 1.2 and X 0.063 Ω per 1000 ft, NEC Chapter 9 Table 9`. */
  words: string;
  /** °C that the figures hold at; `null` for stated ohms. */
  atC: number | null;
}

const SOURCES = {
  'awg-ac': 'NEC Chapter 9 Table 9',
  'awg-dc': 'NEC Chapter 9 Table 8',
  'mm2-dc': 'IEC 60228 class 2 at 20 °C',
  'conductor-row': 'the firm’s own row',
} as const;

interface Printed {
  r: number;
  x: number;
  per: '1000ft' | 'km';
  atC: number | null;
  source: string;
}

const printedOf = (job: Job, run: Run, neutral: boolean): Printed | null => {
  if (run.ohms) {
    const { r, x, per, neutral: own } = run.ohms;
    const stated = neutral ? { r: own?.r ?? r, x: own?.x ?? x } : { r, x };
    return { ...stated, per, atC: null, source: 'as stated' };
  }
  const size = (neutral ? run.neutralSize : null) ?? run.size;
  if (size === null) return null;
  const z = conductorImpedance({
    material: run.material,
    size,
    raceway: run.raceway,
    frequencyHz: job.frequency,
    conductorRows: job.conductorRows,
  });
  if (!z.ok) return null;
  return { ...z.printed, source: SOURCES[z.source as keyof typeof SOURCES] };
};

/** Printed ohms of a run's line conductor, and of its neutral where that differs, in the job's units. */
export function conductorFigures(job: Job, run: Run): ConductorFigures | null {
  const line = printedOf(job, run, false);
  const neutral = run.conductors.includes('N') ? printedOf(job, run, true) : null;
  if (!line) return null;
  const feet = job.lengthUnit === 'ft';
  const scale = (p: Printed) =>
    (p.per === 'km' ? 1 / M_PER_KM : 1 / M_PER_KFT) * (feet ? M_PER_KFT : M_PER_KM);
  const reactive = job.basis === 'impedance' && job.frequency > 0;
  const inUnits = (p: Printed) => ({ r: p.r * scale(p), x: reactive ? p.x * scale(p) : 0 });
  const own = inUnits(line);
  const back = neutral && inUnits(neutral);
  const differs = back !== null && (back.r !== own.r || back.x !== own.x);
  const per = feet ? '1000 ft' : 'km';
  const words = ({ r, x }: { r: number; x: number }, mark: string) =>
    x === 0
      ? `R${mark} ${formatNumber(r, 4)}`
      : `R${mark} ${formatNumber(r, 4)} and X${mark} ${formatNumber(x, 4)}`;
  return {
    conductor: { ...own, returns: differs ? back : null, length: run.length / 1000, sets: run.sets },
    words: `${words(own, '')}${differs ? `, ${words(back, 'n')}` : ''} Ω per ${per}, ${line.source}`,
    atC: line.atC,
  };
}

const METAL = { copper: 'Cu', aluminum: 'Al' } as const;

/** `2 sets of 3/0 AWG Cu in steel, 120 ft`. */
export function wireWords(job: Job, run: Run): string {
  const size = run.size === null ? 'stated ohms' : `${formatSize(run.size)} ${METAL[run.material]}`;
  const where = run.size === null ? '' : run.raceway === 'cable' ? ' in cable' : ` in ${run.raceway} raceway`;
  const neutral =
    run.neutralSize !== null && run.neutralSize !== run.size
      ? `, neutral ${formatSize(run.neutralSize)}`
      : '';
  const sets = run.sets > 1 ? `${run.sets} sets of ` : '';
  return `${sets}${size}${neutral}${where}, ${formatNumber(run.length, 3)} ${job.lengthUnit}`;
}

/** Circular mils of an AWG size, mm² of a metric one; `null` where the run has neither. */
export function handSize(job: Job, run: Run): { cmil: number } | { areaMm2: number } | null {
  if (run.ohms) return null;
  const size = runSize(run, job.conductorRows);
  if (size?.kind !== 'table') return null;
  return size.family === 'awg' ? { cmil: size.cmil } : { areaMm2: size.areaMm2 };
}
