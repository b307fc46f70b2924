import { FIRM_ROLES } from '@farlug/contract/route';
import { WIRE_UNITS } from '@farlug/contract/rows';
import { LENGTH_UNITS } from '@farlug/solver/job';
import { sql } from 'drizzle-orm';
import { check, foreignKey, index, pgTable, primaryKey, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { createdAt, firmId, instant, rowId } from './columns.ts';
import { person } from './person.ts';
import { oneOf } from './row-checks.ts';

export const firm = pgTable(
  'firm',
  {
    id: uuid('firm_id').primaryKey(),
    name: text('name').notNull(),
    reportHeading: text('report_heading').notNull().default(''),
    noticeWording: text('notice_wording').notNull().default(''),
    currency: text('currency').notNull().default('USD'),
    lengthUnit: text('length_unit', { enum: LENGTH_UNITS }).notNull().default('ft'),
    wireUnit: text('wire_unit', { enum: WIRE_UNITS }).notNull().default('awg'),
    createdAt: createdAt(),
  },
  (t) => [
    check('firm_name_check', sql`char_length(${t.name}) between 1 and 200`),
    check('firm_currency_check', sql`${t.currency} ~ '^[A-Z]{3}$'`),
    oneOf('firm', t.lengthUnit, LENGTH_UNITS),
    oneOf('firm', t.wireUnit, WIRE_UNITS),
  ],
);

export const membership = pgTable(
  'membership',
  {
    firmId: firmId().references(() => firm.id, { onDelete: 'restrict' }),
    personId: uuid('person_id')
      .notNull()
      .references(() => person.id, { onDelete: 'restrict' }),
    role: text('role', { enum: FIRM_ROLES }).notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ name: 'membership_pkey', columns: [t.firmId, t.personId] }),
    index('membership_person_idx').on(t.personId),
    oneOf('membership', t.role, FIRM_ROLES),
  ],
);

export const invitation = pgTable(
  'invitation',
  {
    firmId: firmId().references(() => firm.id, { onDelete: 'restrict' }),
    id: rowId(),
    email: text('email').notNull(),
    role: text('role', { enum: FIRM_ROLES }).notNull(),
    invitedBy: uuid('invited_by').notNull(),
    createdAt: createdAt(),
    expiresAt: instant('expires_at').notNull(),
    acceptedAt: instant('accepted_at'),
    withdrawnAt: instant('withdrawn_at'),
  },
  (t) => [
    primaryKey({ name: 'invitation_pkey', columns: [t.firmId, t.id] }),
    foreignKey({
      name: 'invitation_invited_by_fkey',
      columns: [t.invitedBy],
      foreignColumns: [person.id],
    }).onDelete('restrict'),
    uniqueIndex('invitation_pending_email_key')
      .on(t.firmId, sql`lower(${t.email})`)
      .where(sql`accepted_at is null and withdrawn_at is null`),
    oneOf('invitation', t.role, FIRM_ROLES),
  ],
);
