import type { FirmRole } from '@farlug/contract/route';
import { letterHtml } from './letter-html.ts';
import type { Letter } from './smtp-send.ts';

export type AccountLetterFacts = {
  from: string;
  to: { name: string; address: string };
  messageId: string;
  link: string;
  expiresAt: Date;
} & ({ purpose: 'invite'; firmName: string; role: FirmRole } | { purpose: 'reset' });

const ROLES: Record<FirmRole, string> = {
  admin: 'an administrator',
  contractor: 'a contractor',
  estimator: 'an estimator',
};

/** An invitation to a firm, or the way to a new password. */
export function accountLetter(facts: AccountLetterFacts): Letter {
  const until = `The link works once, until ${facts.expiresAt.toISOString().slice(0, 16).replace('T', ' ')} UTC:\n${facts.link}`;
  const paragraphs =
    facts.purpose === 'invite'
      ? [
          `${facts.firmName} invites you to Farlug as ${ROLES[facts.role]}.`,
          until,
          'If you do not know the firm, leave this message alone; nothing happens then.',
        ]
      : [
          'Somebody, most likely you, asked for a new password for your Farlug account.',
          until,
          'If it was not you, leave this message alone; your password stays as it is.',
        ];
  return {
    from: facts.from,
    to: facts.to,
    subject:
      facts.purpose === 'invite' ? `${facts.firmName} invites you to Farlug` : 'A new password for Farlug',
    text: `${paragraphs.join('\n\n')}\n`,
    html: letterHtml(paragraphs),
    messageId: facts.messageId,
    attachments: [],
  };
}
