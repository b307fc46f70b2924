import { randomBytes } from 'node:crypto';
import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { generateDrizzleJson, generateMigration } from 'drizzle-kit/api';
import pg from 'pg';
import { afterEach, expect, test } from 'vitest';
import { makePerson } from '../test/factories.ts';
import { createDatabase } from './database.ts';
import { MIGRATIONS_FOLDER, migrate, urlFor } from './migrate.ts';
import { ensureRole } from './migrate-roles.ts';
import { addMember, createFirm } from './queries/firms.ts';
import { membershipsOf } from './queries/people.ts';
import * as schema from './schema/index.ts';
import { databaseUrl, TEST_API_PASSWORD, TEST_WORKER_PASSWORD } from './testing/template.ts';

const adminUrl = process.env.TEST_PG_URL!;
const passwords = { apiPassword: TEST_API_PASSWORD, workerPassword: TEST_WORKER_PASSWORD };
const leftovers: string[] = [];

async function asAdmin(...statements: string[]): Promise<void> {
  const client = new pg.Client({ connectionString: adminUrl });
  await client.connect();
  try {
    for (const statement of statements) await client.query(statement);
  } finally {
    await client.end();
  }
}
const freshName = () => `farlug_migrate_${randomBytes(4).toString('hex')}`;

async function emptyDatabase(): Promise<string> {
  const name = freshName();
  await asAdmin(`create database ${name}`);
  leftovers.unshift(`drop database if exists ${name} with (force)`);
  return databaseUrl(adminUrl, name);
}
afterEach(() => asAdmin(...leftovers.splice(0)));

async function rowsOf(url: string, text: string): Promise<unknown[]> {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  try {
    return (await client.query(text)).rows;
  } finally {
    await client.end();
  }
}

test('an empty database is brought to the present schema, once, however often it is asked for', async () => {
  const ownerUrl = await emptyDatabase();
  const urls = await Promise.all([1, 2].map(() => migrate({ ownerUrl, ...passwords })));
  expect(urls[0]).toEqual(urls[1]);
  const applied = await rowsOf(ownerUrl, 'select hash from migration.applied');
  expect(applied).toHaveLength(readdirSync(MIGRATIONS_FOLDER).filter((name) => name.endsWith('.sql')).length);

  const started = performance.now();
  await migrate({ ownerUrl, ...passwords });
  expect(performance.now() - started).toBeLessThan(1000);
  expect(await rowsOf(ownerUrl, 'select hash from migration.applied')).toEqual(applied);
  for (const url of [urls[0]!.apiUrl, urls[0]!.workerUrl]) {
    const db = createDatabase(url, { connections: 1 });
    expect(await db.ready()).toBe(true);
    await db.close();
  }
});

test('an owner who is no superuser is enough, and the functions still look across firms', async () => {
  const owner = freshName();
  const name = `${owner}_db`;
  await asAdmin(
    `create role ${owner} login createrole password 'owner'`,
    `create database ${name} owner ${owner}`,
  );
  leftovers.push(`drop database if exists ${name} with (force)`, `drop role ${owner}`);
  const url = new URL(databaseUrl(adminUrl, name));
  url.username = owner;
  url.password = 'owner';
  const { apiUrl } = await migrate({ ownerUrl: url.href, ...passwords });
  const db = createDatabase(apiUrl, { connections: 1 });
  const personId = await makePerson(db);
  const firmId = 'f1f1f1f1-f1f1-4f1f-8f1f-f1f1f1f1f1f1';
  await db.withFirm(firmId, personId, async (tx) => {
    await createFirm(tx, { name: 'Alder' });
    await addMember(tx, personId, 'admin');
  });
  expect(await db.global((tx) => membershipsOf(tx, personId))).toEqual([
    { firmId, firmName: 'Alder', role: 'admin' },
  ]);
  await db.close();
});

test('a role gets the password that it is given, whatever its characters, and a new one later', async () => {
  const role = freshName();
  leftovers.push(`drop role ${role}`);
  const passwordsInTurn = ['plain', `p'w/"@:%?# \\ é`];
  for (const [i, password] of passwordsInTurn.entries()) {
    const admin = new pg.Client({ connectionString: adminUrl });
    await admin.connect();
    await ensureRole(admin, role, password);
    await admin.end();
    const ready = await Promise.all(
      passwordsInTurn.map(async (candidate) => {
        const db = createDatabase(urlFor(adminUrl, role, candidate), { connections: 1 });
        const answers = await db.ready();
        await db.close();
        return answers;
      }),
    );
    expect(ready).toEqual(passwordsInTurn.map((_, j) => j === i));
  }
});

test('the migrations lay what the schema says', async () => {
  const meta = path.join(MIGRATIONS_FOLDER, 'meta');
  const latest = readdirSync(meta)
    .filter((name) => name.endsWith('_snapshot.json'))
    .sort()
    .at(-1)!;
  const snapshot = JSON.parse(readFileSync(path.join(meta, latest), 'utf8'));
  expect(await generateMigration(snapshot, generateDrizzleJson(schema, snapshot.id))).toEqual([]);
});
