export * from './defaults.ts';
export * from './limit-presets.ts';
