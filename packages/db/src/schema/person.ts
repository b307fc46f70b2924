import { sql } from 'drizzle-orm';
import { pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { createdAt } from './columns.ts';

export const person = pgTable(
  'person',
  {
    id: uuid('id').primaryKey(),
    email: text('email').notNull(),
    name: text('name').notNull(),
    passwordHash: text('password_hash').notNull(),
    timeZone: text('time_zone').notNull().default('UTC'),
    createdAt: createdAt(),
  },
  (t) => [uniqueIndex('person_email_key').on(sql`lower(${t.email})`)],
);
