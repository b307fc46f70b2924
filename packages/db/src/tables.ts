import { partitionOf, QUEUE_NAMES, QUEUE_SCHEMA } from './queues.ts';

/** Every table of the database is in exactly one of these lists, as `schema.table` where it is not in `public`. */

/** Rows that belong to no firm. */
export const GLOBAL_TABLES = [
  'person',
  'session',
  'token',
  'link_index',
  'rate_counter',
  'migration.applied',
] as const;

/** Rows of one firm: `firm_id` in the primary key, row-level security forced. */
export const TENANT_TABLES = [
  'firm',
  'membership',
  'invitation',
  'limit_preset',
  'preset_limit',
  'default_value',
  'conductor_row',
  'audit_event',
  'job',
  'job_limit',
  'job_verdict',
  'job_edit',
  'bus',
  'source',
  'panel',
  'circuit',
  'breaker',
  'run',
  'transformer',
  'load',
  'job_conductor',
  'reading',
  'draft',
  'revision',
  'revision_pdf',
  'delivery',
  'decision',
] as const;

/** Only ever added to by the api. */
export const APPEND_ONLY_TABLES = ['revision', 'job_edit', 'decision', 'audit_event'] as const;

/** What pg-boss keeps its work in: ids, no content. */
export const QUEUE_TABLES: readonly string[] = [
  ...['version', 'queue', 'schedule', 'subscription', 'job', 'archive'],
  ...QUEUE_NAMES.map(partitionOf),
].map((name) => `${QUEUE_SCHEMA}.${name}`);
