import { once } from 'node:events';
import { createServer } from 'node:http';
import { createDatabase, removeOldCounters } from '@farlug/db';
import { createApp } from './app.ts';
import { readConfig } from './config.ts';
import { seedDemo } from './demo/seed-demo.ts';
import type { Deps } from './deps.ts';
import { MailStore } from './features/mailbox/mail-store.ts';
import { startSmtpSink } from './features/mailbox/smtp-sink.ts';
import { createLogger } from './platform/logger.ts';
import { RATE_LIMITS } from './platform/rate-limits.ts';

const SECONDS_TO_FINISH = 8;
const HOUR_MS = 3600_000;

const outcome = readConfig(process.env);
if (!outcome.ok) {
  process.stderr.write(
    `The api cannot start:\n${outcome.problems.map((problem) => `  ${problem}\n`).join('')}`,
  );
  process.exit(78);
}
const { config } = outcome;
const log = createLogger(config.logLevel);
const db = createDatabase(config.databaseUrl);
const deps: Deps = { config, db, log, now: () => new Date(), rateLimits: RATE_LIMITS };

const { server, sink } = await start().catch((error: unknown) => {
  log.fatal({ err: error }, 'the api cannot start');
  process.exit(1);
});
log.info({ address: config.publicUrl, host: config.host, port: config.port }, 'the api listens');

const tidying = setInterval(() => {
  db.global(removeOldCounters).catch((error: unknown) => log.warn({ err: error }, 'old counters stay'));
}, HOUR_MS);

async function start() {
  const mailbox = config.local
    ? await startSmtpSink(
        { host: '127.0.0.1', port: config.mailboxPort },
        new MailStore(config.mailboxDir),
        log,
      )
    : null;
  if (config.local) await seedDemo(deps);
  const http = createServer(createApp(deps));
  http.headersTimeout = 20_000;
  http.requestTimeout = 120_000;
  http.listen(config.port, config.host);
  await once(http, 'listening');
  return { server: http, sink: mailbox };
}

let stopping = false;
async function stop(signal: string): Promise<void> {
  if (stopping) return;
  stopping = true;
  log.info({ signal }, 'the api stops');
  setTimeout(() => process.exit(1), SECONDS_TO_FINISH * 1000).unref();
  clearInterval(tidying);
  const closed = once(server, 'close');
  server.close();
  server.closeIdleConnections();
  await closed;
  await sink?.close();
  await db.close();
  process.exit(0);
}
for (const signal of ['SIGTERM', 'SIGINT'] as const) process.on(signal, () => void stop(signal));
