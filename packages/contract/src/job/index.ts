export * from './blank-rows.ts';
