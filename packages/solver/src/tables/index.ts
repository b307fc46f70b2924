export * from './ampacity.ts';
export * from './breakers.ts';
export { tableContents } from './contents.ts';
export * from './grounding.ts';
export * from './impedance.ts';
export * from './motors.ts';
export * from './size.ts';
export * from './sources.ts';
