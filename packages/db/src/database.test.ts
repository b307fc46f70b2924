import { randomUUID } from 'node:crypto';
import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { makeFirm } from '../test/factories.ts';
import { createDatabase } from './database.ts';
import { firmSettings } from './queries/firms.ts';
import { createPerson, personById } from './queries/people.ts';
import { type TestDatabase, withTestDatabase } from './testing/index.ts';

let database: TestDatabase;
beforeAll(async () => {
  database = await withTestDatabase();
});
afterAll(() => database.close());

test('what throws leaves nothing behind', async () => {
  const id = randomUUID();
  const failing = database.db.global(async (tx) => {
    await createPerson(tx, { id, email: `${id}@alder.example`, name: 'Ida', passwordHash: 'h' });
    throw new Error('no');
  });
  await expect(failing).rejects.toThrow('no');
  expect(await database.db.global((tx) => personById(tx, id))).toBeNull();
});

test('the firm of one transaction is not that of the next on the same connection', async () => {
  const single = createDatabase(database.apiUrl, { connections: 1 });
  const firm = await makeFirm(single);
  expect(await single.withFirm(firm.firmId, null, firmSettings)).not.toBeNull();
  const setting = await single.global((tx) =>
    tx.sql.execute(
      sql`select nullif(current_setting('farlug.firm', true), '') as firm, count(*)::int as firms from firm`,
    ),
  );
  expect(setting.rows).toEqual([{ firm: null, firms: 0 }]);
  await expect(
    single.withFirm(firm.firmId, null, async (tx) => tx.sql.execute(sql`select 1 / 0`)),
  ).rejects.toMatchObject({ cause: { code: '22012' } });
  expect(await single.withFirm(randomUUID(), null, firmSettings)).toBeNull();
  await single.close();
});

test('a connection that was lost is replaced', async () => {
  const single = createDatabase(database.apiUrl, { connections: 1 });
  const lost = single.global(async (tx) => {
    const { rows } = await tx.sql.execute<{ pid: number }>(sql`select pg_backend_pid() as pid`);
    await database.asOwner('select pg_terminate_backend($1)', [rows[0]!.pid]);
    await tx.sql.execute(sql`select 1`);
  });
  await expect(lost).rejects.toThrow();
  expect(await single.ready()).toBe(true);
  await single.close();
});

test('a database that is not there is not ready', async () => {
  const url = new URL(database.apiUrl);
  url.pathname = '/farlug_nowhere';
  const nowhere = createDatabase(url.href, { connections: 1 });
  expect(await nowhere.ready()).toBe(false);
  await nowhere.close();
});
