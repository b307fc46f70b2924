import { REFERENCES } from '@farlug/contract/edit';
import {
  JOB_TABLE_NAMES,
  type JobRowLists,
  type JobRows,
  type JobTable,
  rowsFromLists,
} from '@farlug/contract/rows';
import { type SQL, sql } from 'drizzle-orm';
import type { FirmTransaction } from '../database.ts';
import { STORED_TABLES, type StoredTable } from '../job-tables.ts';

/**
 * Rows are read and written as JSON whose keys are the contract's field names: one statement whatever the number of
 * rows, and one snapshot whatever the number of tables.
 */
const name = (identifier: string) => sql.identifier(identifier);
const separated = (parts: readonly SQL[]) => sql.join([...parts], sql`, `);

/** `firm_id` and `job_id` of a row; the job's own row is its own job. */
export function ownedBy(stored: StoredTable, tx: FirmTransaction, jobId: string): SQL {
  const job = stored.table === 'job' ? 'id' : 'job_id';
  return sql`t.firm_id = ${tx.firmId} and t.${name(job)} = ${jobId}`;
}

function rowsOf(stored: StoredTable, tx: FirmTransaction, jobId: string, where: SQL): SQL {
  const fields = stored.fields.map(({ field, column }) => sql`t.${name(column)} as ${name(field)}`);
  const order = stored.ordered ? sql`t.order_key, t.id` : sql`t.id`;
  return sql`select ${stored.table}::text as "table", coalesce((select json_agg(whole_row) from (
    select ${separated(fields)} from ${name(stored.name)} t
    where ${ownedBy(stored, tx, jobId)} and ${where} order by ${order}
  ) whole_row), '[]') as rows`;
}

async function readRows(
  tx: FirmTransaction,
  jobId: string,
  wanted: readonly { table: JobTable; where: SQL }[],
): Promise<JobRowLists> {
  const lists = Object.fromEntries(JOB_TABLE_NAMES.map((table) => [table, []])) as unknown as JobRowLists;
  if (wanted.length === 0) return lists;
  const selects = wanted.map(({ table, where }) => rowsOf(STORED_TABLES[table], tx, jobId, where));
  const { rows } = await tx.sql.execute<{ table: JobTable; rows: never[] }>(
    sql.join(selects, sql` union all `),
  );
  for (const row of rows) lists[row.table] = row.rows;
  return lists;
}

/** Every row of the job as it stands; all lists are empty where there is no such job. */
export function loadRowLists(tx: FirmTransaction, jobId: string): Promise<JobRowLists> {
  return readRows(
    tx,
    jobId,
    JOB_TABLE_NAMES.map((table) => ({ table, where: sql`true` })),
  );
}

export interface WantedRows {
  ids: Set<string>;
  /** Rows with one of these codes. */
  codes: Set<string>;
  /** Rows that refer to one of these, by field. */
  referring: Map<string, Set<string>>;
}

/** The rows that an edit can depend on, and no more. */
export async function loadSomeRows(
  tx: FirmTransaction,
  jobId: string,
  wanted: ReadonlyMap<JobTable, WantedRows>,
  codeField: Partial<Record<JobTable, string>>,
): Promise<JobRows> {
  const parts = [...wanted].map(([table, { ids, codes, referring }]) => {
    const columnOf = (field: string) =>
      STORED_TABLES[table].fields.find((candidate) => candidate.field === field)!.column;
    const any: SQL[] = [];
    if (ids.size > 0) any.push(sql`t.id = any(${sql.param([...ids])}::uuid[])`);
    const code = codeField[table];
    if (code && codes.size > 0)
      any.push(sql`t.${name(columnOf(code))} = any(${sql.param([...codes])}::text[])`);
    for (const [field, targets] of referring)
      any.push(sql`t.${name(columnOf(field))} = any(${sql.param([...targets])}::uuid[])`);
    return { table, where: any.length === 0 ? sql`false` : sql`(${sql.join(any, sql` or `)})` };
  });
  return rowsFromLists(await readRows(tx, jobId, parts));
}

type AnyRow = { id: string };

const recordset = (stored: StoredTable, rows: readonly AnyRow[]) => {
  const stored_ = rows.map((row) =>
    Object.fromEntries(
      stored.fields.map(({ field, column }) => [column, (row as Record<string, unknown>)[field]]),
    ),
  );
  return sql`json_populate_recordset(null::${name(stored.name)}, ${JSON.stringify(stored_)}::json) r`;
};

export async function insertRows(
  tx: FirmTransaction,
  jobId: string,
  table: JobTable,
  rows: readonly AnyRow[],
): Promise<void> {
  if (rows.length === 0) return;
  const stored = STORED_TABLES[table];
  const columns = stored.fields.map(({ column }) => name(column));
  const values = stored.fields.map(({ column }) => sql`r.${name(column)}`);
  const owners = table === 'job' ? [sql`firm_id`] : [sql`firm_id`, sql`job_id`];
  const owner = table === 'job' ? [sql`${tx.firmId}::uuid`] : [sql`${tx.firmId}::uuid`, sql`${jobId}::uuid`];
  await tx.sql.execute(
    sql`insert into ${name(stored.name)} (${separated([...owners, ...columns.map((c) => sql`${c}`)])})
        select ${separated([...owner, ...values])} from ${recordset(stored, rows)}`,
  );
}

export async function updateRows(
  tx: FirmTransaction,
  jobId: string,
  table: JobTable,
  rows: readonly AnyRow[],
): Promise<void> {
  if (rows.length === 0) return;
  const stored = STORED_TABLES[table];
  const settings = stored.fields
    .filter(({ field }) => field !== 'id')
    .map(({ column }) => sql`${name(column)} = r.${name(column)}`);
  await tx.sql.execute(
    sql`update ${name(stored.name)} t set ${separated(settings)}, version = t.version + 1
        from ${recordset(stored, rows)} where ${ownedBy(stored, tx, jobId)} and t.id = r.id`,
  );
}

export async function deleteRows(
  tx: FirmTransaction,
  jobId: string,
  table: JobTable,
  ids: readonly string[],
): Promise<void> {
  if (ids.length === 0) return;
  const stored = STORED_TABLES[table];
  await tx.sql.execute(
    sql`delete from ${name(stored.name)} t
        where ${ownedBy(stored, tx, jobId)} and t.id = any(${sql.param([...ids])}::uuid[])`,
  );
}

/** Which tables refer to a table, and by which field. */
export function referrersOf(target: JobTable): { table: JobTable; field: string }[] {
  return JOB_TABLE_NAMES.flatMap((table) =>
    Object.entries(REFERENCES[table] ?? {})
      .filter(([, to]) => to === target)
      .map(([field]) => ({ table, field })),
  );
}
