import { type HandCheck, handChecks } from '@farlug/solver/hand-check';
import type { HandCheckQuestion, NoAnswer, WorkerJob } from './questions.ts';

export interface HandCheckAnswer {
  kind: 'hand-check';
  checks: { row: string; check: HandCheck }[];
}

/** The formula that a person would work by hand beside the nodal result, for the runs asked about. */
export function answerHandCheck(
  { built: { job, index } }: WorkerJob,
  { runs }: HandCheckQuestion,
): HandCheckAnswer | NoAnswer {
  const wanted = new Map(
    runs.flatMap((row) => {
      const code = job.runs[index.runs.indexOf(row)]?.id;
      return code === undefined ? [] : [[code, row] as const];
    }),
  );
  if (wanted.size === 0)
    return { kind: 'none', reason: 'This run is left out of the results: finish its row first.' };
  const outcome = handChecks(job, new Set(wanted.keys()));
  if (!outcome.ok) return { kind: 'none', reason: `${outcome.at}: ${outcome.reason}` };
  return {
    kind: 'hand-check',
    checks: outcome.checks.map((check) => ({ row: wanted.get(check.runId) ?? '', check })),
  };
}
