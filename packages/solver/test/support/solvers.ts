import type { JobFile, Scenario, Solution } from '@farlug/solver/job';
import { solveDense } from '../dense/solve-dense.ts';

/** The two implementations of the model: the product's, and the slow one written from its definitions. */
export const SOLVERS: [name: string, solve: (job: JobFile, scenario: Scenario) => Solution][] = [
  ['dense', (job, scenario) => solveDense(job, scenario, false)],
];
