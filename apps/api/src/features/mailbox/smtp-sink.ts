import { once } from 'node:events';
import type { AddressInfo } from 'node:net';
import { SMTPServer } from 'smtp-server';
import type { Logger } from '../../platform/logger.ts';
import type { MailStore } from './mail-store.ts';

const MESSAGE_BYTES_MAX = 40 * 1024 * 1024;

export interface SmtpSink {
  port: number;
  close: () => Promise<void>;
}

/** A real SMTP server that keeps whatever it is given and passes nothing on. */
export async function startSmtpSink(
  { host, port }: { host: string; port: number },
  store: MailStore,
  log: Logger,
): Promise<SmtpSink> {
  const server = new SMTPServer({
    name: 'mailbox.invalid',
    banner: 'Farlug local mailbox',
    authOptional: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    size: MESSAGE_BYTES_MAX,
    disableReverseLookup: true,
    onData(stream, _session, done) {
      const parts: Buffer[] = [];
      stream.on('data', (part: Buffer) => parts.push(part));
      stream.once('error', done);
      stream.once('end', () => {
        if (stream.sizeExceeded) {
          done(Object.assign(new Error('The message is too large.'), { responseCode: 552 }));
          return;
        }
        store.keep(Buffer.concat(parts), new Date()).then(
          (id) => done(null, `kept as ${id}`),
          (error: Error) => done(error),
        );
      });
    },
  });
  server.on('error', (error) => log.warn({ err: error }, 'local mail server'));
  const listening = once(server.server, 'listening');
  server.listen(port, host);
  await listening;
  return {
    port: (server.server.address() as AddressInfo).port,
    close: () => new Promise((resolve) => server.close(() => resolve())),
  };
}
