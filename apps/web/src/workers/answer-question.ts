import { answerEquations } from './answer-equations.ts';
import { answerHandCheck } from './answer-hand-check.ts';
import { answerSizes } from './answer-sizes.ts';
import type { Answer } from './answers.ts';
import type { Question, WorkerJob } from './questions.ts';

export function answerQuestion(job: WorkerJob, question: Question): Answer {
  const [problem] = job.built.problems;
  if (problem) return { kind: 'none', reason: problem.message };
  if (question.kind === 'sizes') return answerSizes(job, question);
  if (question.kind === 'hand-check') return answerHandCheck(job, question);
  return answerEquations(job, question);
}
