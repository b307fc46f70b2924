import { fileURLToPath } from 'node:url';
import { drizzle } from 'drizzle-orm/node-postgres';
import { migrate as applyMigrations } from 'drizzle-orm/node-postgres/migrator';
import pg from 'pg';
import { createQueues } from './migrate-queues.ts';
import { API_ROLE, ensureRoles, WORKER_ROLE } from './migrate-roles.ts';

export const MIGRATIONS_FOLDER = fileURLToPath(new URL('../migrations', import.meta.url));

export interface MigrateOptions {
  /** A role that owns the database and may create roles: never the one that the api or the worker uses. */
  ownerUrl: string;
  apiPassword: string;
  workerPassword: string;
}
export interface RoleUrls {
  apiUrl: string;
  workerUrl: string;
}

/**
 * Brings a database to the present schema and gives the two roles their passwords; safe to repeat, and from several
 * processes at once. pg-boss would lay its own schema and queues when it starts; here the owner does, so that neither
 * the api nor the worker may create a table. They start pg-boss with `migrate: false` (see `queue.ts`).
 */
export async function migrate({ ownerUrl, apiPassword, workerPassword }: MigrateOptions): Promise<RoleUrls> {
  const client = new pg.Client({ connectionString: ownerUrl, options: '-c client_min_messages=warning' });
  await client.connect();
  try {
    await client.query(`select pg_advisory_lock(hashtext('farlug migrations'))`);
    await ensureRoles(client, { apiPassword, workerPassword });
    await applyMigrations(drizzle({ client }), {
      migrationsFolder: MIGRATIONS_FOLDER,
      migrationsSchema: 'migration',
      migrationsTable: 'applied',
    });
    await createQueues(client);
  } finally {
    await client.end();
  }
  return {
    apiUrl: urlFor(ownerUrl, API_ROLE, apiPassword),
    workerUrl: urlFor(ownerUrl, WORKER_ROLE, workerPassword),
  };
}

export function urlFor(ownerUrl: string, role: string, password: string): string {
  const url = new URL(ownerUrl);
  url.username = role;
  url.password = encodeURIComponent(password);
  return url.href;
}
