import { readFileSync } from 'node:fs';
import { type JobFile, SCENARIOS, SYSTEMS } from '@farlug/solver/job';
import { describe, expect, it } from 'vitest';
import { solveDense } from './dense/solve-dense.ts';
import { againstDense, DEEP } from './support/against-dense.ts';
import { differences } from './support/compare.ts';
import { solveProduct } from './support/solvers.ts';

const cases = SYSTEMS.flatMap((system) => SCENARIOS.map((scenario) => ({ system, scenario }))).map(
  (each, start) => ({ ...each, start }),
);

describe('random jobs against the dense solver: every number that is printed', () => {
  describe.each([
    { currents: 'that stay as they are', iterated: false },
    { currents: 'that follow voltages and temperatures', iterated: true },
  ])('currents $currents', ({ iterated }) => {
    it.each(cases)(
      '$system, $scenario',
      ({ system, scenario, start }) => {
        expect(againstDense(solveProduct, system, scenario, iterated, start)).toBeUndefined();
      },
      DEEP ? 1_800_000 : 120_000,
    );
  });
});

/** The largest takes half a minute. */
const buildings = DEEP ? ['ridge-cabin', 'weaving-hall', 'tannery-row'] : ['ridge-cabin', 'weaving-hall'];

describe('whole buildings against the dense solver, headroom of every load included', () => {
  it.each(buildings)(
    '%s',
    (name) => {
      const path = new URL(`../../../fixtures/jobs/${name}.json`, import.meta.url);
      const job: JobFile = JSON.parse(readFileSync(path, 'utf8'));
      const all = new Set(job.loads!.map(({ id }) => id));
      const theirs = solveDense(job, 'each-circuit', all);
      expect(differences(job, solveProduct(job, 'each-circuit'), theirs, all)).toEqual([]);
    },
    300_000,
  );
});
