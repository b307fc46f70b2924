import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { fileURLToPath } from 'node:url';
import {
  acceptInvitation,
  downloadRevisionPdf,
  getFirm,
  inviteMember,
  listRevisions,
  readInvitation,
  requestPasswordReset,
  resetPassword,
  sendRevision,
  withdrawInvitation,
} from '@farlug/contract/routes';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { accountToken } from '../src/platform/account-token.ts';
import { sendAccountMail } from '../src/worker/send-account-mail.ts';
import { settleCutOff, startWorker, type Worker } from '../src/worker/start-worker.ts';
import { startTestApi, type TestApi } from './start-test-api.ts';
import { PASSWORD, resetToken, signUpFirm, type TestFirm } from './test-firm.ts';
import { linkIn, startTestMailServer, type TestMailServer } from './test-mail-server.ts';
import {
  demoJob,
  FIRST,
  type IssuedPlace,
  issued,
  LAST,
  pdfSaying,
  printed,
  queuedDelivery,
  sendBody,
  workerDeps,
} from './test-report.ts';

let api: TestApi;
let firm: TestFirm;
let server: TestMailServer;
beforeAll(async () => {
  api = await startTestApi();
  firm = await signUpFirm(api, 'Kiln Street Wiring');
  server = await startTestMailServer();
  await api.database.asOwner(`update pgboss.queue set retry_delay = 1, retry_backoff = false`);
});
afterEach(() => server.fail({}));
afterAll(async () => {
  await server.close();
  await api.close();
});

const mailsTo = (address: string) =>
  server.mails.filter(({ to }) => [to].flat().some((one) => one?.text.includes(address)));
const deliveriesOf = async (params: IssuedPlace) =>
  (await firm.admin.call(listRevisions, { params })).body.revisions.flatMap(({ deliveries }) => deliveries);
const SOON = { timeout: 20_000, interval: 100 };

describe('a worker', () => {
  let worker: Worker;
  beforeAll(async () => {
    worker = await startWorker(workerDeps(api, { smtpUrl: server.url }), api.database.workerUrl);
  });
  afterAll(() => worker.stop());

  it('prints a report that was issued and mails it to whom it was sent', async () => {
    const at = await issued(firm, await demoJob(firm));
    const recipientEmail = 'first@inspect.example';
    await firm.admin.call(sendRevision, { params: at, body: sendBody({ recipientEmail }) });
    await expect.poll(async () => (await deliveriesOf(at))[0]?.state, SOON).toBe('sent');
    expect((await firm.admin.call(downloadRevisionPdf, { params: at })).bytes).toEqual(
      pdfSaying('Revision A'),
    );
    const mails = mailsTo(recipientEmail);
    expect(mails).toHaveLength(1);
    expect(mails[0]?.attachments[0]?.content).toEqual(pdfSaying('Revision A'));
  });

  it('comes back by itself after a server that was busy, and sends the message once', async () => {
    const recipientEmail = 'busy@inspect.example';
    const at = await printed(api, firm);
    server.fail({ recipient: 450 });
    await firm.admin.call(sendRevision, { params: at, body: sendBody({ recipientEmail }) });
    await expect.poll(async () => (await deliveriesOf(at))[0]?.lastError, SOON).toMatch(/450/);
    server.fail({});
    await expect.poll(async () => (await deliveriesOf(at))[0]?.state, SOON).toBe('sent');
    expect((await deliveriesOf(at))[0]?.attempts).toBeGreaterThan(1);
    expect(mailsTo(recipientEmail)).toHaveLength(1);
  });

  it('leaves alone what was lost on the way, however long it waits', async () => {
    const recipientEmail = 'lost@inspect.example';
    const at = await printed(api, firm);
    server.fail({ dropAt: 'message' });
    await firm.admin.call(sendRevision, { params: at, body: sendBody({ recipientEmail }) });
    await expect.poll(async () => (await deliveriesOf(at))[0]?.state, SOON).toBe('uncertain');
    server.fail({});
    await new Promise((resolve) => setTimeout(resolve, 2500));
    expect((await deliveriesOf(at))[0]).toMatchObject({ state: 'uncertain', attempts: 1 });
    expect(mailsTo(recipientEmail)).toEqual([]);
  });

  it('mails an invitation whose link brings the person into the firm', async () => {
    const email = 'new.person@firm.example';
    await firm.admin.call(inviteMember, {
      params: { firm: firm.firm },
      body: { email, role: 'contractor' },
    });
    await expect.poll(() => mailsTo(email).length, SOON).toBe(1);
    const [mail] = mailsTo(email);
    expect(mail?.subject).toBe('Kiln Street Wiring invites you to Farlug');
    expect(mail?.text).toContain('as a contractor');
    const { page, token } = linkIn(mail);
    expect(page).toBe('/invitation');
    const client = api.client();
    expect((await client.call(readInvitation, { body: { token } })).body.email).toBe(email);
    const joined = await client.call(acceptInvitation, {
      body: { token, name: 'Cy Ostler', password: PASSWORD },
    });
    expect(joined.body.memberships).toMatchObject([{ firmId: firm.firm, role: 'contractor' }]);
  });

  it('mails a password reset whose link sets a new password', async () => {
    const { adminEmail } = await signUpFirm(api);
    await api.client().call(requestPasswordReset, { body: { email: adminEmail } });
    await expect.poll(() => mailsTo(adminEmail).length, SOON).toBe(1);
    const { page, token } = linkIn(mailsTo(adminEmail)[0]);
    expect(page).toBe('/reset');
    const password = 'aluminum in the riser';
    expect((await api.client().call(resetPassword, { body: { token, password } })).status).toBe(200);
    expect((await api.client().signIn(adminEmail, password)).person?.email).toBe(adminEmail);
  });
});

