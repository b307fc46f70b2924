import { randomUUID } from 'node:crypto';
import fc from 'fast-check';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { makeDelivery, makeFirm, makeJob, makeRevision, type TestFirm } from '../../test/factories.ts';
import type { FirmTransaction } from '../database.ts';
import { type TestDatabase, withTestDatabase } from '../testing/index.ts';
import { listDecisions, type NewDecision, recordDecision } from './decisions.ts';
import {
  backToQueue,
  beginSending,
  createDelivery,
  deliveriesLeftSending,
  deliveryById,
  markFailed,
  markOpened,
  markSent,
  markUncertain,
  renewLink,
  resend,
  revokeLink,
} from './deliveries.ts';
import { addLink, linkTarget } from './links.ts';
import {
  failPdf,
  isSuperseded,
  listRevisions,
  readPdf,
  revisionById,
  revisionContent,
  savePdf,
} from './revisions.ts';

let database: TestDatabase;
let firm: TestFirm;
let jobId: string;
let revisionId: string;
beforeAll(async () => {
  database = await withTestDatabase();
  firm = await makeFirm(database.db);
});
afterAll(() => database.close());
beforeEach(async () => {
  jobId = await makeJob(database.db, firm);
  revisionId = await makeRevision(database.db, firm, jobId);
});

const inFirm = <T>(run: (tx: FirmTransaction) => Promise<T>) =>
  database.db.withFirm(firm.firmId, firm.personId, run);
const asWorker = <T>(run: (tx: FirmTransaction) => Promise<T>) =>
  database.worker.withFirm(firm.firmId, null, run);

test('revisions are numbered, listed newest first and keep what was pinned', async () => {
  const second = await makeRevision(database.db, firm, jobId);
  const list = await inFirm((tx) => listRevisions(tx, jobId));
  expect(list.map(({ id, no }) => [id, no])).toEqual([
    [second, 2],
    [revisionId, 1],
  ]);
  expect(list[1]).toMatchObject({
    issuedBy: 'Ida Marlow',
    pdf: 'waiting',
    within: 8,
    deliveries: [],
    decisions: [],
  });
  expect(await asWorker((tx) => revisionContent(tx, jobId, revisionId))).toMatchObject({
    input: { format: 'farlug-revision/1' },
    no: 1,
  });
  expect(await inFirm((tx) => revisionById(tx, jobId, randomUUID()))).toBeNull();
  expect(await inFirm((tx) => isSuperseded(tx, jobId, 1))).toBe(true);
  expect(await inFirm((tx) => isSuperseded(tx, jobId, 2))).toBe(false);
});

test('what was pinned comes back value by value, so that its hash can be made again', async () => {
  await fc.assert(
    fc.asyncProperty(fc.jsonValue({ stringUnit: 'grapheme' }), fc.double(), async (value, number) => {
      const input = JSON.parse(JSON.stringify({ value, number }).replaceAll('\\u0000', ''));
      const id = await makeRevision(database.db, firm, jobId, input);
      expect(await inFirm((tx) => revisionContent(tx, jobId, id))).toMatchObject({ input });
    }),
    { numRuns: 40 },
  );
});

test('the worker stores the printed form once', async () => {
  expect(await inFirm((tx) => readPdf(tx, jobId, revisionId))).toMatchObject({ state: 'waiting', pdf: null });
  await asWorker((tx) => failPdf(tx, jobId, revisionId, 'no font'));
  expect(await inFirm((tx) => readPdf(tx, jobId, revisionId))).toMatchObject({ lastError: 'no font' });
  const pdf = Buffer.from([0x25, 0, 0xff, 0x0a]);
  await asWorker((tx) => savePdf(tx, jobId, revisionId, pdf));
  await asWorker((tx) => savePdf(tx, jobId, revisionId, Buffer.from('another')));
  await asWorker((tx) => failPdf(tx, jobId, revisionId, 'late'));
  expect(await inFirm((tx) => readPdf(tx, jobId, revisionId))).toEqual({
    state: 'ready',
    pdf,
    lastError: null,
  });
});

