export const SOLVER_VERSION = '0.1.0';
