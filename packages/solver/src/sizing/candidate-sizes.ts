import type { Job, Material, Run } from '../job/index.ts';
import { runSize } from '../job/run-ratings.ts';
import type { SizeFamily } from '../tables/size.ts';
import { sizesOf } from '../tables/size.ts';

export interface CandidateSize {
  material: Material;
  size: string;
  sets: number;
  /** Circular mils of one conductor. */
  cmil: number;
}

/** Smallest conductors of power circuits: NEC 310.3(A), 14 AWG Cu and 12 AWG Al; IEC 60364-5-52 Table 52.2, 1.5 mm² Cu. */
const SMALLEST: Record<SizeFamily, Record<Material, number>> = {
  awg: { copper: 4110, aluminum: 6530 },
  mm2: { copper: 1.5, aluminum: 10 },
};
/** Parallel sets start at 1/0 AWG (NEC 310.10(G)). */
const SMALLEST_PARALLEL_CMIL = 105_600;
const CMIL_PER_MM2 = 1 / 5.067074790974977e-4;

/** The family that a run's sizes come from: its own, or the one that goes with the job's lengths. */
export function sizeFamilyOf(job: Job, run: Run): SizeFamily {
  const size = runSize(run, job.conductorRows);
  return size?.kind === 'table' ? size.family : job.lengthUnit === 'ft' ? 'awg' : 'mm2';
}

/**
 * Every size that a run could be laid in, thinnest first within material and sets: the tables', then the firm's own
 * rows of the same material.
 */
export function candidateSizes(
  job: Job,
  run: Run,
  materials: readonly Material[],
  maxSets: number,
): CandidateSize[] {
  const family = sizeFamilyOf(job, run);
  return materials.flatMap((material) => {
    const tables = sizesOf(material, family)
      .filter((s) => (family === 'awg' ? s.cmil : s.areaMm2) >= SMALLEST[family][material])
      .map(({ size, cmil }) => ({ size, cmil }));
    const own = job.conductorRows
      .filter((row) => row.material === material)
      .map((row) => ({ size: row.name, cmil: row.areaMm2 * CMIL_PER_MM2 }));
    return Array.from({ length: maxSets }, (_, i) => i + 1).flatMap((sets) =>
      [...tables, ...own]
        .filter(({ cmil }) => sets === 1 || family === 'mm2' || cmil >= SMALLEST_PARALLEL_CMIL)
        .map(({ size, cmil }) => ({ material, size, sets, cmil })),
    );
  });
}

/** The run laid in another size; ohms that it stated give way. */
export const laidIn = (run: Run, { material, size, sets }: Omit<CandidateSize, 'cmil'>): Run => ({
  ...run,
  material,
  size,
  sets,
  ohms: null,
});

export const withRun = (job: Job, index: number, run: Run): Job => ({
  ...job,
  runs: job.runs.map((own, i) => (i === index ? run : own)),
});
