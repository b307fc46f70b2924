import type { Conductor, Job, Run } from '@farlug/solver/job';
import { reference } from '../support/reference.ts';
import { sizeOf } from './conductors.ts';
import { D, type Decimal } from './decimal.ts';

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
  if (!size.endsWith(' mm2')) {
    const rated = run.insulation ?? 75;
    const firm = job.conductorRows.find((row) => row.name === size && row.material === run.material);
    const row = awg.rows.find((r) => r.size === size.split(' ')[0]);
    const column = `${run.material === 'copper' ? 'cu' : 'al'}_${rated}C`;
    const percent =
      awg.adjustment_more_than_three_ccc.rows.find(
        (r) =>
          (run.bundled ?? 1) >= r.ccc_min && (run.bundled ?? 1) <= (r.ccc_max ?? Number.POSITIVE_INFINITY),
      )?.percent ?? 100;
    const full = firm ? firm.ampacity! : row![column]!;
    return {
      ambient: D(run.ambient ?? 30),
      rated: D(rated),
      referenceAmbient: D(30),
      fullAmps: D(full).times(percent).div(100).times(run.sets),
    };
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
  const grouped = iec.grouping_B_52_17.rows[0]!.factors[String(run.bundled ?? 1)]!;
  const inGround = method === 'D1' || method === 'D2';
  const referenceAmbient = inGround ? 20 : 30;
  return {
    ambient: D(run.ambient ?? 30),
    rated: D(rated),
    referenceAmbient: D(referenceAmbient),
    fullAmps: D(row[method]!).times(grouped).times(run.sets),
  };
};
