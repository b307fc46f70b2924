import { createHash, randomUUID } from 'node:crypto';
import { NOTICES } from '@farlug/contract/notices';
import {
  archiveJob,
  deleteJob,
  downloadRevisionInput,
  downloadRevisionPdf,
  firmAudit,
  getJob,
  issueRevision,
  listJobs,
  listRevisions,
  postEdit,
  type RevisionInput,
  recordPaperDecision,
  saveFirmSettings,
} from '@farlug/contract/routes';
import { SOLVER_VERSION } from '@farlug/solver/version';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { renderRevision } from '../src/worker/render-report.ts';
import { startTestApi, type TestApi } from './start-test-api.ts';
import { joinFirm, signUpFirm, type TestFirm } from './test-firm.ts';
import {
  decisionBody,
  demoJob,
  FIRST,
  issueBody,
  issued,
  type JobPlace,
  LAST,
  pdfSaying,
  queuePayload,
  tooHeavy,
  withoutLength,
  workerDeps,
} from './test-report.ts';

let api: TestApi;
let firm: TestFirm;
beforeAll(async () => {
  api = await startTestApi();
  firm = await signUpFirm(api);
});
afterAll(() => api.close());

const issue = (params: JobPlace, more: Parameters<typeof issueBody>[0] = {}) =>
  firm.admin.call(issueRevision, { params, body: issueBody(more) });
const revisionsOf = async (params: JobPlace) =>
  (await firm.admin.call(listRevisions, { params })).body.revisions;
const rename = (place: JobPlace, was: string, set: string) =>
  firm.admin.call(postEdit, {
    params: place,
    body: {
      editId: randomUUID(),
      label: 'name of the job',
      ops: [{ table: 'job', row: place.job, was: { name: was }, set: { name: set } }],
    },
  });

/** RFC 8785 for data without exotic numbers or keys: members sorted, no white space. */
const sorted = (value: unknown): unknown =>
  Array.isArray(value)
    ? value.map(sorted)
    : value && typeof value === 'object'
      ? Object.fromEntries(
          Object.entries(value)
            .sort(([a], [b]) => (a < b ? -1 : 1))
            .map(([key, inner]) => [key, sorted(inner)]),
        )
      : value;

