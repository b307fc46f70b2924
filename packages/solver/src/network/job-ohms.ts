import type { Job } from '../job/index.ts';
import { SLOT } from './pair-table.ts';
import { type Refusal, refusal } from './refusal.ts';
import { runOhms } from './run-impedance.ts';
import { sourceOhms } from './source-impedance.ts';

/** (r, x) in ohm of each conductor slot of a run (L1, L2, L3, N); `null` for a slot that it lacks. */
export type SlotOhms = readonly (readonly [r: number, x: number] | null)[];

export interface JobOhms {
  runs: SlotOhms[];
  sources: (readonly [r: number, x: number])[];
  /** Indices of runs whose figures stand in for ones that the tables lack. */
  estimatedRuns: number[];
}

/** Impedances of every run and source on the job's basis. Refused: a size that the tables lack, naming the run. */
export function jobOhms(job: Job): JobOhms | Refusal {
  const runs: SlotOhms[] = [];
  const estimatedRuns: number[] = [];
  for (const [i, run] of job.runs.entries()) {
    const found = runOhms(job, run);
    if (!found.ok) return refusal(`run ${run.id}`, found.message);
    const slots: (readonly [number, number] | null)[] = [null, null, null, null];
    for (const c of run.conductors) slots[SLOT[c]] = (c === 'N' ? found.neutral : found.line).ohms;
    runs.push(slots);
    const neutralCounts = run.conductors.includes('N') && found.neutral.estimated;
    if (found.line.estimated || neutralCounts) estimatedRuns.push(i);
  }
  return { runs, sources: job.sources.map((source) => sourceOhms(job, source)), estimatedRuns };
}

export const isZero = (z: readonly [number, number]): boolean => z[0] === 0 && z[1] === 0;
