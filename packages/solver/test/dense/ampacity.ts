import type { Conductor, Job, Run } from '@farlug/solver/job';
import { reference } from '../support/reference.ts';
import { sizeOf } from './conductors.ts';
import { D, type Decimal, UNITY } from './decimal.ts';

type Cell = number | null;
interface Adjustment {
  ccc_min: number;
  ccc_max: number | null;
  percent: number;
}
const awg = reference<{
  rows: ({ size: string } & Record<string, Cell>)[];
  adjustment_more_than_three_ccc: { rows: Adjustment[] };
}>('ampacity-awg');
interface IecCells {
  conductor_C: number;
  loaded_conductors: number;
  material: string;
  area_mm2: number;
}
const iec = reference<{
  rows: (IecCells & Record<string, Cell>)[];
  grouping_B_52_17: { rows: { factors: Record<string, number> }[] };
}>('ampacity-iec');

/** What the operating-temperature formula of model.md 3 takes from the tables, for one conductor. */
export interface Thermal {
  ambient: Decimal;
  rated: Decimal;
  referenceAmbient: Decimal;
  /** Iz·Cg, amps of all sets. */
  fullAmps: Decimal;
}

/** T = Ta + (Tr − Tref)·(I/(Iz·Cg))² */
export const celsiusAt = (thermal: Thermal, amps: Decimal): Decimal =>
  thermal.rated
    .minus(thermal.referenceAmbient)
    .times(amps.div(thermal.fullAmps).pow(2))
    .plus(thermal.ambient);

export const thermalOf = (job: Job, run: Run, conductor: Conductor): Thermal => {
  const size = sizeOf(run, conductor);
  const thermal = (rated: number, reference: number, amps: number, factor: Decimal): Thermal => ({
    ambient: D(run.ambient ?? reference),
    rated: D(rated),
    referenceAmbient: D(reference),
    fullAmps: D(amps).times(factor).times(run.sets),
  });
  const bundled = run.bundled ?? 1;
  const firm = job.conductorRows.find((row) => row.name === size && row.material === run.material);
  if (firm) return thermal(run.insulation ?? 75, 30, firm.ampacity!, UNITY);
  if (!size.endsWith(' mm2')) {
    const rated = run.insulation ?? 75;
    const row = awg.rows.find((r) => r.size === size.split(' ')[0])!;
    const percent = awg.adjustment_more_than_three_ccc.rows.find(
      (r) => bundled >= r.ccc_min && bundled <= (r.ccc_max ?? Number.POSITIVE_INFINITY),
    )?.percent;
    const column = `${run.material === 'copper' ? 'cu' : 'al'}_${rated}C`;
    return thermal(rated, 30, row[column]!, D(percent ?? 100).div(100));
  }
  const rated = run.insulation ?? 70;
  const loaded = run.conductors.filter((c) => c !== 'N').length === 3 ? 3 : 2;
  const method = run.method!;
  const row = iec.rows.find(
    (r) =>
      r.conductor_C === rated &&
      r.loaded_conductors === loaded &&
      r.material === (run.material === 'copper' ? 'copper' : 'aluminium') &&
      r.area_mm2 === Number(size.slice(0, -4)),
  )!;
  const listed = Object.entries(iec.grouping_B_52_17.rows[0]!.factors);
  const grouped = listed.find(([circuits]) => bundled <= Number(circuits))![1];
  const inGround = method === 'D1' || method === 'D2';
  return thermal(rated, inGround ? 20 : 30, row[method]!, D(grouped));
};
