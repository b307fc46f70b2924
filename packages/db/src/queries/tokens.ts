import { and, eq, gt, isNull, sql } from 'drizzle-orm';
import type { Transaction } from '../database.ts';
import { person, token } from '../schema/index.ts';
import type { TokenPurpose } from '../schema/sign-in.ts';

export interface NewToken {
  /** What the queue carries; the secret that was mailed is derived from it by whoever holds the key. */
  id: string;
  hash: string;
  purpose: TokenPurpose;
  personId?: string;
  firmId?: string;
  invitationId?: string;
  expiresAt: Date;
}

export async function createToken(tx: Transaction, values: NewToken): Promise<void> {
  await tx.sql.insert(token).values(values);
}

/**
 * Takes up a token that is neither used nor expired: true once, for one of all who try. Together with what the token
 * is for, in one transaction.
 */
export async function useToken(
  tx: Transaction,
  hash: string,
  purpose: TokenPurpose,
): Promise<{ personId: string | null; firmId: string | null; invitationId: string | null } | null> {
  const [used] = await tx.sql
    .update(token)
    .set({ usedAt: sql`now()` })
    .where(
      and(
        eq(token.hash, hash),
        eq(token.purpose, purpose),
        isNull(token.usedAt),
        gt(token.expiresAt, sql`now()`),
      ),
    )
    .returning({ personId: token.personId, firmId: token.firmId, invitationId: token.invitationId });
  return used ?? null;
}

/** Ends the open tokens of a person for a purpose, as when a password has been changed. */
export async function endTokensOf(tx: Transaction, personId: string, purpose: TokenPurpose): Promise<void> {
  await tx.sql
    .delete(token)
    .where(and(eq(token.personId, personId), eq(token.purpose, purpose), isNull(token.usedAt)));
}

export interface TokenToMail {
  id: string;
  hash: string;
  purpose: TokenPurpose;
  person: { id: string; email: string; name: string } | null;
  firmId: string | null;
  invitationId: string | null;
  expiresAt: Date;
  usedAt: Date | null;
}

/** For the worker, who mails it. */
export async function tokenToMail(tx: Transaction, id: string): Promise<TokenToMail | null> {
  const [found] = await tx.sql
    .select({
      id: token.id,
      hash: token.hash,
      purpose: token.purpose,
      person: { id: person.id, email: person.email, name: person.name },
      firmId: token.firmId,
      invitationId: token.invitationId,
      expiresAt: token.expiresAt,
      usedAt: token.usedAt,
    })
    .from(token)
    .leftJoin(person, eq(person.id, token.personId))
    .where(eq(token.id, id));
  return found ?? null;
}
