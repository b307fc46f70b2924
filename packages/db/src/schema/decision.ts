import { DECISIONS } from '@farlug/contract/routes';
import { sql } from 'drizzle-orm';
import { check, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { firmId, instant, jobId, rowId } from './columns.ts';
import { delivery } from './delivery.ts';
import { jobPartKeys, reference } from './job-part.ts';
import { person } from './person.ts';
import { revision } from './revision.ts';
import { oneOf } from './row-checks.ts';

export const DECISION_WAYS = ['link', 'paper'] as const;

/** What an inspector decided about exactly one revision; only ever added to. */
export const decision = pgTable(
  'decision',
  {
    firmId: firmId(),
    jobId: jobId(),
    id: rowId(),
    revisionId: uuid('revision_id').notNull(),
    deliveryId: uuid('delivery_id'),
    decision: text('decision', { enum: DECISIONS }).notNull(),
    words: text('words').notNull(),
    comments: text('comments').notNull(),
    name: text('name').notNull(),
    title: text('title').notNull(),
    via: text('via', { enum: DECISION_WAYS }).notNull(),
    enteredBy: uuid('entered_by').references(() => person.id, { onDelete: 'restrict' }),
    at: instant('at').notNull().defaultNow(),
  },
  (t) => [
    ...jobPartKeys('decision', t),
    ...reference('decision', t, t.revisionId, revision),
    ...reference('decision', t, t.deliveryId, delivery),
    oneOf('decision', t.decision, DECISIONS),
    oneOf('decision', t.via, DECISION_WAYS),
    check('decision_words_check', sql`${t.decision} <> 'other' or ${t.words} <> ''`),
    check('decision_source_check', sql`(${t.via} = 'link') = (${t.deliveryId} is not null)`),
    check('decision_entered_by_check', sql`(${t.via} = 'paper') = (${t.enteredBy} is not null)`),
  ],
);
