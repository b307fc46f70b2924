import { randomUUID } from 'node:crypto';
import { NOTICES } from '@farlug/contract/notices';
import {
  archiveJob,
  downloadInspectionPdf,
  firmAudit,
  getInspection,
  getJob,
  issueRevision,
  listRevisions,
  openInspection,
  recordDecision,
  renewLink,
  revokeLink,
} from '@farlug/contract/routes';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startTestApi, type TestApi } from './start-test-api.ts';
import type { TestClient } from './test-client.ts';
import { signUpFirm, type TestFirm } from './test-firm.ts';
import {
  type DeliveryPlace,
  decisionBody,
  demoJob,
  inspectorOf,
  issueBody,
  issued,
  pdfSaying,
  queuedDelivery,
  tokenOf,
} from './test-report.ts';

let api: TestApi;
let firm: TestFirm;
let ahead = 0;
beforeAll(async () => {
  api = await startTestApi({ now: () => new Date(Date.now() + ahead) });
  firm = await signUpFirm(api);
});
afterAll(() => api.close());

const open = (client: TestClient, token: string) => client.call(openInspection, { body: { token } });

const inspector = (at: DeliveryPlace) => inspectorOf(api, at);
const revisionOf = async (at: DeliveryPlace) =>
  (await firm.admin.call(listRevisions, { params: at })).body.revisions.find(({ id }) => id === at.revision)!;
describe('the link', () => {
  it('is exchanged for a cookie, with which report and basis are read without an account', async () => {
    const at = await queuedDelivery(api, firm);
    const client = await inspector(at);
    const { status, body } = await client.call(getInspection);
    expect(status).toBe(200);
    const revision = await revisionOf(at);
    expect(body).toMatchObject({
      recipientName: 'R. Osei',
      revisionNo: 1,
      sha256: revision.sha256,
      solverVersion: revision.solverVersion,
      pdf: 'ready',
      superseded: false,
      decisions: [],
      input: { job: { name: 'Ridge cabin' }, notices: [...NOTICES] },
    });
    const { counts, findings } = body.digest;
    expect(counts.over + counts.rise).toBe(revision.over);
    expect(counts.near).toBe(revision.near);
    expect(counts.within).toBe(revision.within);
    expect(findings).toHaveLength(revision.over + revision.near);
    for (const finding of findings) expect(finding.reasons.join('')).not.toBe('');
    const pdf = await client.call(downloadInspectionPdf);
    expect(pdf.bytes).toEqual(pdfSaying('Revision A'));
    expect(pdf.headers['content-disposition']).toContain('Ridge-cabin-revision-A.pdf');
  });

  it('opens nothing else: neither the firm’s job nor another report', async () => {
    const at = await queuedDelivery(api, firm);
    const client = await inspector(at);
    expect((await client.call(getJob, { params: at })).error.code).toBe('sign_in_needed');
    expect((await client.call(listRevisions, { params: at })).error.code).toBe('sign_in_needed');
    const other = await queuedDelivery(api, firm);
    expect((await client.call(getInspection)).body.sha256).toBe((await revisionOf(at)).sha256);
    await open(client, tokenOf(api, other));
    expect((await client.call(getInspection)).body.sha256).toBe((await revisionOf(other)).sha256);
  });

  it('marks the report as opened only when it is exchanged; nothing that is read changes anything', async () => {
    const at = await queuedDelivery(api, firm);
    const token = tokenOf(api, at);
    const get = await api.client().agent.get(openInspection.path).query({ token });
    expect(get.status).toBe(404);
    expect((await revisionOf(at)).deliveries[0]?.openedAt).toBeNull();
    const client = await inspector(at);
    const first = await revisionOf(at);
    expect(first.deliveries[0]?.openedAt).not.toBeNull();
    await client.call(getInspection);
    await client.call(downloadInspectionPdf);
    await open(api.client(), token);
    expect(await revisionOf(at)).toEqual(first);
  });

  it('needs the token of a page of this site', async () => {
    const at = await queuedDelivery(api, firm);
    const answer = await api
      .client()
      .agent.post(openInspection.path)
      .send({ token: tokenOf(api, at) });
    expect(answer.status).toBe(403);
    expect((await revisionOf(at)).deliveries[0]?.openedAt).toBeNull();
  });

  it('that is made up, or of another epoch, leads nowhere', async () => {
    const at = await queuedDelivery(api, firm);
    for (const token of ['x'.repeat(43), tokenOf(api, at, 2), tokenOf(api, { ...at, firm: randomUUID() })])
      expect(await open(api.client(), token)).toMatchObject({ status: 410, error: { code: 'link_gone' } });
    expect((await open(api.client(), 'short')).error.code).toBe('invalid');
  });

  it.each([
    ['revoked', async (at: DeliveryPlace) => firm.admin.call(revokeLink, { params: at })],
    [
      'renewed',
      async (at: DeliveryPlace) => firm.admin.call(renewLink, { params: at, body: { linkDays: 7 } }),
    ],
  ])('that is %s ends for who has opened it, too', async (_how, end) => {
    const at = await queuedDelivery(api, firm);
    const client = await inspector(at);
    expect((await end(at)).status).toBe(200);
    for (const route of [getInspection, downloadInspectionPdf])
      expect((await client.call(route)).error.code).toBe('link_gone');
    expect((await client.call(recordDecision, { body: decisionBody() })).error.code).toBe('link_gone');
    expect((await open(api.client(), tokenOf(api, at))).error.code).toBe('link_gone');
    expect((await revisionOf(at)).decisions).toEqual([]);
  });

  it('ends when its days are over', async () => {
    const at = await queuedDelivery(api, firm);
    const client = await inspector(at);
    try {
      ahead = 30 * 86_400_000 - 60_000;
      expect((await client.call(getInspection)).status).toBe(200);
      ahead = 30 * 86_400_000 + 60_000;
      expect((await client.call(getInspection)).error.code).toBe('link_gone');
      expect((await client.call(recordDecision, { body: decisionBody() })).error.code).toBe('link_gone');
      expect((await open(api.client(), tokenOf(api, at))).error.code).toBe('link_gone');
      expect((await revisionOf(at)).deliveries[0]?.link).toBe('expired');
      await firm.admin.call(renewLink, { params: at, body: { linkDays: 2 } });
      expect((await revisionOf(at)).deliveries[0]?.link).toBe('open');
      expect((await open(client, tokenOf(api, at, 2))).status).toBe(200);
    } finally {
      ahead = 0;
    }
  });

  it('asks to be opened again where there is no cookie', async () => {
    for (const route of [getInspection, downloadInspectionPdf])
      expect((await api.client().call(route)).error).toMatchObject({
        code: 'link_gone',
        message: expect.stringMatching(/Open the link/),
      });
  });

  it('shows the report while it is still being printed', async () => {
    const at = await queuedDelivery(api, firm, await issued(firm, await demoJob(firm)));
    const client = await inspector(at);
    expect((await client.call(getInspection)).body.pdf).toBe('waiting');
    expect((await client.call(downloadInspectionPdf)).error.code).toBe('unavailable');
  });

  it('goes on showing its own revision, and that there is a later one; an archived job changes nothing', async () => {
    const at = await queuedDelivery(api, firm);
    const client = await inspector(at);
    const { sha256 } = (await client.call(getInspection)).body;
    await firm.admin.call(issueRevision, { params: at, body: issueBody({ note: 'Second.' }) });
    await firm.admin.call(archiveJob, { params: at, body: { archived: true } });
    expect((await client.call(getInspection)).body).toMatchObject({
      sha256,
      revisionNo: 1,
      superseded: true,
      input: { note: '' },
    });
  });
});

