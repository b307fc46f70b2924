import { index, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import { firmId, instant, rowId } from './columns.ts';
import { firm } from './firm.ts';
import { person } from './person.ts';

/** What was done in a firm beside edits of jobs; only ever added to. */
export const auditEvent = pgTable(
  'audit_event',
  {
    firmId: firmId().references(() => firm.id, { onDelete: 'restrict' }),
    id: rowId(),
    at: instant('at').notNull().defaultNow(),
    personId: uuid('person_id').references(() => person.id, { onDelete: 'restrict' }),
    what: text('what').notNull(),
    subject: text('subject').notNull(),
  },
  (t) => [
    primaryKey({ name: 'audit_event_pkey', columns: [t.firmId, t.id] }),
    index('audit_event_at_idx').on(t.firmId, t.at.desc()),
  ],
);
