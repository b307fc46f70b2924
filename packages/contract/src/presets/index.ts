export * from './defaults.ts';
