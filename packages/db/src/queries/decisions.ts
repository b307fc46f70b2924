import { and, asc, eq } from 'drizzle-orm';
import type { FirmTransaction } from '../database.ts';
import { decision, delivery, person } from '../schema/index.ts';

type Stored = typeof decision.$inferSelect;
export type NewDecision = Omit<Stored, 'firmId' | 'jobId' | 'at'>;
export type DecisionRow = Omit<Stored, 'firmId' | 'jobId' | 'enteredBy'> & {
  /** Name of who entered it, for one that came on paper. */
  enteredBy: string | null;
  /** Name of whom the link was sent to, for one that came by link. */
  recipient: string | null;
};

/** False where a decision of this id is on record already; none is ever changed. */
export async function recordDecision(
  tx: FirmTransaction,
  jobId: string,
  values: NewDecision,
): Promise<boolean> {
  const made = await tx.sql
    .insert(decision)
    .values({ firmId: tx.firmId, jobId, ...values })
    .onConflictDoNothing({ target: [decision.firmId, decision.jobId, decision.id] })
    .returning({ id: decision.id });
  return made.length > 0;
}

/** In the order in which they came; of one revision, where it is named. */
export async function listDecisions(
  tx: FirmTransaction,
  jobId: string,
  revisionId?: string,
): Promise<DecisionRow[]> {
  return tx.sql
    .select({
      id: decision.id,
      revisionId: decision.revisionId,
      deliveryId: decision.deliveryId,
      decision: decision.decision,
      words: decision.words,
      comments: decision.comments,
      name: decision.name,
      title: decision.title,
      via: decision.via,
      at: decision.at,
      enteredBy: person.name,
      recipient: delivery.recipientName,
    })
    .from(decision)
    .leftJoin(person, eq(person.id, decision.enteredBy))
    .leftJoin(
      delivery,
      and(
        eq(delivery.firmId, decision.firmId),
        eq(delivery.jobId, decision.jobId),
        eq(delivery.id, decision.deliveryId),
      ),
    )
    .where(
      and(
        eq(decision.firmId, tx.firmId),
        eq(decision.jobId, jobId),
        revisionId === undefined ? undefined : eq(decision.revisionId, revisionId),
      ),
    )
    .orderBy(asc(decision.at), asc(decision.id));
}
