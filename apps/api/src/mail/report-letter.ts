import { NOTICES } from '@farlug/contract/notices';
import type { ReportDigest, RevisionInput } from '@farlug/contract/routes';
import { letterHtml } from './letter-html.ts';
import type { Letter } from './smtp-send.ts';

export interface ReportLetterFacts {
  from: string;
  to: { name: string; address: string };
  messageId: string;
  message: string;
  input: RevisionInput;
  digest: ReportDigest;
  revisionLetter: string;
  sha256: string;
  solverVersion: string;
  link: string;
  linkExpiresAt: Date;
  pdf: { name: string; bytes: Buffer };
}

/** The report as it goes to an inspector: what it is, what it found, the personal link, the cautions. */
export function reportLetter(facts: ReportLetterFacts): Letter {
  const { input, digest, revisionLetter, link } = facts;
  const block = input.titleBlock;
  const { counts } = digest;
  const over = counts.over + counts.rise;
  const found = [
    over === 0
      ? 'No circuit is beyond the limits that were set'
      : `${circuits(over)} beyond the limits that were set`,
    `${counts.near} near a limit`,
    `${counts.within} within`,
    ...(counts.unserved > 0 ? [`${counts.unserved} without supply in this scenario`] : []),
    ...(counts.unjudged > 0 ? [`${counts.unjudged} without a limit to be judged by`] : []),
  ].join(', ');
  const limits = input.job.limits;
  const paragraphs = [
    `To ${facts.to.name}`,
    ...(facts.message.trim() === '' ? [] : [facts.message.trim()]),
    `Voltage drop report, revision ${revisionLetter}, of ${block.job}${block.address ? `, ${block.address}` : ''}${block.permitNumber ? `, permit ${block.permitNumber}` : ''}. Issued ${day(block.issuedAt)} by ${block.issuedBy}, ${block.firm}.`,
    `${found}. Limits: ${limits.basis ?? 'as set for the job'}, ${limits.force === 'mandatory' ? 'mandatory' : 'a recommendation'}. Voltages are computed by node equations of the whole network.`,
    `The report is attached and stands alone. To read it on a page and to record a decision, open this personal link; no account is needed, and it is good until ${day(facts.linkExpiresAt.toISOString())}:\n${link}`,
    `Input ${facts.sha256.slice(0, 12)}, solver ${facts.solverVersion}.`,
    NOTICES.join('\n'),
    ...(input.firmWording.trim() === '' ? [] : [input.firmWording.trim()]),
  ];
  return {
    from: facts.from,
    to: facts.to,
    subject: `${block.job}: voltage drop report, revision ${revisionLetter}`,
    text: `${paragraphs.join('\n\n')}\n`,
    html: letterHtml(paragraphs),
    messageId: facts.messageId,
    attachments: [{ filename: facts.pdf.name, content: facts.pdf.bytes, contentType: 'application/pdf' }],
  };
}

const circuits = (count: number): string => (count === 1 ? 'One circuit is' : `${count} circuits are`);
const day = (instant: string): string => instant.slice(0, 10);
