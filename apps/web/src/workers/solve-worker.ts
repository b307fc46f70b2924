import { applyEdit } from '@farlug/contract/edit';
import { jobFromRows } from '@farlug/contract/job';
import { type JobRows, rowsFromLists } from '@farlug/contract/rows';
import type { Scenario } from '@farlug/solver/job';
import { answerQuestion } from './answer-question.ts';
import { jobResult, type PreparedRows, prepareRows } from './job-result.ts';
import type { FromWorker, ToWorker } from './protocol.ts';
import type { Question } from './questions.ts';

/** The worker's side of `protocol.ts`: edits that arrive together are solved once, and questions wait their turn. */
const scope = self as unknown as { postMessage(message: FromWorker): void };
let rows: JobRows | null = null;
let generation = 0;
let scenario: Scenario = 'each-circuit';
let prepared: PreparedRows | null = null;
let stale = false;
const questions: { id: number; question: Question }[] = [];
let woken = false;

self.addEventListener('message', ({ data }: MessageEvent<ToWorker>) => {
  if (data.kind === 'ask') questions.push(data);
  else if (data.kind === 'scenario') {
    scenario = data.scenario;
    stale = true;
  } else {
    generation = data.generation;
    prepared = null;
    stale = true;
    if (data.kind === 'open') rows = rowsFromLists(data.rows);
    else if (rows) {
      const outcome = applyEdit(rows, data.edit);
      if (outcome.ok) rows = outcome.rows;
    }
  }
  if (woken) return;
  woken = true;
  // A macrotask: messages that are waiting are taken in first.
  setTimeout(work);
});

function work(): void {
  woken = false;
  if (!rows) return;
  try {
    prepared ??= prepareRows(jobFromRows(rows));
    if (stale) {
      stale = false;
      scope.postMessage({
        kind: 'result',
        result: jobResult(prepared, scenario, generation, () => performance.now()),
      });
    }
    for (const { id, question } of questions.splice(0)) {
      const answer = answerQuestion({ built: prepared.built, scenario }, question);
      scope.postMessage({ kind: 'answer', id, generation, answer });
    }
  } catch (error) {
    scope.postMessage({ kind: 'fault', message: error instanceof Error ? error.message : String(error) });
  }
}
