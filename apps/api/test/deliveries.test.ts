import { randomUUID } from 'node:crypto';
import { NOTICES } from '@farlug/contract/notices';
import {
  firmAudit,
  listRevisions,
  openInspection,
  renewLink,
  resendDelivery,
  revokeLink,
  sendRevision,
} from '@farlug/contract/routes';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { tokenHash } from '../src/platform/account-token.ts';
import { sendReport } from '../src/worker/send-report.ts';
import { settleCutOff } from '../src/worker/start-worker.ts';
import { startTestApi, type TestApi } from './start-test-api.ts';
import { joinFirm, signUpFirm, type TestFirm } from './test-firm.ts';
import { linkIn, startTestMailServer, type TestMailServer } from './test-mail-server.ts';
import {
  type DeliveryPlace,
  demoJob,
  FIRST,
  issued,
  LAST,
  pdfSaying,
  printed,
  queuedDelivery,
  queuePayload,
  sendBody,
  workerDeps,
} from './test-report.ts';

let api: TestApi;
let firm: TestFirm;
let server: TestMailServer;
beforeAll(async () => {
  api = await startTestApi();
  firm = await signUpFirm(api);
  server = await startTestMailServer();
});
afterEach(() => server.fail({}));
afterAll(async () => {
  await server.close();
  await api.close();
});

const work = (at: DeliveryPlace, attempt = FIRST, smtpUrl = server.url) =>
  sendReport(workerDeps(api, { smtpUrl }), queuePayload(at), attempt);
const viewOf = async (at: DeliveryPlace) => {
  const { revisions } = (await firm.admin.call(listRevisions, { params: at })).body;
  const found = revisions.flatMap(({ deliveries }) => deliveries).find(({ id }) => id === at.delivery);
  if (!found) throw new Error('the delivery is not listed');
  return found;
};
const mailsOf = ({ delivery }: DeliveryPlace) =>
  api.database
    .asOwner('select message_id from delivery where id = $1', [delivery])
    .then(([row]) => server.mails.filter(({ messageId }) => messageId === row?.message_id));
const queuedFor = async ({ delivery }: DeliveryPlace) =>
  (
    await api.database.asOwner(
      `select data from pgboss.job where name = 'send-report' and data->>'deliveryId' = $1`,
      [delivery],
    )
  ).length;