describe('a report', () => {
  it('is issued from the state that was seen, and listed with what it found', async () => {
    const place = await demoJob(firm);
    const body = issueBody({ note: 'For the rough-in.' });
    const { status, body: made } = await firm.admin.call(issueRevision, { params: place, body });
    expect(status).toBe(200);
    expect(made).toMatchObject({
      id: body.revision,
      no: 1,
      seq: 0,
      scenario: 'each-circuit',
      solverVersion: SOLVER_VERSION,
      issuedBy: 'Ada Bream',
      pdf: 'waiting',
      deliveries: [],
      decisions: [],
    });
    expect(made.over + made.near + made.within).toBeGreaterThan(10);
    expect(made.worstPercent).toBeGreaterThan(0);
    expect((await firm.admin.call(listRevisions, { params: place })).body).toEqual({
      headSeq: 0,
      revisions: [made],
    });
    const { jobs } = (await firm.admin.call(listJobs, { params: { firm: firm.firm } })).body;
    expect(jobs.find(({ id }) => id === place.job)?.revision).toMatchObject({ no: 1, decision: null });
  });

  it('is issued once by the same id, however often and however fast it is asked for', async () => {
    const place = await demoJob(firm);
    const body = issueBody();
    const send = () => firm.admin.call(issueRevision, { params: place, body });
    const answers = await Promise.all([send(), send(), send()]);
    expect(answers.map(({ status }) => status)).toEqual([200, 200, 200]);
    expect(new Set(answers.map(({ body: made }) => made.sha256)).size).toBe(1);
    expect(await revisionsOf(place)).toHaveLength(1);
    const { events } = (await firm.admin.call(firmAudit, { params: { firm: firm.firm } })).body;
    expect(events.filter(({ what }) => what === 'report.issued')[0]?.subject).toContain('Ridge cabin');
    const queued = await api.database.asOwner(
      `select count(*)::int as n from pgboss.job where name = 'render-report' and data->>'revisionId' = $1`,
      [body.revision],
    );
    expect(queued).toEqual([{ n: 1 }]);
    await rename(place, 'Ridge cabin', 'Ridge cabin East');
    const other = await firm.admin.call(issueRevision, { params: place, body: { ...body, seq: 1 } });
    expect(other).toMatchObject({ status: 409, error: { code: 'conflict' } });
  });

  it('is numbered on from the last when two are issued at once', async () => {
    const place = await demoJob(firm);
    await Promise.all([issue(place), issue(place)]);
    expect((await revisionsOf(place)).map(({ no }) => no)).toEqual([2, 1]);
  });

  it('is refused when the job has moved on, with where it is now', async () => {
    const place = await demoJob(firm);
    await rename(place, 'Ridge cabin', 'Ridge cabin West');
    expect(await issue(place)).toMatchObject({
      status: 409,
      error: { code: 'job_moved_on', details: [{ path: 'seq', headSeq: 1 }] },
    });
    expect(await revisionsOf(place)).toEqual([]);
    expect((await issue(place, { seq: 1 })).status).toBe(200);
  });

  it('is refused while a row is left out, which it names', async () => {
    const place = await demoJob(firm, withoutLength);
    expect(await issue(place)).toMatchObject({
      status: 409,
      error: {
        code: 'incomplete',
        message: 'One row is left out of the results. A report needs every row finished or deleted.',
        details: expect.arrayContaining([{ path: 'DC-1-3.length', message: 'The length is missing.' }]),
      },
    });
    expect(await revisionsOf(place)).toEqual([]);
  });

  it('is refused without a service', async () => {
    const place = await demoJob(firm, (rows) => ({ ...rows, source: [] }));
    const { error } = await issue(place);
    expect(['incomplete', 'unsolvable']).toContain(error.code);
    expect(error.details.length).toBeGreaterThan(0);
  });

  it('is refused where the network has no solution, with the place and why', async () => {
    const place = await demoJob(firm, tooHeavy);
    const { status, error } = await issue(place);
    expect(status).toBe(409);
    expect(error.code).toBe('unsolvable');
    expect(error.details[0]?.message).not.toBe('');
    expect(error.message).toContain(error.details[0]!.message);
    expect(JSON.stringify(error)).toContain('DC-1-3');
    expect(await revisionsOf(place)).toEqual([]);
  });

  it('is refused for an archived job', async () => {
    const place = await demoJob(firm);
    await firm.admin.call(archiveJob, { params: place, body: { archived: true } });
    expect((await issue(place)).error.code).toBe('archived');
  });

  it('writes out only a panel of the job', async () => {
    const place = await demoJob(firm);
    expect((await issue(place, { equationsPanel: randomUUID() })).error).toMatchObject({
      code: 'invalid',
      details: [{ path: 'equationsPanel' }],
    });
    const { rows } = (await firm.admin.call(getJob, { params: place })).body;
    const bus = rows.bus.find(({ code }) => code === 'DC-2');
    const panel = rows.panel.find(({ busId }) => busId === bus?.id);
    const { body: made } = await issue(place, { equationsPanel: panel!.id });
    const input = await inputOf({ ...place, revision: made.id });
    expect(input.equationsPanel).toBe('DC-2');
  });

  it('is issued by administrators and contractors, never by an estimator, who may read it', async () => {
    const place = await demoJob(firm);
    const contractor = await joinFirm(api, firm, 'contractor');
    const estimator = await joinFirm(api, firm, 'estimator');
    const send = (client: typeof contractor.client) =>
      client.call(issueRevision, { params: place, body: issueBody() });
    expect(await send(estimator.client)).toMatchObject({ status: 403, error: { code: 'forbidden' } });
    expect((await send(contractor.client)).body.issuedBy).toBe('Bo Carver');
    expect((await estimator.client.call(listRevisions, { params: place })).body.revisions).toHaveLength(1);
  });

  it('is not there for another firm, under either address', async () => {
    const at = await issued(firm, await demoJob(firm));
    const other = await signUpFirm(api);
    for (const params of [at, { ...at, firm: other.firm }])
      for (const route of [listRevisions, downloadRevisionInput, downloadRevisionPdf])
        expect((await other.admin.call(route, { params })).error.code).toBe('not_found');
    const sibling = await demoJob(firm);
    const params = { ...at, job: sibling.job };
    expect((await firm.admin.call(downloadRevisionInput, { params })).status).toBe(404);
  });
});

async function inputOf(params: JobPlace & { revision: string }): Promise<RevisionInput> {
  return JSON.parse((await firm.admin.call(downloadRevisionInput, { params })).bytes.toString());
}

