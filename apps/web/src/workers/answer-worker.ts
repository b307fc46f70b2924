import { type JobFromRows, jobFromRows } from '@farlug/contract/job';
import { rowsFromLists } from '@farlug/contract/rows';
import { answerQuestion } from './answer-question.ts';
import type { FromAnswerer, ToAnswerer } from './protocol.ts';

/** Answers one question after the other about the rows that it was given last. */
const scope = self as unknown as { postMessage(message: FromAnswerer): void };
let built: JobFromRows | null = null;

self.addEventListener('message', ({ data }: MessageEvent<ToAnswerer>) => {
  try {
    if (data.kind === 'open') built = jobFromRows(rowsFromLists(data.rows));
    else if (built) {
      const answer = answerQuestion({ built, scenario: data.scenario }, data.question);
      scope.postMessage({ kind: 'answer', id: data.id, answer });
    }
  } catch (error) {
    scope.postMessage({ kind: 'fault', message: error instanceof Error ? error.message : String(error) });
  }
});
