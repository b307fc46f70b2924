import { JOB_TABLE_NAMES, JOB_TABLES, type JobTable, type Row } from '@farlug/contract/rows';
import { getTableColumns, getTableName } from 'drizzle-orm';
import type { AnyPgColumn, PgTable } from 'drizzle-orm/pg-core';
import * as schema from './schema/index.ts';

type Stored<T extends PgTable> = T['$inferSelect'];
/** Every field of the contract's row is a column of the same type: a table that differs does not compile. */
type Holds<T extends JobTable, Table extends PgTable> =
  Row<T> extends Pick<Stored<Table>, keyof Row<T> & keyof Stored<Table>>
    ? Exclude<keyof Row<T>, keyof Stored<Table>> extends never
      ? Table
      : never
    : never;
const holding =
  <T extends JobTable>() =>
  <Table extends PgTable>(table: Holds<T, Table>): Table =>
    table as Table;

/** The database table of each table that an edit may change. */
export const DRIZZLE_TABLES = {
  job: holding<'job'>()(schema.job),
  limit: holding<'limit'>()(schema.jobLimit),
  bus: holding<'bus'>()(schema.bus),
  source: holding<'source'>()(schema.source),
  panel: holding<'panel'>()(schema.panel),
  circuit: holding<'circuit'>()(schema.circuit),
  breaker: holding<'breaker'>()(schema.breaker),
  run: holding<'run'>()(schema.run),
  transformer: holding<'transformer'>()(schema.transformer),
  load: holding<'load'>()(schema.load),
  conductor: holding<'conductor'>()(schema.jobConductor),
  reading: holding<'reading'>()(schema.reading),
  draft: holding<'draft'>()(schema.draft),
} as const satisfies Record<JobTable, PgTable>;

export interface StoredField {
  /** Name in the contract's row. */
  field: string;
  /** Name of the column. */
  column: string;
}
export interface StoredTable {
  table: JobTable;
  /** Name in the database. */
  name: string;
  /** Fields of the contract's row in its order, `id` among them. */
  fields: readonly StoredField[];
  /** Whether rows have an order of their own. */
  ordered: boolean;
}

function describe(table: JobTable): StoredTable {
  const drizzleTable: PgTable = DRIZZLE_TABLES[table];
  const columns = getTableColumns(drizzleTable) as Record<string, AnyPgColumn>;
  const fields = Object.keys(JOB_TABLES[table].shape).map((field) => ({
    field,
    column: columns[field]!.name,
  }));
  return {
    table,
    name: getTableName(drizzleTable),
    fields,
    ordered: fields.some(({ field }) => field === 'orderKey'),
  };
}

export const STORED_TABLES = Object.fromEntries(
  JOB_TABLE_NAMES.map((table) => [table, describe(table)]),
) as Record<JobTable, StoredTable>;