describe('what a report pins', () => {
  it('has the printed hash, to whoever computes it from the downloaded input', async () => {
    const at = await issued(firm, await demoJob(firm));
    const { bytes, headers } = await firm.admin.call(downloadRevisionInput, { params: at });
    const [made] = await revisionsOf(at);
    expect(createHash('sha256').update(bytes).digest('hex')).toBe(made?.sha256);
    expect(JSON.stringify(sorted(JSON.parse(bytes.toString())))).toBe(bytes.toString());
    expect(headers['content-disposition']).toContain('filename="Ridge-cabin-revision-A.input.json"');
  });

  it('is the job with limits, tables, wording and who issued it', async () => {
    const own = await signUpFirm(api, 'Sluice Wiring');
    await own.admin.call(saveFirmSettings, {
      params: { firm: own.firm },
      body: {
        name: 'Sluice Wiring',
        reportHeading: 'Voltage drop',
        noticeWording: 'Ask the office before you pull.',
        currency: 'USD',
        lengthUnit: 'ft',
        wireUnit: 'awg',
      },
    });
    const place = await demoJob(own);
    const body = issueBody({ note: 'For the rough-in.', paper: 'a4' });
    await own.admin.call(issueRevision, { params: place, body });
    const { bytes } = await own.admin.call(downloadRevisionInput, {
      params: { ...place, revision: body.revision },
    });
    const input: RevisionInput = JSON.parse(bytes.toString());
    expect(input).toMatchObject({
      format: 'farlug-revision/1',
      seq: 0,
      paper: 'a4',
      note: 'For the rough-in.',
      titleBlock: { firm: 'Sluice Wiring', heading: 'Voltage drop', issuedBy: 'Ada Bream', revision: 1 },
      firmWording: 'Ask the office before you pull.',
      notices: [...NOTICES],
    });
    expect(input.job.limits).toMatchObject({ feeder: 3, branch: 3, total: 5 });
    expect(input.tables.length).toBeGreaterThan(3);
    for (const table of input.tables) {
      expect(table.source).not.toBe('');
      expect(table.sha256).toMatch(/^[0-9a-f]{64}$/);
    }
  });

  it('stays as it was when the job, the firm and later reports change, and nothing can write over it', async () => {
    const place = await demoJob(firm);
    const at = await issued(firm, place);
    const before = await inputOf(at);
    await rename(place, 'Ridge cabin', 'Quarry cabin');
    await issue(place, { seq: 1 });
    expect(await inputOf(at)).toEqual(before);
    const [second, first] = await revisionsOf(place);
    expect(second).toMatchObject({ no: 2, seq: 1 });
    expect(second?.sha256).not.toBe(first?.sha256);
    for (const statement of ['update revision set over = 0', 'delete from revision'])
      await expect(
        api.deps.db.withFirm(firm.firm, firm.adminId, (tx) => tx.sql.execute(statement)),
      ).rejects.toMatchObject({ cause: { code: '42501' } });
  });

  it('keeps its job from being deleted; it can be archived', async () => {
    const place = await demoJob(firm);
    await issued(firm, place);
    expect((await firm.admin.call(deleteJob, { params: place })).error.code).toBe('conflict');
    expect((await firm.admin.call(archiveJob, { params: place, body: { archived: true } })).status).toBe(200);
    expect(await revisionsOf(place)).toHaveLength(1);
  });
});

