import PgBoss from 'pg-boss';
import type { Transaction } from './database.ts';
import { QUEUE_SCHEMA, type QueueName, type QueuePayloads } from './queues.ts';

/** Only its way of writing a message is used: it runs in whichever transaction a message is sent in. */
const writer = new PgBoss({
  schema: QUEUE_SCHEMA,
  db: { executeSql: () => Promise.reject(new Error('a message is sent within a transaction')) },
});

/** Puts work on a queue; it is there when the transaction commits, and was never there when it does not. */
export async function enqueue<Q extends QueueName>(
  tx: Transaction,
  queue: Q,
  payload: QueuePayloads[Q],
  { startAfterS }: { startAfterS?: number } = {},
): Promise<void> {
  const executeSql = async (text: string, values: unknown[]) => {
    const { rows } = await tx.executor.executeSql(text, values);
    return { rows, rowCount: rows.length };
  };
  await writer.send(queue, payload, {
    db: { executeSql },
    ...(startAfterS ? { startAfter: startAfterS } : {}),
  });
}

export interface Attempt {
  /** 1 for the first. */
  number: number;
  /** No further attempt follows when this one throws. */
  last: boolean;
}
export interface QueueWorker {
  /** Work that throws is tried again, as often and as late as the queue says. */
  work<Q extends QueueName>(
    queue: Q,
    run: (payload: QueuePayloads[Q], attempt: Attempt) => Promise<void>,
  ): Promise<void>;
  /** Waits for what is being worked on. */
  stop(): Promise<void>;
}

/** Takes work off the queues, as the worker's role. Schema and queues are there already: see `migrate`. */
export async function startQueueWorker(
  workerUrl: string,
  onError: (error: Error) => void,
): Promise<QueueWorker> {
  const boss = new PgBoss({
    connectionString: workerUrl,
    schema: QUEUE_SCHEMA,
    migrate: false,
    schedule: false,
    max: 3,
  });
  boss.on('error', onError);
  await boss.start();
  return {
    work: async (queue, run) => {
      await boss.work<QueuePayloads[typeof queue]>(
        queue,
        { batchSize: 1, pollingIntervalSeconds: 0.5, includeMetadata: true },
        async ([job]) => {
          if (job === undefined) return;
          await run(job.data, { number: job.retryCount + 1, last: job.retryCount >= job.retryLimit });
        },
      );
    },
    stop: () => boss.stop({ graceful: true, timeout: 20_000 }),
  };
}
