import type { JobFile, Scenario, Solution, System } from '@farlug/solver/job';
import fc from 'fast-check';
import { expect } from 'vitest';
import { solveDense } from '../dense/solve-dense.ts';
import { differences } from './compare.ts';
import { randomJob } from './random-job.ts';

/** `FARLUG_DEEP=1` runs thousands of jobs; a plain run a few dozen, from a fixed seed so that it is the same each time. */
export const DEEP = process.env.FARLUG_DEEP === '1';
export const runs = (few: number, start = 0): fc.Parameters<unknown> =>
  DEEP ? { numRuns: few * 40 } : { numRuns: few, seed: 20_261_201 + start };
export const seeds = fc.noShrink(fc.nat());

/** A solution, or null where the network cannot be solved. */
export const outcomeOf = <S extends Solution>(act: () => S): S | null => {
  try {
    return act();
  } catch (error) {
    if (error instanceof Error && /no solution|do not settle/.test(error.message)) return null;
    throw error;
  }
};

/**
 * Random jobs of one supply system in one scenario: `solve` must print what the dense solver prints, and refuse what it
 * finds no solution of. Headroom is the same in every scenario; where currents follow the voltages it costs the dense
 * solver seconds: two loads of a job, in `each-circuit` alone.
 */
export const againstDense = (
  solve: (job: JobFile, scenario: Scenario) => Solution,
  system: System,
  scenario: Scenario,
  iterated: boolean,
  start: number,
): void => {
  fc.assert(
    fc.property(seeds, (seed) => {
      const job = randomJob(seed, { system, iterated });
      const loads = job.loads!.map(({ id }) => id);
      const few = scenario === 'each-circuit' ? loads.slice(seed % loads.length).slice(0, 2) : [];
      const headroom = new Set(iterated ? few : loads);
      const ours = outcomeOf(() => solve(job, scenario));
      const theirs = outcomeOf(() => solveDense(job, scenario, headroom));
      expect(ours === null ? 'refused' : 'solved').toBe(theirs === null ? 'refused' : 'solved');
      if (ours && theirs) expect(differences(job, ours, theirs, headroom)).toEqual([]);
    }),
    runs(1, start),
  );
};
