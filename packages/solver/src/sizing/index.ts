export * from './candidates.ts';
export { ampacityFloor, type Floor, type FloorLoad } from './floor.ts';
export type { Grounding } from './grounding-choice.ts';
export type { Longest } from './longest.ts';