describe('sending a report', () => {
  it('mails it with a personal link, what it found, the cautions and the printed form', async () => {
    const at = await queuedDelivery(api, firm);
    expect(await viewOf(at)).toMatchObject({ state: 'queued', attempts: 0, sentAt: null, link: 'open' });
    await work(at);
    expect(await viewOf(at)).toMatchObject({ state: 'sent', attempts: 1, lastError: null, openedAt: null });
    const [mail, ...more] = await mailsOf(at);
    expect(more).toEqual([]);
    expect(mail?.subject).toBe('Ridge cabin: voltage drop report, revision A');
    expect(mail?.to).toMatchObject({ text: '"R. Osei" <osei@inspect.example>' });
    const text = mail?.text ?? '';
    const { revisions } = (await firm.admin.call(listRevisions, { params: at })).body;
    for (const part of [
      'As agreed on the telephone.',
      'Ridge track 9, Emberwick',
      'by Ada Bream, Tannery Row Electric',
      `${revisions[0]!.within} within`,
      revisions[0]!.sha256.slice(0, 12),
      'no account is needed',
      ...NOTICES,
    ])
      expect(text).toContain(part);
    expect(text).not.toMatch(/compliant(?!”)|passes|approved(?!”)/i);
    expect(mail?.html).toContain(`<a href="http://127.0.0.1/i#`);
    expect(mail?.attachments).toMatchObject([{ filename: 'Ridge-cabin-revision-A.pdf' }]);
    expect(mail?.attachments[0]?.content).toEqual(pdfSaying('Revision A'));
    const link = linkIn(mail);
    expect(link.page).toBe('/i');
    const opened = await api.client().call(openInspection, { body: { token: link.token } });
    expect(opened.body).toEqual({ ok: true });
  });

  it('waits for the printed form, and fails with it', async () => {
    const waiting = await queuedDelivery(api, firm, await issued(firm, await demoJob(firm)));
    await expect(work(waiting)).rejects.toThrow('still being printed');
    expect(await viewOf(waiting)).toMatchObject({ state: 'queued', attempts: 0 });
    await work(waiting, LAST);
    expect(await viewOf(waiting)).toMatchObject({
      state: 'failed',
      lastError: expect.stringMatching(/could not be printed/),
    });
  });

  it('happens once for the same call twice, and for work that comes twice', async () => {
    const params = await printed(api, firm);
    const body = sendBody();
    const send = (more: object = {}) => firm.admin.call(sendRevision, { params, body: { ...body, ...more } });
    const answers = await Promise.all([send(), send()]);
    expect(answers.map(({ status }) => status)).toEqual([200, 200]);
    const at = { ...params, delivery: body.delivery };
    expect(await queuedFor(at)).toBe(1);
    expect((await send({ recipientEmail: 'someone@else.example' })).error.code).toBe('conflict');
    await Promise.all([work(at), work(at), work(at)]);
    await work(at);
    expect(await mailsOf(at)).toHaveLength(1);
    expect(await viewOf(at)).toMatchObject({ state: 'sent', attempts: 1 });
  });

  it('is for administrators and contractors, and for reports of the job', async () => {
    const params = await printed(api, firm);
    const estimator = await joinFirm(api, firm, 'estimator');
    const contractor = await joinFirm(api, firm, 'contractor');
    const body = sendBody();
    expect((await estimator.client.call(sendRevision, { params, body })).error.code).toBe('forbidden');
    expect((await contractor.client.call(sendRevision, { params, body })).status).toBe(200);
    const { job } = await demoJob(firm);
    const elsewhere = { ...params, job };
    expect((await firm.admin.call(sendRevision, { params: elsewhere, body: sendBody() })).error.code).toBe(
      'not_found',
    );
    for (const [path, more] of [
      ['recipientEmail', { recipientEmail: 'not an address' }],
      ['recipientName', { recipientName: ' ' }],
      ['linkDays', { linkDays: 0 }],
    ] as const) {
      const { error } = await firm.admin.call(sendRevision, { params, body: sendBody(more) });
      expect(error).toMatchObject({ code: 'invalid', details: [{ path }] });
    }
  });

  it('keeps the link’s secret nowhere: the index holds its hash, the queue ids only', async () => {
    const at = await queuedDelivery(api, firm);
    await work(at);
    const { token } = linkIn((await mailsOf(at))[0]);
    const links = await api.database.asOwner('select * from link_index where delivery_id = $1', [
      at.delivery,
    ]);
    expect(links.map(({ hash }) => hash)).toEqual([tokenHash(token)]);
    const deliveries = await api.database.asOwner('select * from delivery where id = $1', [at.delivery]);
    const jobs = await api.database.asOwner(`select data from pgboss.job where data->>'deliveryId' = $1`, [
      at.delivery,
    ]);
    expect(jobs).toEqual([{ data: { firmId: at.firm, jobId: at.job, deliveryId: at.delivery } }]);
    expect(JSON.stringify([links, deliveries, jobs, api.logged])).not.toContain(token);
  });

  it('under the same id in another firm leads to that firm’s own report', async () => {
    const at = await queuedDelivery(api, firm);
    await work(at);
    const other = await signUpFirm(api, 'Sluice Wiring');
    const theirs = await printed(api, other);
    await other.admin.call(sendRevision, { params: theirs, body: sendBody({ delivery: at.delivery }) });
    await work({ ...theirs, delivery: at.delivery });
    const tokens = server.mails.slice(-2).map((mail) => linkIn(mail).token);
    const rows = await api.database.asOwner(
      'select firm_id from link_index where hash = any($1) order by firm_id',
      [tokens.map(tokenHash)],
    );
    expect(rows.map(({ firm_id }) => firm_id)).toEqual([at.firm, theirs.firm].sort());
  });
});

