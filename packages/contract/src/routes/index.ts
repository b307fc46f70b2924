import type { Route } from '../route.ts';
import * as accounts from './accounts.ts';
import * as firm from './firm.ts';
import * as inspection from './inspection.ts';
import * as jobs from './jobs.ts';
import * as mailbox from './mailbox.ts';
import * as reports from './reports.ts';
import * as schedule from './schedule.ts';

export * from './accounts.ts';
export * from './common.ts';
export * from './firm.ts';
export * from './inspection.ts';
export * from './jobs.ts';
export * from './mailbox.ts';
export * from './reports.ts';
export * from './schedule.ts';

const isRoute = (value: unknown): value is Route =>
  typeof value === 'object' && value !== null && 'access' in value && 'path' in value;

/** Every route, for the server's completeness check and the tests that walk them. */
export const ALL_ROUTES = [accounts, firm, inspection, jobs, mailbox, reports, schedule].flatMap((feature) =>
  Object.values(feature).filter(isRoute),
);
