import { type Equations, nodalEquations } from '@farlug/solver/equations';
import type { EquationsQuestion, NoAnswer, WorkerJob } from './questions.ts';

export interface EquationsAnswer {
  kind: 'equations';
  panel: string;
  equations: Equations;
}

/** The node equations at the point of one panel. */
export function answerEquations(
  { built: { job, index }, scenario }: WorkerJob,
  { panel }: EquationsQuestion,
): EquationsAnswer | NoAnswer {
  const bus = job.panels[index.panels.indexOf(panel)]?.bus;
  if (bus === undefined)
    return {
      kind: 'none',
      reason: 'This panel is left out of the results: feed it and finish its feeder first.',
    };
  const equations = nodalEquations(job, { buses: [bus], scenario });
  return equations.ok
    ? { kind: 'equations', panel, equations }
    : { kind: 'none', reason: `${equations.at}: ${equations.reason}` };
}
