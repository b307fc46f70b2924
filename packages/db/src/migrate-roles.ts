import type pg from 'pg';

export const API_ROLE = 'farlug_api';
export const WORKER_ROLE = 'farlug_worker';

/**
 * Two login roles that own nothing and to whom row-level security applies. Roles belong to the whole cluster, so they
 * are made here and not by a migration of one database.
 */
export async function ensureRoles(
  client: pg.Client,
  passwords: { apiPassword: string; workerPassword: string },
): Promise<void> {
  await ensureRole(client, API_ROLE, passwords.apiPassword);
  await ensureRole(client, WORKER_ROLE, passwords.workerPassword);
  const { rows } = await client.query<{ rolname: string }>(
    'select rolname from pg_roles where rolname = any($1) and (rolsuper or rolbypassrls)',
    [[API_ROLE, WORKER_ROLE]],
  );
  if (rows.length > 0)
    throw new Error(
      `${rows.map((row) => row.rolname).join(' and ')} must be neither a superuser nor exempt from row-level security`,
    );
}

export async function ensureRole(client: pg.Client, role: string, password: string): Promise<void> {
  const { rowCount } = await client.query('select 1 from pg_roles where rolname = $1', [role]);
  const secret = client.escapeLiteral(password);
  if (rowCount) await client.query(`alter role ${role} login password ${secret}`);
  else
    await client.query(
      `create role ${role} login nosuperuser nobypassrls nocreatedb nocreaterole noinherit password ${secret}`,
    );
}
