import { SYSTEMS } from '@farlug/solver/job';
import { describe, it } from 'vitest';
import { againstDense } from './support/against-dense.ts';
import { solveProduct } from './support/solvers.ts';

describe('random jobs against the dense solver', () => {
  it.each(SYSTEMS)(
    '%s: every number that is printed',
    (system) => againstDense(solveProduct, system, 8),
    120_000,
  );
});
