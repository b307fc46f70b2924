import type { FirmRole } from '@farlug/contract/route';
import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import type { FirmTransaction, Transaction } from '../database.ts';
import { invitation, token } from '../schema/index.ts';

export interface Invitation {
  id: string;
  email: string;
  role: FirmRole;
  expiresAt: Date;
}
const open = (tx: FirmTransaction) =>
  and(eq(invitation.firmId, tx.firmId), isNull(invitation.acceptedAt), isNull(invitation.withdrawnAt));

/** Those that are neither accepted nor withdrawn, the expired among them. */
export async function listInvitations(tx: FirmTransaction): Promise<Invitation[]> {
  return tx.sql
    .select({
      id: invitation.id,
      email: invitation.email,
      role: invitation.role,
      expiresAt: invitation.expiresAt,
    })
    .from(invitation)
    .where(open(tx))
    .orderBy(asc(invitation.createdAt), asc(invitation.id));
}

/** A new invitation takes the place of an open one to the same address. */
export async function createInvitation(
  tx: FirmTransaction,
  values: Invitation & { invitedBy: string },
): Promise<void> {
  const earlier = await tx.sql
    .select({ id: invitation.id })
    .from(invitation)
    .where(and(open(tx), eq(sql`lower(${invitation.email})`, values.email.toLowerCase())));
  for (const { id } of earlier) await withdrawInvitation(tx, id);
  await tx.sql.insert(invitation).values({ firmId: tx.firmId, ...values });
}

/** Its link ends with it. False where there is no such open invitation. */
export async function withdrawInvitation(tx: FirmTransaction, id: string): Promise<boolean> {
  const withdrawn = await tx.sql
    .update(invitation)
    .set({ withdrawnAt: sql`now()` })
    .where(and(open(tx), eq(invitation.id, id)))
    .returning({ id: invitation.id });
  await tx.sql
    .delete(token)
    .where(and(eq(token.firmId, tx.firmId), eq(token.invitationId, id), isNull(token.usedAt)));
  return withdrawn.length > 0;
}

/** False where it was accepted or withdrawn in the meantime. */
export async function acceptInvitation(tx: FirmTransaction, id: string): Promise<boolean> {
  const accepted = await tx.sql
    .update(invitation)
    .set({ acceptedAt: sql`now()` })
    .where(and(open(tx), eq(invitation.id, id)))
    .returning({ id: invitation.id });
  return accepted.length > 0;
}

/** For the worker, who mails it. */
export async function invitationToMail(
  tx: FirmTransaction,
  id: string,
): Promise<(Invitation & { open: boolean }) | null> {
  const [found] = await tx.sql
    .select({
      id: invitation.id,
      email: invitation.email,
      role: invitation.role,
      expiresAt: invitation.expiresAt,
      open: sql<boolean>`${invitation.acceptedAt} is null and ${invitation.withdrawnAt} is null`,
    })
    .from(invitation)
    .where(and(eq(invitation.firmId, tx.firmId), eq(invitation.id, id)));
  return found ?? null;
}

export interface TokenInvitation extends Invitation {
  firmId: string;
  firmName: string;
  state: 'open' | 'expired' | 'accepted' | 'withdrawn';
}

/** By the hash of the token that was mailed, before any firm is known. */
export async function invitationOfToken(tx: Transaction, hash: string): Promise<TokenInvitation | null> {
  const { rows } = await tx.sql.execute<{
    firm_id: string;
    firm_name: string;
    invitation_id: string;
    email: string;
    role: FirmRole;
    expires_at: string;
    state: TokenInvitation['state'];
  }>(sql`select firm_id, firm_name, invitation_id, email, role, expires_at,
      case when withdrawn_at is not null then 'withdrawn' when accepted_at is not null then 'accepted'
        when expires_at <= now() then 'expired' else 'open' end as state
    from invitation_of_token(${hash})`);
  const row = rows[0];
  return row === undefined
    ? null
    : {
        firmId: row.firm_id,
        firmName: row.firm_name,
        id: row.invitation_id,
        email: row.email,
        role: row.role,
        expiresAt: new Date(row.expires_at),
        state: row.state,
      };
}
