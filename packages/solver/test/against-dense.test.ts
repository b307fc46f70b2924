import { SCENARIOS, SYSTEMS } from '@farlug/solver/job';
import { describe, expect, it } from 'vitest';
import { againstDense, DEEP } from './support/against-dense.ts';
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
