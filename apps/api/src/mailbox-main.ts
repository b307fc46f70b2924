import { z } from 'zod';
import { MailStore } from './features/mailbox/mail-store.ts';
import { startSmtpSink } from './features/mailbox/smtp-sink.ts';
import { createLogger } from './platform/logger.ts';

// A mail server by itself, for a trial of a deployment: it keeps every message and sends none on.
const settings = z.object({
  MAILBOX_HOST: z.string().default('127.0.0.1'),
  MAILBOX_PORT: z.coerce.number().int().min(1).max(65535).default(8441),
  MAILBOX_DIR: z.string(),
});

const given = settings.safeParse(process.env);
if (!given.success) {
  const problems = given.error.issues.map(({ path, message }) => `  ${path.join('.')}: ${message}\n`);
  process.stderr.write(`The mail sink cannot start:\n${problems.join('')}`);
  process.exit(78);
}
const log = createLogger('info');
const { MAILBOX_HOST: host, MAILBOX_PORT: port, MAILBOX_DIR: directory } = given.data;
const sink = await startSmtpSink({ host, port }, new MailStore(directory), log);
log.info({ host, port, directory }, 'the mail sink listens');

for (const signal of ['SIGTERM', 'SIGINT'] as const)
  process.on(signal, () => void sink.close().then(() => process.exit(0)));
