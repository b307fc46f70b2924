import { customType, integer, timestamp, uuid } from 'drizzle-orm/pg-core';

/** Compared by bytes, as order keys are. */
export const byteOrderedText = customType<{ data: string; driverData: string }>({
  dataType: () => 'text COLLATE "C"',
});

export const bytes = customType<{ data: Buffer; driverData: Buffer }>({ dataType: () => 'bytea' });

export const instant = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' });
export const createdAt = () => instant('created_at').notNull().defaultNow();

export const firmId = () => uuid('firm_id').notNull();
export const jobId = () => uuid('job_id').notNull();
export const rowId = () => uuid('id').notNull();

/** What every table of a job's rows begins with. */
export const jobPart = () => ({
  firmId: firmId(),
  jobId: jobId(),
  id: rowId(),
  version: integer('version').notNull().default(1),
});
