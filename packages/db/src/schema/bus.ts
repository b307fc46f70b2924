import { busRow } from '@farlug/contract/rows';
import { BUS_KINDS } from '@farlug/solver/job';
import { pgTable, text } from 'drizzle-orm/pg-core';
import { byteOrderedText, jobPart } from './columns.ts';
import { jobPartKeys } from './job-part.ts';
import { checksOf } from './row-checks.ts';

export const bus = pgTable(
  'bus',
  {
    ...jobPart(),
    code: text('code').notNull(),
    orderKey: byteOrderedText('order_key').notNull(),
    name: text('name'),
    kind: text('kind', { enum: BUS_KINDS }).notNull(),
  },
  (t) => [...jobPartKeys('bus', t), ...checksOf('bus', busRow, t)],
);