describe('the decision', () => {
  it('is recorded once on exactly this revision, and the firm sees it', async () => {
    const at = await queuedDelivery(api, firm);
    await firm.admin.call(issueRevision, { params: at, body: issueBody() });
    const client = await inspector(at);
    const given = decisionBody();
    const decide = (body: typeof given) => client.call(recordDecision, { body });
    expect((await decide(given)).body).toEqual({ ok: true });
    expect((await Promise.all([decide(given), decide(given)])).map(({ status }) => status)).toEqual([
      200, 200,
    ]);
    expect(await decide({ ...given, comments: 'Nothing.' })).toMatchObject({
      status: 409,
      error: { code: 'conflict' },
    });
    const recorded = {
      ...given,
      via: 'link',
      enteredBy: null,
      recipient: 'R. Osei',
      at: expect.any(String),
    };
    expect((await client.call(getInspection)).body.decisions).toEqual([recorded]);
    expect((await revisionOf(at)).decisions).toEqual([recorded]);
    const { revisions } = (await firm.admin.call(listRevisions, { params: at })).body;
    expect(revisions.find(({ no }) => no === 2)?.decisions).toEqual([]);
    const { events } = (await firm.admin.call(firmAudit, { params: { firm: firm.firm } })).body;
    expect(events.filter(({ what }) => what === 'decision.received')).toEqual([
      expect.objectContaining({ subject: 'osei@inspect.example: corrections-needed', person: null }),
    ]);
  });

  it('in the authority’s own words needs them', async () => {
    const client = await inspector(await queuedDelivery(api, firm));
    const decide = (more: object) => client.call(recordDecision, { body: decisionBody(more) });
    expect((await decide({ decision: 'other' })).error).toMatchObject({
      code: 'invalid',
      details: [{ path: 'words', message: 'must say what was decided' }],
    });
    expect((await decide({ name: '' })).error.details).toMatchObject([{ path: 'name' }]);
    expect((await decide({ comments: 'x'.repeat(8001) })).error.details).toMatchObject([
      { path: 'comments' },
    ]);
    expect((await decide({ comments: 'a\0b' })).error.details).toMatchObject([{ path: 'comments' }]);
    expect((await client.call(getInspection)).body.decisions).toEqual([]);
    expect((await decide({ decision: 'other', words: 'Held for plan review.' })).status).toBe(200);
  });

  it('can be followed by another one, in their order; other recipients’ stay with them', async () => {
    const at = await queuedDelivery(api, firm);
    const second = await queuedDelivery(api, firm, at);
    const [one, other] = [await inspector(at), await inspector(second)];
    await one.call(recordDecision, { body: decisionBody() });
    await one.call(recordDecision, { body: decisionBody({ decision: 'no-exceptions', comments: '' }) });
    await other.call(recordDecision, { body: decisionBody({ comments: 'Mine.' }) });
    const kinds = async (client: TestClient) =>
      (await client.call(getInspection)).body.decisions.map((given) => given.decision);
    expect(await kinds(one)).toEqual(['corrections-needed', 'no-exceptions']);
    expect(await kinds(other)).toEqual(['corrections-needed']);
    expect((await revisionOf(at)).decisions).toHaveLength(3);
  });
});
