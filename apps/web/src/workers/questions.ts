import type { JobFromRows } from '@farlug/contract/job';
import type { Scenario } from '@farlug/solver/job';

/** What a page may ask the worker beside the results that it is always sent. Runs and panels by row. */
export type SizesQuestion = { kind: 'sizes'; run: string; bothMaterials?: boolean; maxSets?: number };
export type HandCheckQuestion = { kind: 'hand-check'; runs: string[] };
export type EquationsQuestion = { kind: 'equations'; panel: string };
export type Question = SizesQuestion | HandCheckQuestion | EquationsQuestion;

/** Why there is no answer: a row that is left out or gone, or a job that cannot be solved. */
export interface NoAnswer {
  kind: 'none';
  reason: string;
}
/** The job that a question is about, as the worker holds it. */
export interface WorkerJob {
  built: JobFromRows;
  scenario: Scenario;
}
