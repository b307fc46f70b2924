export * from './schema.ts';
export * from './solution.ts';
export * from './vocabulary.ts';
