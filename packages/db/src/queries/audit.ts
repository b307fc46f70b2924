import { randomUUID } from 'node:crypto';
import { and, desc, eq, lt, sql } from 'drizzle-orm';
import type { FirmTransaction } from '../database.ts';
import { auditEvent, person } from '../schema/index.ts';

/** In milliseconds, as a page's last time comes back from a browser. */
const NOW = sql`date_trunc('milliseconds', clock_timestamp())`;

/** Records who did what to whom, in the transaction that does it. */
export async function recordAudit(tx: FirmTransaction, what: string, subject: string): Promise<void> {
  await tx.sql
    .insert(auditEvent)
    .values({ firmId: tx.firmId, id: randomUUID(), at: NOW, personId: tx.personId, what, subject });
}

export interface AuditEvent {
  at: Date;
  person: string | null;
  what: string;
  subject: string;
}

/** Newest first; `before` is the time of the last event of the page before. */
export async function listAudit(
  tx: FirmTransaction,
  { before, limit = 100 }: { before?: Date; limit?: number } = {},
): Promise<AuditEvent[]> {
  return tx.sql
    .select({ at: auditEvent.at, person: person.name, what: auditEvent.what, subject: auditEvent.subject })
    .from(auditEvent)
    .leftJoin(person, eq(person.id, auditEvent.personId))
    .where(and(eq(auditEvent.firmId, tx.firmId), before && lt(auditEvent.at, before)))
    .orderBy(desc(auditEvent.at), desc(auditEvent.id))
    .limit(limit);
}
