import { DELIVERY_STATES } from '@farlug/contract/routes';
import { sql } from 'drizzle-orm';
import { check, foreignKey, index, integer, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { firmId, instant, jobId, rowId } from './columns.ts';
import { jobPartKeys, reference } from './job-part.ts';
import { person } from './person.ts';
import { revision } from './revision.ts';
import { oneOf } from './row-checks.ts';

/** A revision on its way to one recipient, and the link that it carries. */
export const delivery = pgTable(
  'delivery',
  {
    firmId: firmId(),
    jobId: jobId(),
    id: rowId(),
    revisionId: uuid('revision_id').notNull(),
    recipientName: text('recipient_name').notNull(),
    recipientEmail: text('recipient_email').notNull(),
    message: text('message').notNull(),
    state: text('state', { enum: DELIVERY_STATES }).notNull(),
    messageId: text('message_id').notNull(),
    attempts: integer('attempts').notNull().default(0),
    lastError: text('last_error'),
    queuedBy: uuid('queued_by')
      .notNull()
      .references(() => person.id, { onDelete: 'restrict' }),
    queuedAt: instant('queued_at').notNull().defaultNow(),
    sendingAt: instant('sending_at'),
    sentAt: instant('sent_at'),
    openedAt: instant('opened_at'),
    epoch: integer('epoch').notNull().default(1),
    linkExpiresAt: instant('link_expires_at').notNull(),
    linkRevokedAt: instant('link_revoked_at'),
  },
  (t) => [
    ...jobPartKeys('delivery', t),
    ...reference('delivery', t, t.revisionId, revision),
    oneOf('delivery', t.state, DELIVERY_STATES),
    check('delivery_epoch_check', sql`${t.epoch} >= 1`),
    check('delivery_attempts_check', sql`${t.attempts} >= 0`),
  ],
);

/** Finds firm and delivery of an inspector's link before any firm is known. */
export const linkIndex = pgTable(
  'link_index',
  {
    hash: text('hash').primaryKey(),
    firmId: uuid('firm_id').notNull(),
    jobId: uuid('job_id').notNull(),
    deliveryId: uuid('delivery_id').notNull(),
    epoch: integer('epoch').notNull(),
  },
  (t) => [
    foreignKey({
      name: 'link_index_delivery_fkey',
      columns: [t.firmId, t.jobId, t.deliveryId],
      foreignColumns: [delivery.firmId, delivery.jobId, delivery.id],
    }).onDelete('cascade'),
    index('link_index_delivery_idx').on(t.firmId, t.jobId, t.deliveryId),
  ],
);
