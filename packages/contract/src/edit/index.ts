export * from './edit.ts';
