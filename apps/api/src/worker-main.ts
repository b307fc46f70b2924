import { createDatabase } from '@farlug/db';
import { readConfig } from './config.ts';
import { renderReport } from './pdf/render-report.tsx';
import { createLogger } from './platform/logger.ts';
import { startWorker } from './worker/start-worker.ts';

const SECONDS_TO_FINISH = 25;

const outcome = readConfig(process.env);
if (!outcome.ok) {
  process.stderr.write(
    `The worker cannot start:\n${outcome.problems.map((problem) => `  ${problem}\n`).join('')}`,
  );
  process.exit(78);
}
const { config } = outcome;
const log = createLogger(config.logLevel);
const url = config.workerDatabaseUrl ?? config.databaseUrl;
const db = createDatabase(url, { connections: 4 });

const worker = await startWorker({ config, db, log, render: renderReport }, url).catch((error: unknown) => {
  log.fatal({ err: error }, 'the worker cannot start');
  process.exit(1);
});
log.info('the worker waits for work');

let stopping = false;
async function stop(signal: string): Promise<void> {
  if (stopping) return;
  stopping = true;
  log.info({ signal }, 'the worker stops');
  setTimeout(() => process.exit(1), SECONDS_TO_FINISH * 1000).unref();
  await worker.stop();
  await db.close();
  process.exit(0);
}
for (const signal of ['SIGTERM', 'SIGINT'] as const) process.on(signal, () => void stop(signal));
