import { PAPER_SIZES, PDF_STATES } from '@farlug/contract/routes';
import { SCENARIOS } from '@farlug/solver/job';
import { sql } from 'drizzle-orm';
import {
  check,
  doublePrecision,
  foreignKey,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { bytes, firmId, instant, jobId, rowId } from './columns.ts';
import { jobPartKeys } from './job-part.ts';
import { person } from './person.ts';
import { oneOf } from './row-checks.ts';

/** An issued report: never changed, never deleted, and while one exists its job is only ever archived. */
export const revision = pgTable(
  'revision',
  {
    firmId: firmId(),
    jobId: jobId(),
    id: rowId(),
    no: integer('no').notNull(),
    seq: integer('seq').notNull(),
    scenario: text('scenario', { enum: SCENARIOS }).notNull(),
    paper: text('paper', { enum: PAPER_SIZES }).notNull(),
    input: jsonb('input').notNull(),
    result: jsonb('result').notNull(),
    solverVersion: text('solver_version').notNull(),
    sha256: text('sha256').notNull(),
    worstPercent: doublePrecision('worst_percent'),
    over: integer('over').notNull(),
    near: integer('near').notNull(),
    within: integer('within').notNull(),
    issuedBy: uuid('issued_by')
      .notNull()
      .references(() => person.id, { onDelete: 'restrict' }),
    issuedAt: instant('issued_at').notNull(),
  },
  (t) => [
    ...jobPartKeys('revision', t),
    uniqueIndex('revision_no_key').on(t.firmId, t.jobId, t.no),
    check('revision_sha256_check', sql`${t.sha256} ~ '^[0-9a-f]{64}$'`),
    oneOf('revision', t.scenario, SCENARIOS),
    oneOf('revision', t.paper, PAPER_SIZES),
  ],
);

/** The printed form of a revision, made by the worker. */
export const revisionPdf = pgTable(
  'revision_pdf',
  {
    firmId: firmId(),
    jobId: jobId(),
    revisionId: uuid('revision_id').notNull(),
    state: text('state', { enum: PDF_STATES }).notNull(),
    pdf: bytes('pdf'),
    lastError: text('last_error'),
    changedAt: instant('changed_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ name: 'revision_pdf_pkey', columns: [t.firmId, t.jobId, t.revisionId] }),
    foreignKey({
      name: 'revision_pdf_revision_fkey',
      columns: [t.firmId, t.jobId, t.revisionId],
      foreignColumns: [revision.firmId, revision.jobId, revision.id],
    }).onDelete('restrict'),
    oneOf('revision_pdf', t.state, PDF_STATES),
    check('revision_pdf_ready_check', sql`(${t.state} = 'ready') = (${t.pdf} is not null)`),
  ],
);
