import type { Job, Scenario, SolveOutcome } from '../job/index.ts';

/** How a size is judged: by solving the job with the run laid in it. */
export type Solve = (job: Job, scenario: Scenario) => SolveOutcome;
