export { type Beyond, beyondFinder } from './beyond.ts';
export { radialRuns } from './bridges.ts';
export { type LoadRating, loadRating } from './load-rating.ts';
export { parseJob } from './parse.ts';
export * from './run-ratings.ts';
export * from './schema.ts';
export * from './solution.ts';
export * from './systems.ts';
export * from './vocabulary.ts';
