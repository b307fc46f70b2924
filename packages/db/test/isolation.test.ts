import { randomUUID } from 'node:crypto';
import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { APPEND_ONLY_TABLES, TENANT_TABLES } from '../src/tables.ts';
import { type TestDatabase, withTestDatabase } from '../src/testing/index.ts';
import { fillEveryTable } from './every-table.ts';
import type { TestFirm } from './factories.ts';

let database: TestDatabase;
let own: TestFirm;
let other: TestFirm;

beforeAll(async () => {
  database = await withTestDatabase();
  own = await fillEveryTable(database);
  other = await fillEveryTable(database);
});
afterAll(() => database.close());

const rowsOf = async (table: string, firmId: string) => {
  const [row] = await database.asOwner(
    `select count(*)::int as rows, md5(string_agg(t::text, ',' order by t::text)) as content
     from "${table}" t where firm_id = $1`,
    [firmId],
  );
  return row as { rows: number; content: string };
};

describe.each(TENANT_TABLES)('%s', (table) => {
  const name = sql.identifier(table);
  const asOwnFirm = <T>(query: ReturnType<typeof sql>) =>
    database.db.withFirm(own.firmId, own.personId, async (tx) => {
      const { rows } = await tx.sql.execute(query);
      return rows as T[];
    });

  test('shows rows of the own firm and none of the other', async () => {
    expect((await rowsOf(table, other.firmId)).rows).toBeGreaterThan(0);
    const seen = await asOwnFirm<{ firm_id: string }>(sql`select firm_id from ${name}`);
    expect(seen.length).toBeGreaterThan(0);
    expect(new Set(seen.map((row) => row.firm_id))).toEqual(new Set([own.firmId]));
    expect(await asOwnFirm(sql`select 1 from ${name} where firm_id = ${other.firmId}`)).toEqual([]);
  });

  test('shows nothing where no firm is set, not even after a transaction that set one', async () => {
    await asOwnFirm(sql`select 1`);
    for (const db of [database.db, database.worker]) {
      const rows = await db.global(async (tx) => {
        await tx.sql.execute(sql`savepoint before`);
        try {
          return (await tx.sql.execute(sql`select 1 from ${name}`)).rows;
        } catch (error) {
          await tx.sql.execute(sql`rollback to before`);
          expect(codeOf(error)).toBe('42501');
          return [];
        }
      });
      expect(rows).toEqual([]);
    }
  });

  test('lets nobody write a row of the other firm', async () => {
    const before = await rowsOf(table, other.firmId);
    const attempts = [
      sql`update ${name} set firm_id = firm_id where firm_id = ${other.firmId}`,
      sql`update ${name} set firm_id = ${other.firmId}`,
      sql`delete from ${name} where firm_id = ${other.firmId}`,
      sql`insert into ${name} select (json_populate_record(t, ${JSON.stringify({ firm_id: other.firmId })}::json)).* from ${name} t`,
    ];
    const failures: unknown[] = [];
    for (const attempt of attempts)
      await asOwnFirm(attempt).catch((error: unknown) => failures.push(codeOf(error)));
    expect(await rowsOf(table, other.firmId)).toEqual(before);
    expect(failures).toContain('42501');
    expect(new Set(failures)).toEqual(new Set(['42501']));
  });
});

test.each(APPEND_ONLY_TABLES)('%s is only ever added to by the api', async (table) => {
  for (const statement of [
    sql`update ${sql.identifier(table)} set firm_id = firm_id`,
    sql`delete from ${sql.identifier(table)}`,
    sql`truncate ${sql.identifier(table)} cascade`,
  ]) {
    const attempt = database.db.withFirm(own.firmId, null, (tx) => tx.sql.execute(statement));
    await expect(attempt.catch((error) => Promise.reject(codeOf(error)))).rejects.toBe('42501');
  }
});

test('a firm that does not exist has no rows', async () => {
  const { rows } = await database.db.withFirm(randomUUID(), null, (tx) =>
    tx.sql.execute(sql`select 1 from job`),
  );
  expect(rows).toEqual([]);
});

test('the roles own nothing, make nothing and are under row-level security', async () => {
  const roles = await database.asOwner(
    `select rolname, rolsuper, rolbypassrls, rolcreaterole, rolcreatedb,
       (select count(*)::int from pg_class where relowner = r.oid) +
       (select count(*)::int from pg_proc where proowner = r.oid) as owned
     from pg_roles r where rolname in ('farlug_api', 'farlug_worker') order by rolname`,
  );
  const bare = { rolsuper: false, rolbypassrls: false, rolcreaterole: false, rolcreatedb: false, owned: 0 };
  expect(roles).toEqual([
    { rolname: 'farlug_api', ...bare },
    { rolname: 'farlug_worker', ...bare },
  ]);
  for (const db of [database.db, database.worker])
    await expect(
      db.global((tx) => tx.sql.execute(sql`create table mine (id int)`)).catch((error) => codeOf(error)),
    ).resolves.toBe('42501');
});

test('the worker neither edits a job nor sees a password', async () => {
  const statements = [
    sql`update job set name = 'x'`,
    sql`delete from run`,
    sql`insert into revision select * from revision`,
    sql`select password_hash from person`,
    sql`select hash from link_index`,
    sql`select * from memberships_of(${own.personId})`,
  ];
  for (const statement of statements) {
    const attempt = database.worker.withFirm(own.firmId, null, (tx) => tx.sql.execute(statement));
    await expect(attempt.catch((error) => Promise.reject(codeOf(error)))).rejects.toBe('42501');
  }
});

function codeOf(error: unknown): unknown {
  const cause = error instanceof Error ? error.cause : undefined;
  return (cause as { code?: string })?.code ?? (error as { code?: string }).code ?? error;
}
