import { beyondFinder } from '@farlug/solver/job';
import { prepareJob } from '@farlug/solver/judge';
import { type Candidate, candidates, type FloorLoad } from '@farlug/solver/sizing';
import type { NoAnswer, SizesQuestion, WorkerJob } from './questions.ts';

/** A size with the circuit of the worst load beyond, by row. */
export interface SizeFigures extends Candidate {
  worstCircuitId: string | null;
}

export interface SizesAnswer {
  kind: 'sizes';
  /** The run, by row, and its code. */
  run: string;
  code: string;
  load: FloorLoad;
  sizes: SizeFigures[];
}

/** Every size of a run side by side; only what lies beyond it is judged again for each, and the run is shown as elsewhere. */
export function answerSizes(
  { built: { job, index }, scenario }: WorkerJob,
  { run, bothMaterials = false, maxSets = 1 }: SizesQuestion,
): SizesAnswer | NoAnswer {
  const at = index.runs.indexOf(run);
  const code = job.runs[at]?.id;
  if (code === undefined)
    return { kind: 'none', reason: 'This run is left out of the results: finish its row first.' };
  const beyond = beyondFinder(job)(at);
  const loads = beyond ? new Set(beyond.loads) : null;
  const outcome = candidates(
    job,
    code,
    (laid, of) => {
      const prepared = prepareJob(laid, { headroom: false, loads, like: { job, run: at } });
      if (prepared.kind !== 'prepared') return prepared;
      const outcome = prepared.solve(of);
      if (outcome.kind !== 'solved') return outcome;
      const { solution } = outcome;
      return { kind: 'solved', solution: { ...solution, runs: prepared.shownRuns(solution, at) } };
    },
    {
      scenario,
      bothMaterials,
      maxSets,
    },
  );
  if (!outcome.ok) return { kind: 'none', reason: `${outcome.at}: ${outcome.reason}` };
  const sizes = outcome.candidates.map((candidate) => ({
    ...candidate,
    worstCircuitId: candidate.worst ? (index.loadByCode.get(candidate.worst.id)?.circuitId ?? null) : null,
  }));
  return { kind: 'sizes', run, code, load: outcome.load, sizes };
}
