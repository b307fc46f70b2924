import type pg from 'pg';
import PgBoss from 'pg-boss';
import { API_ROLE, WORKER_ROLE } from './migrate-roles.ts';
import { QUEUE_NAMES, QUEUE_SCHEMA, QUEUES } from './queues.ts';

/** pg-boss's schema, our queues, and what each role may do with them. Nothing is done where all is there. */
export async function createQueues(client: pg.Client): Promise<void> {
  const { rows: found } = await client.query<{ there: boolean }>(
    `select to_regclass('${QUEUE_SCHEMA}.version') is not null as there`,
  );
  if (!found[0]?.there) await client.query(PgBoss.getConstructionPlans(QUEUE_SCHEMA));
  const { rows } = await client.query<{ name: string }>(`select name from ${QUEUE_SCHEMA}.queue`);
  const missing = QUEUE_NAMES.filter((name) => !rows.some((row) => row.name === name));
  if (missing.length === 0) return;
  await client.query('begin');
  for (const name of missing)
    await client.query(`select ${QUEUE_SCHEMA}.create_queue($1, $2)`, [
      name,
      { policy: 'standard', ...QUEUES[name] },
    ]);
  await client.query(GRANTS);
  await client.query('commit');
}

/** The api sends within its own transaction and sees no payload of others; the worker takes up, ends and tidies. */
const GRANTS = `
  grant usage on schema ${QUEUE_SCHEMA} to ${API_ROLE}, ${WORKER_ROLE};
  grant select on ${QUEUE_SCHEMA}.queue, ${QUEUE_SCHEMA}.version to ${API_ROLE}, ${WORKER_ROLE};
  grant insert, select (id) on ${QUEUE_SCHEMA}.job to ${API_ROLE};
  grant select, insert, update, delete on ${QUEUE_SCHEMA}.job, ${QUEUE_SCHEMA}.archive to ${WORKER_ROLE};
  grant update on ${QUEUE_SCHEMA}.version to ${WORKER_ROLE};
  grant select on ${QUEUE_SCHEMA}.schedule, ${QUEUE_SCHEMA}.subscription to ${WORKER_ROLE};
`;
