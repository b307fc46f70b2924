export { createDatabase, type Database, type FirmTransaction, type Transaction } from './database.ts';
export * from './queries/edits.ts';
export * from './queries/firms.ts';
export * from './queries/invitations.ts';
export * from './queries/job-list.ts';
export * from './queries/jobs.ts';
export * from './queries/people.ts';
export * from './queries/tokens.ts';
export * from './queues.ts';