describe('the printed form', () => {
  it('is announced until it is made, and then stays the same', async () => {
    const at = await issued(firm, await demoJob(firm));
    const early = await firm.admin.call(downloadRevisionPdf, { params: at });
    expect(early).toMatchObject({
      status: 503,
      error: { code: 'unavailable', message: 'The report is being printed. Try again in a moment.' },
    });
    await renderRevision(workerDeps(api), queuePayload(at), FIRST);
    const { bytes, headers } = await firm.admin.call(downloadRevisionPdf, { params: at });
    expect(bytes).toEqual(pdfSaying('Revision A'));
    expect(headers).toMatchObject({
      'content-type': 'application/pdf',
      'content-disposition': expect.stringMatching(/^inline; filename="Ridge-cabin-revision-A\.pdf"/),
    });
    expect((await revisionsOf(at))[0]?.pdf).toBe('ready');
    let again = 0;
    const render = async () => {
      again += 1;
      return { bytes: pdfSaying('changed'), pages: 1 };
    };
    await renderRevision(workerDeps(api, { render }), queuePayload(at), FIRST);
    expect(again).toBe(0);
  });

  it('is printed from the pinned input and the facts beside it', async () => {
    const at = await issued(firm, await demoJob(firm));
    const seen: unknown[] = [];
    const render = async (...given: unknown[]) => {
      seen.push(...given);
      return { bytes: pdfSaying('x'), pages: 1 };
    };
    await renderRevision(workerDeps(api, { render }), queuePayload(at), FIRST);
    const [made] = await revisionsOf(at);
    expect(seen[0]).toEqual(await inputOf(at));
    expect(seen[1]).toEqual({
      revisionNo: 1,
      revisionLetter: 'A',
      sha256: made?.sha256,
      solverVersion: SOLVER_VERSION,
      issuedAt: made?.issuedAt,
      issuedBy: 'Ada Bream',
    });
  });

  it('is tried again when printing fails, and says why when that was the last time', async () => {
    const at = await issued(firm, await demoJob(firm));
    const deps = workerDeps(api, { render: () => Promise.reject(new Error('no paper left')) });
    await expect(renderRevision(deps, queuePayload(at), FIRST)).rejects.toThrow('no paper left');
    expect((await revisionsOf(at))[0]?.pdf).toBe('waiting');
    await renderRevision(deps, queuePayload(at), LAST);
    expect((await revisionsOf(at))[0]?.pdf).toBe('failed');
    expect((await firm.admin.call(downloadRevisionPdf, { params: at })).error).toMatchObject({
      code: 'unavailable',
      message: 'The report could not be printed: no paper left.',
    });
  });
});

describe('a decision on paper', () => {
  const decision = () => decisionBody({ decision: 'no-exceptions', comments: 'Stamped at the counter.' });

  it('is entered on its revision with who entered it, once', async () => {
    const at = await issued(firm, await demoJob(firm));
    const given = decision();
    const enter = (body: ReturnType<typeof decision>) =>
      firm.admin.call(recordPaperDecision, { params: at, body });
    expect((await enter(given)).body).toEqual({ ok: true });
    expect((await enter(given)).body).toEqual({ ok: true });
    expect(await enter({ ...given, title: 'Clerk' })).toMatchObject({
      status: 409,
      error: { code: 'conflict' },
    });
    const [made] = await revisionsOf(at);
    expect(made?.decisions).toEqual([
      { ...given, via: 'paper', enteredBy: 'Ada Bream', recipient: null, at: expect.any(String) },
    ]);
    const { jobs } = (await firm.admin.call(listJobs, { params: { firm: firm.firm } })).body;
    expect(jobs.find(({ id }) => id === at.job)?.revision?.decision).toBe('no-exceptions');
    const { events } = (await firm.admin.call(firmAudit, { params: { firm: firm.firm } })).body;
    expect(events.filter(({ what }) => what === 'decision.entered')).toHaveLength(1);
  });

  it('in other words needs the words, and somebody to have said them', async () => {
    const at = await issued(firm, await demoJob(firm));
    const enter = (more: object) =>
      firm.admin.call(recordPaperDecision, { params: at, body: { ...decision(), ...more } });
    expect((await enter({ decision: 'other', words: '  ' })).error).toMatchObject({
      code: 'invalid',
      details: [{ path: 'words', message: 'must say what was decided' }],
    });
    expect((await enter({ name: ' ' })).error.details).toMatchObject([{ path: 'name' }]);
    expect((await enter({ decision: 'approved' })).error.code).toBe('invalid');
    expect((await enter({ decision: 'other', words: 'Held for plan review.' })).status).toBe(200);
    expect((await revisionsOf(at))[0]?.decisions).toMatchObject([{ words: 'Held for plan review.' }]);
  });

  it('is never entered by an estimator, nor on another job’s report', async () => {
    const at = await issued(firm, await demoJob(firm));
    const { client } = await joinFirm(api, firm, 'estimator');
    expect((await client.call(recordPaperDecision, { params: at, body: decision() })).error.code).toBe(
      'forbidden',
    );
    const { job } = await demoJob(firm);
    const params = { ...at, job };
    expect((await firm.admin.call(recordPaperDecision, { params, body: decision() })).error.code).toBe(
      'not_found',
    );
  });
});