describe('when the mail server fails', () => {
  it.each([
    ['nobody listens', { dead: true }, /ECONNREFUSED/],
    ['it says 450 to the recipient', { recipient: 450 }, /450/],
    ['the connection ends before the message', { dropAt: 'recipient' as const }, /closed/],
  ])('the delivery is tried again and fails at last, where %s', async (_what, faults, reason) => {
    const at = await queuedDelivery(api, firm);
    const url = 'dead' in faults ? 'smtp://127.0.0.1:1' : server.url;
    if (!('dead' in faults)) server.fail(faults);
    await expect(work(at, FIRST, url)).rejects.toThrow(reason);
    expect(await viewOf(at)).toMatchObject({
      state: 'queued',
      attempts: 1,
      lastError: expect.stringMatching(reason),
    });
    await work(at, LAST, url);
    expect(await viewOf(at)).toMatchObject({
      state: 'failed',
      attempts: 2,
      lastError: expect.stringMatching(reason),
    });
    server.fail({});
    await work(at);
    expect(await mailsOf(at)).toEqual([]);
  });

  it('a later attempt arrives', async () => {
    const at = await queuedDelivery(api, firm);
    server.fail({ recipient: 450 });
    await expect(work(at)).rejects.toThrow(/450/);
    server.fail({});
    await work(at, { number: 2, last: false });
    expect(await viewOf(at)).toMatchObject({ state: 'sent', attempts: 2, lastError: null });
    expect(await mailsOf(at)).toHaveLength(1);
  });

  it('a refusal for good is not tried again by itself', async () => {
    const at = await queuedDelivery(api, firm);
    server.fail({ recipient: 550 });
    await work(at);
    expect(await viewOf(at)).toMatchObject({ state: 'failed', attempts: 1 });
  });

  it.each(['message', 'taken'] as const)(
    'a connection that ends while the message goes out leaves it uncertain, until a person sends it again under the same Message-ID (%s)',
    async (dropAt) => {
      const at = await queuedDelivery(api, firm);
      server.fail({ dropAt });
      await work(at);
      expect(await viewOf(at)).toMatchObject({ state: 'uncertain', attempts: 1, sentAt: null });
      server.fail({});
      const connections = server.connections();
      await work(at);
      await settleCutOff(workerDeps(api), new Date(Date.now() + 60_000));
      expect(server.connections()).toBe(connections);
      expect(await queuedFor(at)).toBe(1);

      const again = await firm.admin.call(resendDelivery, { params: at });
      expect(again.body).toMatchObject({ state: 'queued' });
      expect(await queuedFor(at)).toBe(2);
      await work(at);
      expect(await viewOf(at)).toMatchObject({ state: 'sent', attempts: 2 });
      const mails = await mailsOf(at);
      expect(mails).toHaveLength(dropAt === 'taken' ? 2 : 1);
      expect(new Set(mails.map((mail) => linkIn(mail).token)).size).toBe(1);
    },
  );

  it('a worker that ended while it sent leaves it uncertain, and only then', async () => {
    const at = await queuedDelivery(api, firm);
    await api.database.worker.withFirm(at.firm, null, (tx) =>
      tx.sql.execute(`update delivery set state = 'sending', attempts = 1, sending_at = now() - interval '4 minutes'
        where id = '${at.delivery}'`),
    );
    await settleCutOff(workerDeps(api), new Date(Date.now() - 300_000));
    expect((await viewOf(at)).state).toBe('sending');
    await settleCutOff(workerDeps(api), new Date(Date.now() - 180_000));
    expect(await viewOf(at)).toMatchObject({
      state: 'uncertain',
      lastError: 'The program was cut off while the message went out.',
    });
    await work(at);
    expect(await mailsOf(at)).toEqual([]);
    expect((await firm.admin.call(resendDelivery, { params: at })).status).toBe(200);
  });

  it('is sent again only when it failed or is uncertain, by who may send', async () => {
    const at = await queuedDelivery(api, firm);
    expect((await firm.admin.call(resendDelivery, { params: at })).error).toMatchObject({
      code: 'conflict',
      message: 'Only a failed or uncertain delivery is sent again; this one is queued.',
    });
    await work(at);
    expect((await firm.admin.call(resendDelivery, { params: at })).error.code).toBe('conflict');
    const { client } = await joinFirm(api, firm, 'estimator');
    expect((await client.call(resendDelivery, { params: at })).error.code).toBe('forbidden');
    const params = { ...at, delivery: randomUUID() };
    expect((await firm.admin.call(resendDelivery, { params })).error.code).toBe('not_found');
  });
});

