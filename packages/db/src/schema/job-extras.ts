import { conductorRow, draftRow, OHMS_PER, readingRow } from '@farlug/contract/rows';
import { MATERIALS, PAIRS } from '@farlug/solver/job';
import { pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { bus } from './bus.ts';
import { jobPart } from './columns.ts';
import { jobPartKeys, reference } from './job-part.ts';
import { checksOf } from './row-checks.ts';

/** A size of the firm's own as it was when the job first used it. */
export const jobConductor = pgTable(
  'job_conductor',
  {
    ...jobPart(),
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
  (t) => [...jobPartKeys('job_conductor', t), ...checksOf('job_conductor', conductorRow, t)],
);

/** `at` is text: the offset that was noted comes back as it was noted. */
export const reading = pgTable(
  'reading',
  {
    ...jobPart(),
    busId: uuid('bus_id').notNull(),
    terminals: text('terminals', { enum: PAIRS }).notNull(),
    volts: text('volts').notNull(),
    amps: text('amps'),
    at: text('at').notNull(),
  },
  (t) => [
    ...jobPartKeys('reading', t),
    ...reference('reading', t, t.busId, bus),
    ...checksOf('reading', readingRow, t),
  ],
);

/** Text that was not understood, kept as typed beside the row that it was meant for. */
export const draft = pgTable(
  'draft',
  {
    ...jobPart(),
    table: text('table_name').notNull(),
    rowId: uuid('row_id').notNull(),
    field: text('field').notNull(),
    text: text('text').notNull(),
  },
  (t) => [...jobPartKeys('draft', t), ...checksOf('draft', draftRow, t)],
);
