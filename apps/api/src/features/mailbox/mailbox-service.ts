import type { listMail, readMail } from '@farlug/contract/routes';
import type { AddressObject, ParsedMail } from 'mailparser';
import type { z } from 'zod';
import { type Refusal, refuse } from '../../platform/refusal.ts';
import type { MailStore, StoredMail } from './mail-store.ts';

const LISTED = 200;

export type MailSummary = z.input<typeof listMail.response>['messages'][number];
export type MailView = z.input<typeof readMail.response>;

export interface Attachment {
  name: string;
  type: string;
  bytes: Buffer;
  /** True where the browser may show it: a PDF, nothing that could run script. */
  inline: boolean;
}

export async function listMessages(store: MailStore): Promise<MailSummary[]> {
  return (await store.newest(LISTED)).map(summaryOf);
}

export async function readMessage(store: MailStore, id: string): Promise<MailView | Refusal> {
  const found = await store.read(id);
  if (found === null) return noMessage();
  return {
    ...summaryOf(found),
    text: found.mail.text ?? '',
    attachments: found.mail.attachments.map(({ filename, contentType, size }, index) => ({
      index,
      name: filename ?? `attachment-${index + 1}`,
      type: contentType,
      bytes: size,
    })),
  };
}

export async function attachmentOf(
  store: MailStore,
  id: string,
  index: number,
): Promise<Attachment | Refusal> {
  const attachment = (await store.read(id))?.mail.attachments[index];
  if (attachment === undefined) return noMessage();
  const isPdf = attachment.contentType === 'application/pdf';
  return {
    name: attachment.filename ?? `attachment-${index + 1}`,
    type: isPdf ? 'application/pdf' : 'application/octet-stream',
    bytes: attachment.content,
    inline: isPdf,
  };
}

const noMessage = () => refuse('not_found', 'There is no such message or attachment in the mailbox.');

function summaryOf({ id, mail }: StoredMail): MailSummary {
  return {
    id,
    from: mail.from?.text ?? '',
    to: addressesOf(mail.to),
    subject: mail.subject ?? '',
    at: receivedAt(id, mail).toISOString(),
  };
}

function addressesOf(to: ParsedMail['to']): string[] {
  const objects: AddressObject[] = to === undefined ? [] : Array.isArray(to) ? to : [to];
  return objects.flatMap(({ value }) => value.flatMap(({ address }) => address ?? []));
}

const receivedAt = (id: string, mail: ParsedMail) => mail.date ?? new Date(Number(id.slice(0, 13)));
