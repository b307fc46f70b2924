export {
  type Equations,
  type EquationsOutcome,
  type NodeEquation,
  nodalEquations,
} from './node-equations.ts';
export type { Named } from './parts.ts';
export { complexText } from './write-out.ts';
