import { sql } from 'drizzle-orm';
import {
  index,
  integer,
  json,
  pgTable,
  primaryKey,
  text,
  timestamp,
  uniqueIndex,
  uuid,
  varchar,
} from 'drizzle-orm/pg-core';
import { createdAt, instant } from './columns.ts';
import { firm } from './firm.ts';
import { person } from './person.ts';
import { oneOf } from './row-checks.ts';

/** In the shape that connect-pg-simple reads and writes. */
export const session = pgTable(
  'session',
  {
    sid: varchar('sid').primaryKey(),
    sess: json('sess').$type<Record<string, unknown>>().notNull(),
    expire: timestamp('expire', { precision: 6 }).notNull(),
  },
  (t) => [
    index('session_expire_idx').on(t.expire),
    index('session_person_idx').on(sql`(${t.sess} -> 'passport' ->> 'user')`),
  ],
);

export const TOKEN_PURPOSES = ['reset', 'invite'] as const;
export type TokenPurpose = (typeof TOKEN_PURPOSES)[number];

/** A secret sent by mail, stored as its hash; `id` is what the queue carries. */
export const token = pgTable(
  'token',
  {
    hash: text('hash').primaryKey(),
    id: uuid('id').notNull(),
    purpose: text('purpose', { enum: TOKEN_PURPOSES }).notNull(),
    personId: uuid('person_id').references(() => person.id, { onDelete: 'cascade' }),
    firmId: uuid('firm_id').references(() => firm.id, { onDelete: 'cascade' }),
    invitationId: uuid('invitation_id'),
    createdAt: createdAt(),
    expiresAt: instant('expires_at').notNull(),
    usedAt: instant('used_at'),
  },
  (t) => [
    oneOf('token', t.purpose, TOKEN_PURPOSES),
    uniqueIndex('token_id_key').on(t.id),
    index('token_person_idx').on(t.personId),
    index('token_invitation_idx').on(t.firmId, t.invitationId),
  ],
);

export const rateCounter = pgTable(
  'rate_counter',
  {
    key: text('key').notNull(),
    windowStart: instant('window_start').notNull(),
    hits: integer('hits').notNull(),
  },
  (t) => [
    primaryKey({ name: 'rate_counter_pkey', columns: [t.key, t.windowStart] }),
    index('rate_counter_window_start_idx').on(t.windowStart),
  ],
);