describe('an account mail', () => {
  const newest = async (email: string) => {
    const [row] = await api.database.asOwner(
      `select t.id from token t left join invitation i on i.id = t.invitation_id
       left join person p on p.id = t.person_id where i.email = $1 or p.email = $1
       order by t.created_at desc limit 1`,
      [email],
    );
    return String(row?.id);
  };
  const send = (tokenId: string, attempt = FIRST) =>
    sendAccountMail(workerDeps(api, { smtpUrl: server.url }), { tokenId }, attempt);

  it('is tried again after a server that is busy or was lost, always under the same Message-ID', async () => {
    const { adminEmail } = await signUpFirm(api);
    await api.client().call(requestPasswordReset, { body: { email: adminEmail } });
    const tokenId = await newest(adminEmail);
    server.fail({ recipient: 450 });
    await expect(send(tokenId)).rejects.toThrow(/450/);
    server.fail({ dropAt: 'taken' });
    await expect(send(tokenId)).rejects.toThrow();
    server.fail({});
    await send(tokenId);
    const mails = mailsTo(adminEmail);
    expect(mails.map(({ messageId }) => messageId)).toEqual(Array(2).fill(`<${tokenId}@farlug.example>`));
    expect(linkIn(mails[0]).token).toBe(await resetToken(api, adminEmail));
    expect(linkIn(mails[0]).token).toBe(accountToken(api.deps.config.linkSecret, tokenId));
  });

  it('that is refused for good, or too often, is given up and logged, without the secret', async () => {
    const { adminEmail } = await signUpFirm(api);
    await api.client().call(requestPasswordReset, { body: { email: adminEmail } });
    const tokenId = await newest(adminEmail);
    const before = api.logged.length;
    server.fail({ recipient: 550 });
    await send(tokenId);
    server.fail({ recipient: 450 });
    await send(tokenId, LAST);
    const lines = api.logged.slice(before);
    expect(lines).toHaveLength(2);
    for (const line of lines) expect(line).toContain('an account mail could not be sent');
    expect(lines.join()).not.toContain(await resetToken(api, adminEmail));
    expect(mailsTo(adminEmail)).toEqual([]);
  });

  it('is not sent for what was used, withdrawn or has ended meanwhile', async () => {
    const email = 'withdrawn@firm.example';
    const params = { firm: firm.firm };
    await firm.admin.call(inviteMember, { params, body: { email, role: 'estimator' } });
    const withdrawn = await newest(email);
    const { invitations } = (await firm.admin.call(getFirm, { params })).body;
    const invitation = invitations.find((one) => one.email === email)!.id;
    await firm.admin.call(withdrawInvitation, { params: { ...params, invitation } });
    await send(withdrawn);

    const { adminEmail } = await signUpFirm(api);
    await api.client().call(requestPasswordReset, { body: { email: adminEmail } });
    const old = await newest(adminEmail);
    await api.database.asOwner(`update token set expires_at = now() - interval '1 second' where id = $1`, [
      old,
    ]);
    await send(old);
    expect([...mailsTo(email), ...mailsTo(adminEmail)]).toEqual([]);
  });
});

it('killed in the middle of a message leaves the delivery uncertain, and another worker lets it be', async () => {
  const at = await queuedDelivery(api, firm);
  server.fail({ dropAt: 'never' });
  const child = spawn(
    process.execPath,
    ['--import', 'tsx', fileURLToPath(new URL('../src/worker-main.ts', import.meta.url))],
    {
      env: {
        PATH: process.env.PATH,
        DATABASE_URL: api.database.apiUrl,
        WORKER_DATABASE_URL: api.database.workerUrl,
        PUBLIC_URL: 'http://127.0.0.1',
        SESSION_SECRET: api.deps.config.sessionSecret,
        LINK_SECRET: api.deps.config.linkSecret,
        SMTP_URL: server.url,
        LOG_LEVEL: 'silent',
      },
      stdio: 'ignore',
    },
  );
  const ended = once(child, 'exit');
  await expect.poll(async () => (await deliveriesOf(at))[0]?.state, SOON).toBe('sending');
  // An account mail of an earlier test may hang beside it.
  await expect.poll(() => server.hanging(), SOON).toBeGreaterThanOrEqual(1);
  child.kill('SIGKILL');
  await ended;
  server.fail({});
  await settleCutOff(workerDeps(api), new Date(Date.now() + 1000));
  const ofDelivery = `name = 'send-report' and data->>'deliveryId' = '${at.delivery}'`;
  await api.database.asOwner(
    `update pgboss.job set state = 'retry', retry_count = 1, start_after = now() where ${ofDelivery}`,
  );
  const worker = await startWorker(workerDeps(api, { smtpUrl: server.url }), api.database.workerUrl);
  const stateOf = () => api.database.asOwner(`select state::text from pgboss.job where ${ofDelivery}`);
  await expect.poll(stateOf, SOON).toEqual([{ state: 'completed' }]);
  await worker.stop();
  expect((await deliveriesOf(at))[0]).toMatchObject({
    state: 'uncertain',
    attempts: 1,
    lastError: 'The program was cut off while the message went out.',
  });
  expect(mailsTo('osei@inspect.example')).toEqual([]);
});
