import { SYSTEMS } from '@farlug/solver/job';
import { describe, expect, it } from 'vitest';
import { againstDense, DEEP } from './support/against-dense.ts';
import { solveProduct } from './support/solvers.ts';

describe('random jobs against the dense solver', () => {
  it.each(SYSTEMS)(
    '%s: every number that is printed',
    (system) => {
      expect(againstDense(solveProduct, system, 8)).toBeUndefined();
    },
    DEEP ? 1_800_000 : 120_000,
  );
});
