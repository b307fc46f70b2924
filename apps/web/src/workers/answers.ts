import type { EquationsAnswer } from './answer-equations.ts';
import type { HandCheckAnswer } from './answer-hand-check.ts';
import type { SizesAnswer } from './answer-sizes.ts';
import type { HandCheckQuestion, NoAnswer, Question, SizesQuestion } from './questions.ts';

export type Answer = SizesAnswer | HandCheckAnswer | EquationsAnswer | NoAnswer;
export type AnswerTo<Q extends Question> =
  | NoAnswer
  | (Q extends SizesQuestion ? SizesAnswer : Q extends HandCheckQuestion ? HandCheckAnswer : EquationsAnswer);
