import { LIMIT_KINDS, limitRow } from '@farlug/contract/rows';
import { LOAD_CLASSES } from '@farlug/solver/job';
import { doublePrecision, foreignKey, integer, pgTable, primaryKey, text } from 'drizzle-orm/pg-core';
import { firmId, jobId, jobPart } from './columns.ts';
import { job } from './job.ts';
import { jobPartKeys } from './job-part.ts';
import { checksOf } from './row-checks.ts';

export const jobLimit = pgTable(
  'job_limit',
  {
    ...jobPart(),
    class: text('class', { enum: LOAD_CLASSES }),
    kind: text('kind', { enum: LIMIT_KINDS }).notNull(),
    atVolts: text('at_volts'),
    value: text('value').notNull(),
  },
  (t) => [...jobPartKeys('job_limit', t), ...checksOf('job_limit', limitRow, t)],
);

/** The figures of the job list, as of the solve at `atSeq`. */
export const jobVerdict = pgTable(
  'job_verdict',
  {
    firmId: firmId(),
    jobId: jobId(),
    atSeq: integer('at_seq').notNull(),
    solverVersion: text('solver_version').notNull(),
    worstPercent: doublePrecision('worst_percent'),
    over: integer('over').notNull(),
    near: integer('near').notNull(),
    within: integer('within').notNull(),
    leftOut: integer('left_out').notNull(),
  },
  (t) => [
    primaryKey({ name: 'job_verdict_pkey', columns: [t.firmId, t.jobId] }),
    foreignKey({
      name: 'job_verdict_job_fkey',
      columns: [t.firmId, t.jobId],
      foreignColumns: [job.firmId, job.id],
    }).onDelete('cascade'),
  ],
);
