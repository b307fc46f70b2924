import { jobRow, WIRE_UNITS } from '@farlug/contract/rows';
import { ANGLES, BASES, FORCES, LENGTH_UNITS } from '@farlug/solver/job';
import { boolean, index, integer, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import { createdAt, firmId, instant, rowId } from './columns.ts';
import { firm } from './firm.ts';
import { person } from './person.ts';
import { checksOf } from './row-checks.ts';

export const job = pgTable(
  'job',
  {
    firmId: firmId().references(() => firm.id, { onDelete: 'restrict' }),
    id: rowId(),
    version: integer('version').notNull().default(1),
    name: text('name').notNull(),
    address: text('address'),
    building: text('building'),
    area: text('area'),
    codeEdition: text('code_edition'),
    authority: text('authority'),
    permitNumber: text('permit_number'),
    frequency: text('frequency').notNull(),
    basis: text('basis', { enum: BASES }).notNull(),
    angle: text('angle', { enum: ANGLES }).notNull(),
    lengthUnit: text('length_unit', { enum: LENGTH_UNITS }).notNull(),
    wireUnit: text('wire_unit', { enum: WIRE_UNITS }).notNull(),
    limitPreset: text('limit_preset'),
    limitBasis: text('limit_basis'),
    limitForce: text('limit_force', { enum: FORCES }).notNull(),
    includeService: boolean('include_service').notNull(),
    includeTransformer: boolean('include_transformer').notNull(),
    includeSource: boolean('include_source').notNull(),
    longRun: boolean('long_run').notNull(),
    headSeq: integer('head_seq').notNull().default(0),
    archivedAt: instant('archived_at'),
    createdAt: createdAt(),
    createdBy: uuid('created_by').references(() => person.id, { onDelete: 'restrict' }),
    changedAt: instant('changed_at').notNull().defaultNow(),
    changedBy: uuid('changed_by').references(() => person.id, { onDelete: 'restrict' }),
  },
  (t) => [
    primaryKey({ name: 'job_pkey', columns: [t.firmId, t.id] }),
    index('job_changed_at_idx').on(t.firmId, t.changedAt.desc()),
    ...checksOf('job', jobRow, t),
  ],
);
