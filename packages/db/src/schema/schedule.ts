import { breakerRow, circuitRow, panelRow } from '@farlug/contract/rows';
import { CIRCUIT_KINDS, CONDUCTORS, PANEL_LAYOUTS } from '@farlug/solver/job';
import { integer, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { bus } from './bus.ts';
import { byteOrderedText, jobPart } from './columns.ts';
import { jobPartKeys, reference } from './job-part.ts';
import { checksOf } from './row-checks.ts';

export const panel = pgTable(
  'panel',
  {
    ...jobPart(),
    busId: uuid('bus_id').notNull(),
    building: text('building'),
    area: text('area'),
    layout: text('layout', { enum: PANEL_LAYOUTS }).notNull(),
    spaces: integer('spaces').notNull(),
    lines: text('lines', { enum: CONDUCTORS }).array().notNull(),
    mainAmps: text('main_amps'),
    mounting: text('mounting'),
    notes: text('notes'),
  },
  (t) => [
    ...jobPartKeys('panel', t),
    ...reference('panel', t, t.busId, bus),
    ...checksOf('panel', panelRow, t),
  ],
);

export const circuit = pgTable(
  'circuit',
  {
    ...jobPart(),
    orderKey: byteOrderedText('order_key').notNull(),
    panelId: uuid('panel_id').notNull(),
    kind: text('kind', { enum: CIRCUIT_KINDS }).notNull(),
    description: text('description'),
    room: text('room'),
    loadType: text('load_type'),
    notes: text('notes'),
  },
  (t) => [
    ...jobPartKeys('circuit', t),
    ...reference('circuit', t, t.panelId, panel),
    ...checksOf('circuit', circuitRow, t),
  ],
);

export const BREAKER_HALVES = ['a', 'b'] as const;

/** Two breakers in one space are data, to be shown and put right: nothing here forbids them. */
export const breaker = pgTable(
  'breaker',
  {
    ...jobPart(),
    circuitId: uuid('circuit_id').notNull(),
    space: integer('space').notNull(),
    half: text('half', { enum: BREAKER_HALVES }),
    poles: integer('poles').notNull(),
    amps: text('amps'),
  },
  (t) => [
    ...jobPartKeys('breaker', t),
    ...reference('breaker', t, t.circuitId, circuit),
    ...checksOf('breaker', breakerRow, t),
  ],
);
