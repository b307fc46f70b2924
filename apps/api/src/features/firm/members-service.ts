import { randomUUID } from 'node:crypto';
import type { FirmRole } from '@farlug/contract/route';
import {
  createInvitation,
  createToken,
  enqueue,
  listMembers,
  type MemberResult,
  recordAudit,
  removeMember as removeMemberRow,
  setMemberRole,
  withdrawInvitation,
} from '@farlug/db';
import type { Deps } from '../../deps.ts';
import { accountToken, tokenHash } from '../../platform/account-token.ts';
import type { Member } from '../../platform/caller.ts';
import { refuse, refuseField } from '../../platform/refusal.ts';
import { changeFirm } from './firm-service.ts';

const INVITATION_MS = 7 * 24 * 3600_000;

/** Mails an invitation; a new one takes the place of an open one to the same address. */
export function invite(deps: Deps, member: Member, { email, role }: { email: string; role: FirmRole }) {
  return changeFirm(deps, member, async (tx) => {
    if ((await listMembers(tx)).some((known) => known.email.toLowerCase() === email))
      throw refuseField('conflict', 'email', 'This person belongs to the firm already.');
    const invitationId = randomUUID();
    const tokenId = randomUUID();
    const expiresAt = new Date(deps.now().getTime() + INVITATION_MS);
    await createInvitation(tx, { id: invitationId, email, role, expiresAt, invitedBy: member.person.id });
    await createToken(tx, {
      id: tokenId,
      hash: tokenHash(accountToken(deps.config.linkSecret, tokenId)),
      purpose: 'invite',
      firmId: member.firmId,
      invitationId,
      expiresAt,
    });
    await enqueue(tx, 'send-account-mail', { tokenId });
    await recordAudit(tx, `invited as ${role}`, email);
  });
}

export function withdraw(deps: Deps, member: Member, invitationId: string) {
  return changeFirm(deps, member, async (tx) => {
    if (!(await withdrawInvitation(tx, invitationId)))
      throw refuse('not_found', 'There is no such open invitation in this firm.');
    await recordAudit(tx, 'withdrew an invitation', invitationId);
  });
}

export function setRole(deps: Deps, member: Member, personId: string, role: FirmRole) {
  return changeFirm(deps, member, async (tx) => {
    refuseUnlessDone(await setMemberRole(tx, personId, role));
    await recordAudit(tx, `made ${role}`, personId);
  });
}

export function removeMember(deps: Deps, member: Member, personId: string) {
  return changeFirm(deps, member, async (tx) => {
    refuseUnlessDone(await removeMemberRow(tx, personId));
    await recordAudit(tx, 'removed from the firm', personId);
  });
}

function refuseUnlessDone(result: MemberResult): void {
  if (result === 'missing') throw refuse('not_found', 'There is no such person in this firm.');
  if (result === 'last-administrator')
    throw refuse('conflict', 'This is the last administrator of the firm. Make somebody else one first.');
}