describe('a link', () => {
  const open = (token: string) => api.client().call(openInspection, { body: { token } });

  it('that is renewed ends, and a new one is mailed under a new Message-ID', async () => {
    const at = await queuedDelivery(api, firm);
    await work(at);
    const [first] = await mailsOf(at);
    const renewed = await firm.admin.call(renewLink, { params: at, body: { linkDays: 7 } });
    expect(renewed.body).toMatchObject({ state: 'queued', link: 'open' });
    expect((await open(linkIn(first).token)).error.code).toBe('link_gone');
    await work(at);
    const [second] = await mailsOf(at);
    expect(second?.messageId).not.toBe(first?.messageId);
    expect((await open(linkIn(first).token)).error.code).toBe('link_gone');
    expect((await open(linkIn(second).token)).body).toEqual({ ok: true });
  });

  it('cannot be renewed while its message is going out', async () => {
    const at = await queuedDelivery(api, firm);
    await api.database.worker.withFirm(at.firm, null, (tx) =>
      tx.sql.execute(`update delivery set state = 'sending', sending_at = now() where id = '${at.delivery}'`),
    );
    const answer = await firm.admin.call(renewLink, { params: at, body: { linkDays: 7 } });
    expect(answer).toMatchObject({ status: 409, error: { code: 'conflict' } });
  });

  it('that is revoked leads nowhere until it is renewed, and a waiting message does not go out', async () => {
    const at = await queuedDelivery(api, firm);
    await work(at);
    const { token } = linkIn((await mailsOf(at))[0]);
    const revoke = () => firm.admin.call(revokeLink, { params: at });
    expect((await revoke()).body).toMatchObject({ state: 'sent', link: 'revoked' });
    expect((await revoke()).body).toMatchObject({ link: 'revoked' });
    expect((await open(token)).error.code).toBe('link_gone');

    const waiting = await queuedDelivery(api, firm, at);
    await firm.admin.call(revokeLink, { params: waiting });
    await work(waiting);
    expect(await viewOf(waiting)).toMatchObject({
      state: 'failed',
      attempts: 0,
      lastError: expect.stringMatching(/Renew it/),
    });
    expect(await mailsOf(waiting)).toEqual([]);
    await firm.admin.call(renewLink, { params: waiting, body: { linkDays: 1 } });
    await work(waiting);
    expect((await open(linkIn((await mailsOf(waiting))[0]).token)).status).toBe(200);
  });

  it('is renewed and revoked by who may send, for deliveries of the job', async () => {
    const at = await queuedDelivery(api, firm);
    const { client } = await joinFirm(api, firm, 'estimator');
    const none = { ...at, delivery: randomUUID() };
    const body = { linkDays: 7 };
    expect((await client.call(renewLink, { params: at, body })).error.code).toBe('forbidden');
    expect((await client.call(revokeLink, { params: at })).error.code).toBe('forbidden');
    expect((await firm.admin.call(renewLink, { params: none, body })).error.code).toBe('not_found');
    expect((await firm.admin.call(revokeLink, { params: none })).error.code).toBe('not_found');
    expect((await firm.admin.call(renewLink, { params: at, body: { linkDays: 400 } })).error.code).toBe(
      'invalid',
    );
  });
});

it('leaves a trail of what was sent, sent again, renewed and revoked', async () => {
  const own = await signUpFirm(api);
  const at = await queuedDelivery(api, own);
  server.fail({ recipient: 550 });
  await work(at);
  server.fail({});
  await own.admin.call(resendDelivery, { params: at });
  await own.admin.call(renewLink, { params: at, body: { linkDays: 7 } });
  await own.admin.call(revokeLink, { params: at });
  const { events } = (await own.admin.call(firmAudit, { params: { firm: own.firm } })).body;
  expect(events.map(({ what }) => what).slice(0, 5)).toEqual([
    'link.revoked',
    'link.renewed',
    'report.resent',
    'report.sent',
    'report.issued',
  ]);
});
