import { randomUUID } from 'node:crypto';

/** A Message-ID under the domain that the mail comes from. */
export function messageIdFor(mailFrom: string): string {
  const domain = /@([\w.-]+)/.exec(mailFrom)?.[1] ?? 'farlug.invalid';
  return `<${randomUUID()}@${domain}>`;
}
