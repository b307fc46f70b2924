import type { JobFile, Scenario, Solution, System } from '@farlug/solver/job';
import { SCENARIOS } from '@farlug/solver/job';
import fc from 'fast-check';
import { expect } from 'vitest';
import { solveDense } from '../dense/solve-dense.ts';
import { differences } from './compare.ts';
import { randomJob } from './random-job.ts';

/** `FARLUG_DEEP=1` runs thousands of jobs; a plain run a few dozen, from a fixed seed so that it is the same each time. */
export const DEEP = process.env.FARLUG_DEEP === '1';
export const runs = (few: number): fc.Parameters<unknown> =>
  DEEP ? { numRuns: few * 40 } : { numRuns: few, seed: 20_261_201 };
export const seeds = fc.noShrink(fc.nat());
/**
 * 1e-9 of nominal volts where one solve is exact (both sides err by some 1e-13); where a solution is iterated, the product
 * stops at a step of 1e-10 (amps of operating temperatures: 1e-8), which leaves several steps' worth of error.
 */
export const epsilonOf = (job: JobFile): number => {
  if (job.runs?.some((run) => run.temperature === 'operating')) return 2e-8;
  const iterated = job.angle === 'local' || job.loads?.some((load) => load.behaviour === 'power');
  return iterated ? 2e-9 : 1e-9;
};
/**
 * Where a network collapses before a limit trips, headroom ends at the collapse here, and there where 600 plain rounds
 * do not settle any more: up to a tenth of the current apart. Compared for one job in 16 of the
 * deep runs: the dense solver takes seconds for it.
 */
const headroomEpsilonOf = (job: JobFile, seed: number): number | null => {
  if (epsilonOf(job) === 1e-9) return 1e-9;
  return DEEP && seed % 16 === 0 ? 2e-4 : null;
};
/** A solution, or null where the network cannot be solved. */
export const outcomeOf = (act: () => Solution): Solution | null => {
  try {
    return act();
  } catch (error) {
    if (error instanceof Error && /no solution|do not settle/.test(error.message)) return null;
    throw error;
  }
};

/** Random jobs of one supply system, each in a random scenario: `solve` must print what the dense solver prints. */
export const againstDense = (
  solve: (job: JobFile, scenario: Scenario) => Solution,
  system: System,
  few: number,
): void => {
  fc.assert(
    fc.property(seeds, fc.constantFrom(...SCENARIOS), (seed, scenario) => {
      const job = randomJob(seed, { system });
      const headroom = headroomEpsilonOf(job, seed);
      const ours = outcomeOf(() => solve(job, scenario));
      const theirs = outcomeOf(() => solveDense(job, scenario, headroom !== null));
      if (ours === null || theirs === null) return;
      expect(differences(job, ours, theirs, epsilonOf(job), headroom)).toEqual([]);
    }),
    runs(few),
  );
};