describe('a delivery', () => {
  let id: string;
  beforeEach(async () => {
    id = await makeDelivery(database.db, firm, jobId, revisionId);
  });
  const state = async () => (await inFirm((tx) => deliveryById(tx, jobId, id)))?.state;

  test('is made once', async () => {
    const known = await inFirm((tx) => deliveryById(tx, jobId, id));
    const { recipientName, recipientEmail, message, messageId, queuedBy, linkExpiresAt } = known!;
    const values = {
      id,
      revisionId,
      recipientName,
      recipientEmail,
      message,
      messageId,
      queuedBy,
      linkExpiresAt,
    };
    expect(await inFirm((tx) => createDelivery(tx, jobId, values))).toBe(false);
  });

  test('is taken up by one of all who try', async () => {
    const taken = await Promise.all(
      [database.db, database.worker, database.worker].map((db) =>
        db.withFirm(firm.firmId, null, (tx) => beginSending(tx, jobId, id)),
      ),
    );
    expect(taken.filter((row) => row !== null)).toHaveLength(1);
    expect(taken.find((row) => row !== null)).toMatchObject({ state: 'sending', attempts: 1 });
  });

  test('goes from queued over sending to sent, and is then not sent again', async () => {
    expect(await asWorker((tx) => markSent(tx, jobId, id))).toBeNull();
    await asWorker((tx) => beginSending(tx, jobId, id));
    expect(await asWorker((tx) => markSent(tx, jobId, id))).toMatchObject({ state: 'sent' });
    expect(await asWorker((tx) => beginSending(tx, jobId, id))).toBeNull();
    expect(await inFirm((tx) => resend(tx, jobId, id))).toBeNull();
    expect((await inFirm((tx) => deliveryById(tx, jobId, id)))?.sentAt).toBeInstanceOf(Date);
  });

  test('that was refused beforehand waits for another attempt, and fails in the end', async () => {
    await asWorker((tx) => beginSending(tx, jobId, id));
    expect(await asWorker((tx) => backToQueue(tx, jobId, id, '451 later'))).toMatchObject({
      state: 'queued',
      lastError: '451 later',
    });
    await asWorker((tx) => beginSending(tx, jobId, id));
    expect(await asWorker((tx) => markFailed(tx, jobId, id, '550 no such box'))).toMatchObject({
      state: 'failed',
      attempts: 2,
    });
  });

  test('that was cut off is uncertain until a person sends it again under the same Message-ID', async () => {
    const { messageId } = (await asWorker((tx) => beginSending(tx, jobId, id)))!;
    await asWorker((tx) => markUncertain(tx, jobId, id, 'connection lost'));
    for (const next of [beginSending, markSent])
      expect(await asWorker((tx) => next(tx, jobId, id))).toBeNull();
    expect(await state()).toBe('uncertain');
    expect(await inFirm((tx) => resend(tx, jobId, id))).toMatchObject({ state: 'queued', messageId });
  });

  test('left in sending is found by the worker, across firms', async () => {
    await asWorker((tx) => beginSending(tx, jobId, id));
    const soon = new Date(Date.now() + 60_000);
    const long = new Date(Date.now() - 60_000);
    const left = (since: Date) => database.worker.global((tx) => deliveriesLeftSending(tx, since));
    expect(await left(soon)).toContainEqual({ firmId: firm.firmId, jobId, deliveryId: id });
    expect(await left(long)).toEqual([]);
  });

  test('has a link that leads to it, a new one when renewed, and none when revoked', async () => {
    const target = (hash: string) => database.db.global((tx) => linkTarget(tx, hash));
    expect(await target(`hash-${id}-1`)).toEqual({ firmId: firm.firmId, jobId, deliveryId: id, epoch: 1 });
    expect(await target('hash-of-nothing')).toBeNull();
    const linkExpiresAt = new Date('2027-02-01T00:00:00Z');
    const renewed = await inFirm((tx) =>
      renewLink(tx, jobId, id, { linkExpiresAt, messageId: '<b@farlug.example>' }),
    );
    expect(renewed).toMatchObject({ state: 'queued', epoch: 2, linkExpiresAt, linkRevokedAt: null });
    await inFirm((tx) => addLink(tx, `hash-${id}-2`, { jobId, deliveryId: id, epoch: 2 }));
    await inFirm((tx) => addLink(tx, `hash-${id}-2`, { jobId, deliveryId: id, epoch: 2 }));
    expect(await target(`hash-${id}-2`)).toMatchObject({ epoch: 2 });
    const revoked = await inFirm((tx) => revokeLink(tx, jobId, id));
    const again = await inFirm((tx) => revokeLink(tx, jobId, id));
    expect(revoked?.linkRevokedAt).toBeInstanceOf(Date);
    expect(again?.linkRevokedAt).toEqual(revoked?.linkRevokedAt);
  });

  test('remembers when it was first opened', async () => {
    const first = await inFirm((tx) => markOpened(tx, jobId, id));
    const second = await inFirm((tx) => markOpened(tx, jobId, id));
    expect(first?.openedAt).toBeInstanceOf(Date);
    expect(second?.openedAt).toEqual(first?.openedAt);
  });

  test('brings back a decision, which is recorded once and shown with its recipient', async () => {
    const values: NewDecision = {
      id: randomUUID(),
      revisionId,
      deliveryId: id,
      decision: 'corrections-needed',
      words: '',
      comments: 'Circuit LP1-7: show the length.',
      name: 'R. Osei',
      title: 'Electrical inspector',
      via: 'link',
      enteredBy: null,
    };
    expect(await inFirm((tx) => recordDecision(tx, jobId, values))).toBe(true);
    expect(await inFirm((tx) => recordDecision(tx, jobId, { ...values, words: 'changed' }))).toBe(false);
    const { enteredBy: _, ...rest } = values;
    expect(await inFirm((tx) => listDecisions(tx, jobId, revisionId))).toEqual([
      { ...rest, at: expect.any(Date), enteredBy: null, recipient: 'R. Osei' },
    ]);
    const [listed] = await inFirm((tx) => listRevisions(tx, jobId));
    expect(listed?.deliveries.map((row) => row.id)).toEqual([id]);
    expect(listed?.decisions.map((row) => row.id)).toEqual([values.id]);
  });

  test('takes no decision by link without a delivery, and none in no words', async () => {
    const values: NewDecision = {
      id: randomUUID(),
      revisionId,
      deliveryId: null,
      decision: 'other',
      words: '',
      comments: '',
      name: 'R. Osei',
      title: '',
      via: 'paper',
      enteredBy: firm.personId,
    };
    for (const bad of [values, { ...values, words: 'held', via: 'link' as const }])
      await expect(inFirm((tx) => recordDecision(tx, jobId, bad))).rejects.toMatchObject({
        cause: { code: '23514' },
      });
  });
});
