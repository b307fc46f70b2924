import { type Attempt, firmSettings, invitationToMail, type QueuePayloads, tokenToMail } from '@farlug/db';
import { type AccountLetterFacts, accountLetter } from '../mail/account-letter.ts';
import { sendBySmtp } from '../mail/smtp-send.ts';
import { accountToken } from '../platform/account-token.ts';
import type { WorkerDeps } from './worker-deps.ts';

/**
 * Mails an invitation or a password reset. The Message-ID follows from the token, so that a message that was sent
 * twice after a crash is one. Throws where another attempt is worth it.
 */
export async function sendAccountMail(
  deps: WorkerDeps,
  { tokenId }: QueuePayloads['send-account-mail'],
  attempt: Attempt,
): Promise<void> {
  const facts = await factsOf(deps, tokenId);
  if (facts === null) return;
  const outcome = await sendBySmtp(deps.config.smtpUrl, accountLetter(facts));
  deps.log.info({ tokenId, purpose: facts.purpose, outcome: outcome.kind }, 'account mail');
  if (outcome.kind === 'sent') return;
  const worthIt = outcome.kind === 'lost' || outcome.retry;
  if (worthIt && !attempt.last) throw new Error(outcome.reason);
  deps.log.error({ tokenId, reason: outcome.reason }, 'an account mail could not be sent');
}

/** Null where the token was used or has ended meanwhile. */
async function factsOf({ db, config }: WorkerDeps, tokenId: string): Promise<AccountLetterFacts | null> {
  const token = await db.global((tx) => tokenToMail(tx, tokenId));
  if (token === null || token.usedAt !== null || token.expiresAt <= new Date()) return null;
  const secret = accountToken(config.linkSecret, token.id);
  const domain = /@([\w.-]+)/.exec(config.mailFrom)?.[1] ?? 'farlug.invalid';
  const common = { from: config.mailFrom, messageId: `<${token.id}@${domain}>`, expiresAt: token.expiresAt };
  if (token.purpose === 'reset') {
    if (!token.person) return null;
    return {
      ...common,
      purpose: 'reset',
      to: { name: token.person.name, address: token.person.email },
      link: `${config.publicUrl}/reset#${secret}`,
    };
  }
  const { firmId, invitationId } = token;
  if (firmId === null || invitationId === null) return null;
  return db.withFirm(firmId, null, async (tx) => {
    const invitation = await invitationToMail(tx, invitationId);
    const firm = await firmSettings(tx);
    if (!invitation?.open || !firm) return null;
    return {
      ...common,
      purpose: 'invite',
      to: { name: invitation.email, address: invitation.email },
      firmName: firm.name,
      role: invitation.role,
      link: `${config.publicUrl}/invitation#${secret}`,
    };
  });
}
