import type { Conductor, Job, Run } from '@farlug/solver/job';
import { reference } from '../support/reference.ts';
import { type Complex, complex, scale } from './complex.ts';

interface DcRow {
  size: string;
  unit: string;
  area_cmil: number;
  strands: number;
  r_dc_75C_cu_uncoated_ohm_per_kft: number;
  r_dc_75C_al_ohm_per_kft: number;
}
type ByConduit = Record<'pvc' | 'aluminum' | 'steel', number | null>;
interface AcRow {
  size: string;
  unit: string;
  xl: ByConduit;
  r_ac_cu: ByConduit;
  r_ac_al: ByConduit;
}
interface IecRow {
  area_mm2: number;
  cu_class2_plain: number | null;
  al_class1_class2: number | null;
}
const dcRows = reference<{ rows: DcRow[] }>('conductors-awg-dc').rows;
const acRows = reference<{ rows: AcRow[] }>('conductors-awg-ac').rows;
const iecRows = reference<{ rows: IecRow[] }>('conductors-iec-dc').rows;

const KFT_M = 304.8;
const ALPHA_75 = { copper: 0.00323, aluminum: 0.0033 };
const ALPHA_20 = { copper: 0.00393, aluminum: 0.00403 };

/** Table 8 holds solid and seven-strand rows of small sizes: the stranded one counts. */
const dcRow = (size: string): DcRow | undefined =>
  dcRows.filter((row) => `${row.size} ${row.unit}` === size).sort((a, b) => b.strands - a.strands)[0];

/** IEC 60287-1-1 2.1.2: skin-effect factor 1 + ys, ks = 1, from the resistance (ohm/m) at temperature. */
export const skinFactor = (ohmPerM: number, frequency: number): number => {
  const square = ((8 * Math.PI * frequency) / ohmPerM) * 1e-7;
  const xs = Math.sqrt(square);
  if (xs <= 2.8) return 1 + square ** 2 / (192 + 0.8 * square ** 2);
  if (xs <= 3.8) return 1 + (-0.136 - 0.0177 * xs + 0.0563 * square);
  return 1 + (0.354 * xs - 0.733);
};

/** Ohms of one conductor of a run over its whole length, all sets together, at `celsius` (`null`: as the run says). */
export const conductorOhms = (job: Job, run: Run, conductor: Conductor, celsius: number | null): Complex => {
  const metres = job.lengthUnit === 'ft' ? run.length * 0.3048 : run.length;
  const perM = ohmsPerM(job, run, conductor, celsius);
  const z = scale(perM, metres / run.sets);
  return job.basis === 'resistance' || job.frequency === 0 ? complex(z.re) : z;
};

export const sizeOf = (run: Run, conductor: Conductor): string =>
  conductor === 'N' ? (run.neutralSize ?? run.size)! : run.size!;

const ohmsPerM = (job: Job, run: Run, conductor: Conductor, celsius: number | null): Complex => {
  if (run.ohms) {
    const unitM = run.ohms.per === 'km' ? 1000 : KFT_M;
    const own = conductor === 'N' ? run.ohms.neutral : null;
    return complex((own?.r ?? run.ohms.r) / unitM, (own?.x ?? run.ohms.x) / unitM);
  }
  const size = sizeOf(run, conductor);
  const stated = typeof run.temperature === 'number' ? run.temperature : null;
  const metal = run.material;
  const f = job.frequency;

  const firm = job.conductorRows.find((row) => row.name === size && row.material === metal);
  if (firm) {
    const unitM = firm.per === 'km' ? 1000 : KFT_M;
    const t = celsius ?? stated ?? firm.temperature;
    const alpha20 = ALPHA_20[metal];
    const alpha =
      firm.temperature === 75 ? ALPHA_75[metal] : alpha20 / (1 + alpha20 * (firm.temperature - 20));
    return complex((firm.r / unitM) * (1 + alpha * (t - firm.temperature)), firm.x / unitM);
  }

  if (size.endsWith(' mm2')) {
    const area = Number(size.slice(0, -4));
    const row = iecRows.find((r) => r.area_mm2 === area)!;
    const r20 = (metal === 'copper' ? row.cu_class2_plain : row.al_class1_class2)! / 1000;
    const r = r20 * (1 + ALPHA_20[metal] * ((celsius ?? stated ?? 70) - 20));
    if (f === 0) return complex(r);
    return complex(r * skinFactor(r, f), (0.08e-3 * f) / 50);
  }

  const t = celsius ?? stated ?? 75;
  const warmth = 1 + ALPHA_75[metal] * (t - 75);
  const conduit = run.raceway === 'cable' ? 'pvc' : run.raceway;
  const ac = acRows.find((row) => `${row.size} ${row.unit}` === size);
  const acR = (metal === 'copper' ? ac?.r_ac_cu : ac?.r_ac_al)?.[conduit] ?? null;
  const dc = dcRow(size)!;
  const dcR =
    ((metal === 'copper' ? dc.r_dc_75C_cu_uncoated_ohm_per_kft : dc.r_dc_75C_al_ohm_per_kft) / KFT_M) *
    warmth;
  if (f === 0) return complex(dcR);
  const x = ((nearestAc(dc.area_cmil).xl[conduit]! / KFT_M) * f) / 60;
  if (acR !== null) return complex((acR / KFT_M) * warmth, x);
  return complex(dcR * skinFactor(dcR, f), x);
};

const nearestAc = (cmil: number): AcRow => {
  const distance = (row: AcRow) => Math.abs(dcRow(`${row.size} ${row.unit}`)!.area_cmil - cmil);
  return acRows.reduce((best, row) => (distance(row) < distance(best) ? row : best));
};
