import { randomBytes } from 'node:crypto';
import pg from 'pg';
import { createDatabase, type Database } from '../database.ts';
import { urlFor } from '../migrate.ts';
import { API_ROLE, WORKER_ROLE } from '../migrate-roles.ts';
import { databaseUrl, ensureTemplate, TEST_API_PASSWORD, TEST_WORKER_PASSWORD } from './template.ts';

export interface TestDatabase {
  /** As the api's role. */
  db: Database;
  /** As the worker's role. */
  worker: Database;
  apiUrl: string;
  workerUrl: string;
  ownerUrl: string;
  /** As the owner, to whom row-level security may not apply: for arranging and for looking. */
  asOwner(text: string, values?: unknown[]): Promise<Record<string, unknown>[]>;
  close(): Promise<void>;
}

/**
 * A database of its own for one test file: in `beforeAll`, `database = await withTestDatabase()`; in `afterAll`,
 * `database.close()`. TEST_PG_URL is the owner of the cluster, as the project's global setup provides it.
 */
export async function withTestDatabase(): Promise<TestDatabase> {
  const adminUrl = process.env.TEST_PG_URL;
  if (!adminUrl)
    throw new Error(
      'TEST_PG_URL is not set: use databaseProject of scripts/testing/project.ts in vitest.config.ts',
    );
  const template = await ensureTemplate(adminUrl);
  const name = `farlug_test_${process.pid}_${randomBytes(4).toString('hex')}`;
  await asAdmin(adminUrl, `create database ${name} template ${template}`);

  const ownerUrl = databaseUrl(adminUrl, name);
  const apiUrl = urlFor(ownerUrl, API_ROLE, TEST_API_PASSWORD);
  const workerUrl = urlFor(ownerUrl, WORKER_ROLE, TEST_WORKER_PASSWORD);
  const db = createDatabase(apiUrl, { connections: 5 });
  const worker = createDatabase(workerUrl, { connections: 2 });
  const owner = new pg.Pool({ connectionString: ownerUrl, max: 1 });
  owner.on('error', () => {});
  return {
    db,
    worker,
    apiUrl,
    workerUrl,
    ownerUrl,
    asOwner: async (text, values) => (await owner.query(text, values)).rows,
    close: async () => {
      await Promise.all([db.close(), worker.close(), owner.end()]);
      await asAdmin(adminUrl, `drop database if exists ${name} with (force)`);
    },
  };
}

async function asAdmin(adminUrl: string, text: string): Promise<void> {
  const admin = new pg.Client({ connectionString: adminUrl });
  await admin.connect();
  try {
    await admin.query(text);
  } finally {
    await admin.end();
  }
}
