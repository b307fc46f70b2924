import {
  type AnyPgColumn,
  foreignKey,
  index,
  type PgTableExtraConfigValue,
  primaryKey,
} from 'drizzle-orm/pg-core';
import { job } from './job.ts';

interface JobColumns {
  firmId: AnyPgColumn;
  jobId: AnyPgColumn;
  id: AnyPgColumn;
}
type Target = JobColumns;

/** Key of a table of a job's rows, and the job that they belong to. */
export function jobPartKeys(table: string, columns: JobColumns): PgTableExtraConfigValue[] {
  return [
    primaryKey({ name: `${table}_pkey`, columns: [columns.firmId, columns.jobId, columns.id] }),
    foreignKey({
      name: `${table}_job_fkey`,
      columns: [columns.firmId, columns.jobId],
      foreignColumns: [job.firmId, job.id],
    }).onDelete('restrict'),
  ];
}

/** A column that holds the id of a row of the same job, with the index that finds who refers to a row. */
export function reference(
  table: string,
  columns: JobColumns,
  column: AnyPgColumn,
  target: Target,
): PgTableExtraConfigValue[] {
  const owners = [columns.firmId, columns.jobId] as const;
  return [
    foreignKey({
      name: `${table}_${column.name}_fkey`,
      columns: [...owners, column],
      foreignColumns: [target.firmId, target.jobId, target.id],
    }).onDelete('restrict'),
    index(`${table}_${column.name}_idx`).on(...owners, column),
  ];
}
