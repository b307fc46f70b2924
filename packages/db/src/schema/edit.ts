import type { EditOp } from '@farlug/contract/edit';
import {
  foreignKey,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { firmId, instant, jobId } from './columns.ts';
import { job } from './job.ts';
import { person } from './person.ts';

/** Every change of a job in its order; only ever added to, and gone only with the job itself. */
export const jobEdit = pgTable(
  'job_edit',
  {
    firmId: firmId(),
    jobId: jobId(),
    seq: integer('seq').notNull(),
    editId: uuid('edit_id').notNull(),
    personId: uuid('person_id').references(() => person.id, { onDelete: 'restrict' }),
    label: text('label').notNull(),
    ops: jsonb('ops').$type<EditOp[]>().notNull(),
    undoes: uuid('undoes'),
    at: instant('at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ name: 'job_edit_pkey', columns: [t.firmId, t.jobId, t.seq] }),
    uniqueIndex('job_edit_edit_id_key').on(t.firmId, t.jobId, t.editId),
    foreignKey({
      name: 'job_edit_job_fkey',
      columns: [t.firmId, t.jobId],
      foreignColumns: [job.firmId, job.id],
    }).onDelete('cascade'),
  ],
);
