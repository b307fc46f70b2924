import type { Edit } from '@farlug/contract/edit';
import type { JobRowLists } from '@farlug/contract/rows';
import type { Scenario } from '@farlug/solver/job';
import type { Answer } from './answers.ts';
import type { Question } from './questions.ts';
import type { JobResult } from './results.ts';

/**
 * What the page and its solver say to each other. Rows go over once, then every edit; each change has a generation,
 * and a result names the one it stands on. Only the newest scenario asked for is solved.
 */
export type ToWorker =
  | { kind: 'open'; generation: number; rows: JobRowLists }
  | { kind: 'apply'; generation: number; edit: Edit }
  | { kind: 'scenario'; scenario: Scenario }
  | { kind: 'ask'; id: number; question: Question };

export type FromWorker =
  | { kind: 'result'; result: JobResult }
  | { kind: 'answer'; id: number; generation: number; answer: Answer }
  /** A fault of the program, not of the job. */
  | { kind: 'fault'; message: string };
