import type { Edit } from '@farlug/contract/edit';
import type { JobRowLists } from '@farlug/contract/rows';
import type { Scenario } from '@farlug/solver/job';
import type { Answer } from './answers.ts';
import type { Question } from './questions.ts';
import type { JobResult } from './results.ts';

/** A fault of the program, not of the job. */
type Fault = { kind: 'fault'; message: string };

/**
 * What the page and its solver say to each other. Rows go over once, then every edit; each change has a generation,
 * and a result names the one it stands on. Only the newest scenario asked for is solved.
 */
export type ToSolver =
  | { kind: 'open'; generation: number; rows: JobRowLists }
  | { kind: 'apply'; generation: number; edit: Edit }
  | { kind: 'scenario'; scenario: Scenario };
export type FromSolver = { kind: 'result'; result: JobResult } | Fault;

/** Questions go to a worker of their own, so that a long answer never holds up the verdicts. */
export type ToAnswerer =
  | { kind: 'open'; rows: JobRowLists }
  | { kind: 'ask'; id: number; scenario: Scenario; question: Question };
export type FromAnswerer = { kind: 'answer'; id: number; answer: Answer } | Fault;
