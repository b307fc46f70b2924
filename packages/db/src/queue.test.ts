import { randomUUID } from 'node:crypto';
import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { enqueue, type QueueWorker, startQueueWorker } from './queue.ts';
import { type TestDatabase, withTestDatabase } from './testing/index.ts';

let database: TestDatabase;
let worker: QueueWorker;
const errors: Error[] = [];
beforeAll(async () => {
  database = await withTestDatabase();
  worker = await startQueueWorker(database.workerUrl, (error) => errors.push(error));
});
afterAll(async () => {
  await worker.stop();
  await database.close();
  expect(errors).toEqual([]);
});

const payloadOf = () => ({ firmId: randomUUID(), jobId: randomUUID(), revisionId: randomUUID() });

/** What the queues hold, as the owner sees it. */
const held = (id: string) =>
  database.asOwner(`select state::text from pgboss.job where data::text like $1`, [`%${id}%`]);

test('work that is sent in a transaction exists when it commits, and not when it does not', async () => {
  const [kept, dropped] = [payloadOf(), payloadOf()];
  await database.db.global(async (tx) => {
    await enqueue(tx, 'render-report', kept);
    expect(await held(kept.revisionId)).toEqual([]);
  });
  const failing = database.db.global(async (tx) => {
    await enqueue(tx, 'render-report', dropped);
    throw new Error('changed my mind');
  });
  await expect(failing).rejects.toThrow('changed my mind');
  expect(await held(kept.revisionId)).toEqual([{ state: 'created' }]);
  expect(await held(dropped.revisionId)).toEqual([]);
});

test('the worker takes it up, is told of the attempt, and it is tried again when that fails', async () => {
  const deliveryId = randomUUID();
  await database.asOwner(`update pgboss.queue set retry_delay = 0 where name = 'send-report'`);
  const attempts: unknown[] = [];
  const done = new Promise<void>((resolve) => {
    void worker.work('send-report', async (payload, attempt) => {
      attempts.push([payload.deliveryId, attempt]);
      if (attempt.number === 1) throw new Error('the server is busy');
      resolve();
    });
  });
  await database.db.withFirm(randomUUID(), null, (tx) =>
    enqueue(tx, 'send-report', { firmId: tx.firmId, jobId: randomUUID(), deliveryId }),
  );
  await done;
  expect(attempts).toEqual([
    [deliveryId, { number: 1, last: false }],
    [deliveryId, { number: 2, last: false }],
  ]);
  await expect.poll(() => held(deliveryId)).toEqual([{ state: 'completed' }]);
});

test('work that is to wait is not taken up at once', async () => {
  const tokenId = randomUUID();
  await database.db.global((tx) => enqueue(tx, 'send-account-mail', { tokenId }, { startAfterS: 3600 }));
  const [found] = await database.asOwner(
    `select start_after > now() + interval '50 minutes' as later from pgboss.job where data::text like $1`,
    [`%${tokenId}%`],
  );
  expect(found).toEqual({ later: true });
});

test('the api sends and does not look: payloads, states and queues are not its business', async () => {
  for (const statement of [
    sql`select data from pgboss.job`,
    sql`update pgboss.job set state = 'completed'`,
    sql`delete from pgboss.job`,
    sql`insert into pgboss.queue (name) values ('mine')`,
    sql`select pgboss.create_queue('mine', '{}')`,
  ]) {
    const attempt = database.db.global((tx) => tx.sql.execute(statement));
    await expect(attempt).rejects.toMatchObject({ cause: { code: '42501' } });
  }
});
