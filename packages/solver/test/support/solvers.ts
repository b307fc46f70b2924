import { type JobFile, parseJob, type Scenario, type Solution } from '@farlug/solver/job';
import { solveJob } from '@farlug/solver/judge';
import { solveDense } from '../dense/solve-dense.ts';

/** The product's solver on a job file; throws with the reason where the file is refused or cannot be solved. */
export const solveProduct = (file: JobFile, scenario: Scenario): Solution => {
  const parsed = parseJob(file);
  if (!parsed.ok) throw new Error(`refused: ${JSON.stringify(parsed.problems)}`);
  const outcome = solveJob(parsed.job, { scenario });
  if (outcome.kind !== 'solved') throw new Error(`no solution: ${JSON.stringify(outcome)}`);
  return outcome.solution;
};

/** The two implementations of the model: the product's, and the slow one written from its definitions. */
export const SOLVERS: [name: string, solve: (job: JobFile, scenario: Scenario) => Solution][] = [
  ['product’s', solveProduct],
  ['dense', (job, scenario) => solveDense(job, scenario, false)],
];
