export {
  circularMilForm,
  type HandCurrent,
  type HandLine,
  iecForm,
  impedanceForm,
  K_OHM_CMIL_PER_FT,
} from './formulas.ts';
export * from './hand-check.ts';
export type { PencilCurrent } from './hand-current.ts';
export { type HandChecksOutcome, handChecks } from './job-hand-checks.ts';
export type { Reason } from './reasons.ts';
export type { RunState } from './run-state.ts';
