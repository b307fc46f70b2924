import { listMail, openAttachment, readMail } from '@farlug/contract/routes';
import type { Frame } from '../../http/frame.ts';
import { MailStore } from './mail-store.ts';
import { attachmentOf, listMessages, readMessage } from './mailbox-service.ts';

export function registerMailbox({ deps, mount }: Frame): void {
  const store = new MailStore(deps.config.mailboxDir);
  mount(listMail, async () => ({ messages: await listMessages(store) }));
  mount(readMail, ({ params }) => readMessage(store, params.message));
  mount(openAttachment, ({ params }) => attachmentOf(store, params.message, params.index));
}
