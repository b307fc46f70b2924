export * from './analyse.ts';
export * from './factor.ts';
export * from './ordering.ts';
export * from './path-solve.ts';
export * from './pattern.ts';
export * from './residual.ts';
export * from './small-solve.ts';
export * from './solve.ts';
