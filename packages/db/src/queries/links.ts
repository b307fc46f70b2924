import { sql } from 'drizzle-orm';
import type { FirmTransaction, Transaction } from '../database.ts';
import { linkIndex } from '../schema/index.ts';

export interface LinkTarget {
  firmId: string;
  jobId: string;
  deliveryId: string;
  /** The link is the delivery's present one only where this is the delivery's epoch. */
  epoch: number;
}

/** Stores where a link leads; the same link twice is one. */
export async function addLink(
  tx: FirmTransaction,
  hash: string,
  { jobId, deliveryId, epoch }: Omit<LinkTarget, 'firmId'>,
): Promise<void> {
  await tx.sql
    .insert(linkIndex)
    .values({ hash, firmId: tx.firmId, jobId, deliveryId, epoch })
    .onConflictDoNothing();
}

/** Where a link leads, before any firm is known; whether it still does, the delivery says. */
export async function linkTarget(tx: Transaction, hash: string): Promise<LinkTarget | null> {
  const { rows } = await tx.sql.execute<{
    firm_id: string;
    job_id: string;
    delivery_id: string;
    epoch: number;
  }>(sql`select firm_id, job_id, delivery_id, epoch from delivery_of_link(${hash})`);
  const row = rows[0];
  return row === undefined
    ? null
    : { firmId: row.firm_id, jobId: row.job_id, deliveryId: row.delivery_id, epoch: row.epoch };
}
