export * from './fields.ts';
export * from './job-rows.ts';
