import { conductorRow as conductorRowSchema, LIMIT_KINDS, limitRow, OHMS_PER } from '@farlug/contract/rows';
import { FORCES, LOAD_CLASSES, MATERIALS } from '@farlug/solver/job';
import { sql } from 'drizzle-orm';
import {
  boolean,
  check,
  foreignKey,
  integer,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { createdAt, firmId, rowId } from './columns.ts';
import { firm } from './firm.ts';
import { checksOf, oneOf } from './row-checks.ts';

/** A named set of limits that a new job may start from. */
export const limitPreset = pgTable(
  'limit_preset',
  {
    firmId: firmId().references(() => firm.id, { onDelete: 'restrict' }),
    id: rowId(),
    name: text('name').notNull(),
    clause: text('clause').notNull(),
    force: text('force', { enum: FORCES }).notNull(),
    includeService: boolean('include_service').notNull(),
    includeTransformer: boolean('include_transformer').notNull(),
    includeSource: boolean('include_source').notNull(),
    longRun: boolean('long_run').notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ name: 'limit_preset_pkey', columns: [t.firmId, t.id] }),
    oneOf('limit_preset', t.force, FORCES),
  ],
);

export const presetLimit = pgTable(
  'preset_limit',
  {
    firmId: firmId(),
    presetId: uuid('preset_id').notNull(),
    position: integer('position').notNull(),
    class: text('class', { enum: LOAD_CLASSES }),
    kind: text('kind', { enum: LIMIT_KINDS }).notNull(),
    atVolts: text('at_volts'),
    value: text('value').notNull(),
  },
  (t) => [
    primaryKey({ name: 'preset_limit_pkey', columns: [t.firmId, t.presetId, t.position] }),
    foreignKey({
      name: 'preset_limit_preset_fkey',
      columns: [t.firmId, t.presetId],
      foreignColumns: [limitPreset.firmId, limitPreset.id],
    }).onDelete('cascade'),
    ...checksOf('preset_limit', limitRow.omit({ id: true }), t),
  ],
);

/** What new circuits start from; copied into nothing: it only fills in what a person leaves out at entry. */
export const defaultValue = pgTable(
  'default_value',
  {
    firmId: firmId().references(() => firm.id, { onDelete: 'restrict' }),
    key: text('key').notNull(),
    value: text('value').notNull(),
  },
  (t) => [
    primaryKey({ name: 'default_value_pkey', columns: [t.firmId, t.key] }),
    check('default_value_key_check', sql`char_length(${t.key}) <= 60`),
    check('default_value_value_check', sql`char_length(${t.value}) <= 80`),
  ],
);

/** The firm's own sizes, with the source of their figures; a job copies what it uses. */
export const conductorRow = pgTable(
  'conductor_row',
  {
    firmId: firmId().references(() => firm.id, { onDelete: 'restrict' }),
    id: rowId(),
    name: text('name').notNull(),
    material: text('material', { enum: MATERIALS }).notNull(),
    areaMm2: text('area_mm2').notNull(),
    r: text('r').notNull(),
    x: text('x').notNull(),
    per: text('per', { enum: OHMS_PER }).notNull(),
    temperature: text('temperature').notNull(),
    ampacity: text('ampacity'),
    source: text('source').notNull(),
  },
  (t) => [
    primaryKey({ name: 'conductor_row_pkey', columns: [t.firmId, t.id] }),
    uniqueIndex('conductor_row_name_key').on(t.firmId, t.name),
    ...checksOf('conductor_row', conductorRowSchema, t),
  ],
);
