export { type CircuitIds, circuitsOf } from './circuits-of.ts';
export { type LoadLimits, limitsFor } from './limits.ts';
export {
  NEAR_SHARE,
  SHOWN_ORDER,
  type Shown,
  type ShownVerdict,
  shownVerdicts,
  worstShown,
} from './shown.ts';
export { type Prepared, prepareJob, solveJob } from './solve-job.ts';
export { type Group, type Summary, summarise } from './summary.ts';
