import { and, asc, eq, inArray, sql } from 'drizzle-orm';
import type { FirmTransaction, Transaction } from '../database.ts';
import { delivery } from '../schema/index.ts';

type Stored = typeof delivery.$inferSelect;
export type DeliveryRow = Omit<Stored, 'firmId' | 'jobId'>;
export type StoredDeliveryState = Stored['state'];

const ofJob = (tx: FirmTransaction, jobId: string) =>
  and(eq(delivery.firmId, tx.firmId), eq(delivery.jobId, jobId));
const thisOne = (tx: FirmTransaction, jobId: string, id: string) =>
  and(ofJob(tx, jobId), eq(delivery.id, id));

function withoutOwner({ firmId: _firm, jobId: _job, ...row }: Stored): DeliveryRow {
  return row;
}

export async function listDeliveries(tx: FirmTransaction, jobId: string): Promise<DeliveryRow[]> {
  const rows = await tx.sql
    .select()
    .from(delivery)
    .where(ofJob(tx, jobId))
    .orderBy(asc(delivery.queuedAt), asc(delivery.id));
  return rows.map(withoutOwner);
}

export async function deliveryById(
  tx: FirmTransaction,
  jobId: string,
  id: string,
): Promise<DeliveryRow | null> {
  const [found] = await tx.sql
    .select()
    .from(delivery)
    .where(thisOne(tx, jobId, id));
  return found ? withoutOwner(found) : null;
}

export interface NewDelivery {
  id: string;
  revisionId: string;
  recipientName: string;
  recipientEmail: string;
  message: string;
  messageId: string;
  queuedBy: string;
  linkExpiresAt: Date;
}

/** False where a delivery of this id exists already. */
export async function createDelivery(
  tx: FirmTransaction,
  jobId: string,
  values: NewDelivery,
): Promise<boolean> {
  const made = await tx.sql
    .insert(delivery)
    .values({ firmId: tx.firmId, jobId, state: 'queued', ...values })
    .onConflictDoNothing({ target: [delivery.firmId, delivery.jobId, delivery.id] })
    .returning({ id: delivery.id });
  return made.length > 0;
}

/** Moves a delivery from one of the states `from`, in one statement; null where it is in none of them. */
async function move(
  tx: FirmTransaction,
  jobId: string,
  id: string,
  from: readonly StoredDeliveryState[],
  values: Record<string, unknown>,
): Promise<DeliveryRow | null> {
  const [moved] = await tx.sql
    .update(delivery)
    .set(values)
    .where(and(thisOne(tx, jobId, id), inArray(delivery.state, [...from])))
    .returning();
  return moved ? withoutOwner(moved) : null;
}

/**
 * Takes a queued delivery up. Commit this before a byte of the message goes out: a delivery that is found `sending`
 * later was cut off, and nobody knows how far it got.
 */
export const beginSending = (tx: FirmTransaction, jobId: string, id: string) =>
  move(tx, jobId, id, ['queued'], {
    state: 'sending',
    attempts: sql`${delivery.attempts} + 1`,
    sendingAt: sql`now()`,
    lastError: null,
  });

/** The server has taken the message. */
export const markSent = (tx: FirmTransaction, jobId: string, id: string) =>
  move(tx, jobId, id, ['sending'], { state: 'sent', sentAt: sql`now()`, lastError: null });

/** Refused before the message went out, and worth another attempt. */
export const backToQueue = (tx: FirmTransaction, jobId: string, id: string, lastError: string) =>
  move(tx, jobId, id, ['sending'], { state: 'queued', lastError });

/** Refused for good, or tried often enough. */
export const markFailed = (tx: FirmTransaction, jobId: string, id: string, lastError: string) =>
  move(tx, jobId, id, ['queued', 'sending'], { state: 'failed', lastError });

/** Cut off while the message went out: it is never tried again by itself. */
export const markUncertain = (tx: FirmTransaction, jobId: string, id: string, lastError: string) =>
  move(tx, jobId, id, ['sending'], { state: 'uncertain', lastError });

/** A person sends it once more, with the same Message-ID. */
export const resend = (tx: FirmTransaction, jobId: string, id: string) =>
  move(tx, jobId, id, ['uncertain', 'failed'], { state: 'queued', queuedAt: sql`now()` });

/** A new link in a new message: the links of earlier epochs lead nowhere from now on. */
export const renewLink = (
  tx: FirmTransaction,
  jobId: string,
  id: string,
  { linkExpiresAt, messageId }: { linkExpiresAt: Date; messageId: string },
) =>
  move(tx, jobId, id, ['queued', 'sent', 'failed', 'uncertain'], {
    state: 'queued',
    queuedAt: sql`now()`,
    epoch: sql`${delivery.epoch} + 1`,
    linkExpiresAt,
    linkRevokedAt: null,
    messageId,
  });

export const revokeLink = (tx: FirmTransaction, jobId: string, id: string) =>
  move(tx, jobId, id, ['queued', 'sending', 'sent', 'failed', 'uncertain'], {
    linkRevokedAt: sql`coalesce(${delivery.linkRevokedAt}, now())`,
  });

/** The first time that the recipient followed the link. */
export const markOpened = (tx: FirmTransaction, jobId: string, id: string) =>
  move(tx, jobId, id, ['queued', 'sending', 'sent', 'failed', 'uncertain'], {
    openedAt: sql`coalesce(${delivery.openedAt}, now())`,
  });

/** Deliveries of all firms that were being sent before `since`: for the worker, when it starts. */
export async function deliveriesLeftSending(
  tx: Transaction,
  since: Date,
): Promise<{ firmId: string; jobId: string; deliveryId: string }[]> {
  const { rows } = await tx.sql.execute<{ firm_id: string; job_id: string; delivery_id: string }>(
    sql`select firm_id, job_id, delivery_id from deliveries_left_sending(${since.toISOString()})`,
  );
  return rows.map((row) => ({ firmId: row.firm_id, jobId: row.job_id, deliveryId: row.delivery_id }));
}
