import { createHash } from 'node:crypto';
import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import pg from 'pg';
import { MIGRATIONS_FOLDER, migrate } from '../migrate.ts';
import { QUEUES } from '../queues.ts';

/** Roles belong to the whole cluster: everybody who uses the cluster of the tests gives them these passwords. */
export const TEST_API_PASSWORD = 'tests-api';
export const TEST_WORKER_PASSWORD = 'tests-worker';

/** The migrated database that every test file's own is a copy of, made by whoever comes first. */
export async function ensureTemplate(adminUrl: string): Promise<string> {
  const template = `farlug_template_${fingerprint()}`;
  const admin = new pg.Client({ connectionString: adminUrl });
  await admin.connect();
  try {
    await admin.query(`select pg_advisory_lock(hashtext('farlug test template'))`);
    const { rowCount } = await admin.query('select 1 from pg_database where datname = $1', [template]);
    if (rowCount) return template;
    await removeLeftovers(admin);
    const unfinished = `${template}_unfinished`;
    await admin.query(`drop database if exists ${unfinished} with (force)`);
    await admin.query(`create database ${unfinished}`);
    await migrate({
      ownerUrl: databaseUrl(adminUrl, unfinished),
      apiPassword: TEST_API_PASSWORD,
      workerPassword: TEST_WORKER_PASSWORD,
    });
    await admin.query(`alter database ${unfinished} rename to ${template}`);
    return template;
  } finally {
    await admin.end();
  }
}

/** Databases of test runs that were killed, and templates of schemas long past. */
async function removeLeftovers(admin: pg.Client): Promise<void> {
  const { rows } = await admin.query<{ name: string }>(
    `select datname as name from pg_database where datname ~ '^farlug_(test_|template_)' order by oid desc`,
  );
  const names = rows.map((row) => row.name);
  const templates = names.filter((name) => name.startsWith('farlug_template_'));
  const ofDeadRuns = names.filter((name) => {
    const pid = /^farlug_test_(\d+)_/.exec(name)?.[1];
    return pid !== undefined && !isAlive(Number(pid));
  });
  for (const name of [...ofDeadRuns, ...templates.slice(TEMPLATES_KEPT)])
    await admin.query(`drop database if exists ${name} with (force)`);
}

/** More than one, for working trees of different age that share the cluster. */
const TEMPLATES_KEPT = 3;

function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === 'EPERM';
  }
}

export function databaseUrl(adminUrl: string, database: string): string {
  const url = new URL(adminUrl);
  url.pathname = `/${database}`;
  return url.href;
}

/** Of everything that a migrated database follows from. */
function fingerprint(): string {
  const hash = createHash('sha256').update(JSON.stringify(QUEUES));
  const source = path.join(MIGRATIONS_FOLDER, '../src');
  const files = [
    ...readdirSync(MIGRATIONS_FOLDER)
      .filter((name) => name.endsWith('.sql'))
      .sort()
      .map((name) => path.join(MIGRATIONS_FOLDER, name)),
    ...['migrate.ts', 'migrate-roles.ts', 'migrate-queues.ts'].map((name) => path.join(source, name)),
  ];
  for (const file of files) hash.update(readFileSync(file));
  return hash.digest('hex').slice(0, 12);
}
