import type { Conductor, Job, Run } from '@farlug/solver/job';
import { reference } from '../support/reference.ts';
import { type Complex, complex, scale } from './complex.ts';
import { D, type Decimal, PI, UNITY } from './decimal.ts';

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

const FOOT_M = D('0.3048');
const KFT_M = D('304.8');
const ALPHA_75 = { copper: 0.00323, aluminum: 0.0033 };
const ALPHA_20 = { copper: 0.00393, aluminum: 0.00403 };

/** Table 8 holds solid and seven-strand rows of small sizes: the stranded one counts. */
const dcRow = (size: string): DcRow | undefined =>
  dcRows.filter((row) => `${row.size} ${row.unit}` === size).sort((a, b) => b.strands - a.strands)[0];

/** IEC 60287-1-1 2.1.2: skin-effect factor 1 + ys, ks = 1, from the resistance (ohm/m) at temperature. */
export const skinFactor = (ohmPerM: Decimal, frequency: number): Decimal => {
  const square = PI.times(8).times(frequency).div(ohmPerM).times('1e-7');
  const xs = square.sqrt();
  const fourth = square.times(square);
  if (xs.lte(2.8)) return UNITY.plus(fourth.div(fourth.times('0.8').plus(192)));
  if (xs.lte(3.8)) return square.times('0.0563').minus(xs.times('0.0177')).plus('0.864');
  return xs.times('0.354').plus('0.267');
};

/** Metres of a length in the job's own unit. */
export const metresOf = (job: Job, length: number): Decimal =>
  job.lengthUnit === 'ft' ? FOOT_M.times(length) : D(length);

/** Ohms of one conductor of a run over its whole length, all sets together, at `celsius` (`null`: as the run says). */
export const conductorOhms = (job: Job, run: Run, conductor: Conductor, celsius: Decimal | null): Complex => {
  const perM = ohmsPerM(job, run, conductor, celsius);
  const z = scale(perM, metresOf(job, run.length).div(run.sets));
  return job.basis === 'resistance' || job.frequency === 0 ? complex(z.re) : z;
};

export const sizeOf = (run: Run, conductor: Conductor): string =>
  conductor === 'N' ? (run.neutralSize ?? run.size)! : run.size!;

/** R(T) = R(T0)·[1 + α(T − T0)] */
const warmth = (alpha: Decimal.Value, celsius: Decimal, from: number): Decimal =>
  celsius.minus(from).times(alpha).plus(1);

const ohmsPerM = (job: Job, run: Run, conductor: Conductor, celsius: Decimal | null): Complex => {
  if (run.ohms) {
    const unitM = run.ohms.per === 'km' ? D(1000) : KFT_M;
    const own = conductor === 'N' ? run.ohms.neutral : null;
    return complex(D(own?.r ?? run.ohms.r).div(unitM), D(own?.x ?? run.ohms.x).div(unitM));
  }
  const size = sizeOf(run, conductor);
  const at = (usual: number) => celsius ?? D(typeof run.temperature === 'number' ? run.temperature : usual);
  const metal = run.material;
  const f = job.frequency;

  const firm = job.conductorRows.find((row) => row.name === size && row.material === metal);
  if (firm) {
    const unitM = firm.per === 'km' ? D(1000) : KFT_M;
    const alpha20 = D(ALPHA_20[metal]);
    const alpha =
      firm.temperature === 75 ? ALPHA_75[metal] : alpha20.div(warmth(alpha20, D(firm.temperature), 20));
    const r = D(firm.r)
      .div(unitM)
      .times(warmth(alpha, at(firm.temperature), firm.temperature));
    return complex(r, D(firm.x).div(unitM));
  }

  if (size.endsWith(' mm2')) {
    const area = Number(size.slice(0, -4));
    const row = iecRows.find((r) => r.area_mm2 === area)!;
    const r20 = D((metal === 'copper' ? row.cu_class2_plain : row.al_class1_class2)!).div(1000);
    const r = r20.times(warmth(ALPHA_20[metal], at(70), 20));
    if (f === 0) return complex(r);
    return complex(r.times(skinFactor(r, f)), D('0.00008').times(f).div(50));
  }

  const hot = warmth(ALPHA_75[metal], at(75), 75);
  const conduit = run.raceway === 'cable' ? 'pvc' : run.raceway;
  const ac = acRows.find((row) => `${row.size} ${row.unit}` === size);
  const acR = (metal === 'copper' ? ac?.r_ac_cu : ac?.r_ac_al)?.[conduit] ?? null;
  const dc = dcRow(size)!;
  const dcR = D(metal === 'copper' ? dc.r_dc_75C_cu_uncoated_ohm_per_kft : dc.r_dc_75C_al_ohm_per_kft)
    .div(KFT_M)
    .times(hot);
  if (f === 0) return complex(dcR);
  const x = D(nearestAc(dc.area_cmil).xl[conduit]!).div(KFT_M).times(f).div(60);
  if (acR !== null) return complex(D(acR).div(KFT_M).times(hot), x);
  return complex(dcR.times(skinFactor(dcR, f)), x);
};

const nearestAc = (cmil: number): AcRow => {
  const distance = (row: AcRow) => Math.abs(dcRow(`${row.size} ${row.unit}`)!.area_cmil - cmil);
  return acRows.reduce((best, row) => (distance(row) < distance(best) ? row : best));
};
