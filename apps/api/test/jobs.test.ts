import { randomUUID } from 'node:crypto';
import { blankJob, rowsFromJob } from '@farlug/contract/job';
import {
  archiveJob,
  createJob,
  deleteJob,
  downloadJobFile,
  duplicateJob,
  getJob,
  listEdits,
  listJobs,
  postEdit,
  reportVerdict,
} from '@farlug/contract/routes';
import { parseJob } from '@farlug/solver/job';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startTestApi, type TestApi } from './start-test-api.ts';
import { signUpFirm, type TestFirm } from './test-firm.ts';
import { demoFile, emptyRows, withRevision } from './test-job.ts';

let api: TestApi;
let firm: TestFirm;
beforeAll(async () => {
  api = await startTestApi();
  firm = await signUpFirm(api);
});
afterAll(() => api.close());

const newRows = (name = 'Kiln House') => {
  const id = randomUUID();
  return { ...emptyRows(), job: [blankJob({ id, name, lengthUnit: 'ft', wireUnit: 'awg' })] };
};
async function aJob(name?: string): Promise<{ firm: string; job: string }> {
  const rows = newRows(name);
  await firm.admin.call(createJob, { params: { firm: firm.firm }, body: { rows } });
  return { firm: firm.firm, job: rows.job[0]!.id };
}
const rename = (job: string, was: string, set: string) => ({
  editId: randomUUID(),
  label: 'name of the job',
  ops: [{ table: 'job' as const, row: job, was: { name: was }, set: { name: set } }],
});

describe('a job', () => {
  it('is made from the rows of an uploaded job file and read back row for row', async () => {
    const rows = rowsFromJob(demoFile('tannery-row'));
    const params = { firm: firm.firm };
    const made = await firm.admin.call(createJob, { params, body: { rows } });
    expect(made).toMatchObject({ status: 200, body: { id: rows.job[0]!.id, headSeq: 0 } });
    const { body } = await firm.admin.call(getJob, { params: { ...params, job: made.body.id } });
    for (const [table, list] of Object.entries(rows)) {
      const read = body.rows[table as keyof typeof rows];
      expect(new Map(read.map((row) => [row.id, row]))).toEqual(new Map(list.map((row) => [row.id, row])));
    }
  });

  it('is made once by the same rows twice; other rows under its id are a conflict', async () => {
    const rows = newRows();
    const send = (body: typeof rows) =>
      firm.admin.call(createJob, { params: { firm: firm.firm }, body: { rows: body } });
    expect((await send(rows)).status).toBe(200);
    expect((await send(rows)).status).toBe(200);
    const other = { ...rows, job: rows.job.map((row) => ({ ...row, name: 'Other' })) };
    expect(await send(other)).toMatchObject({ status: 409, error: { code: 'conflict' } });
  });

  it('is made once by calls that overtake each other', async () => {
    const rows = rowsFromJob(demoFile('ridge-cabin'));
    const send = () => firm.admin.call(createJob, { params: { firm: firm.firm }, body: { rows } });
    const answers = await Promise.all([send(), send(), send()]);
    expect(answers.map(({ status }) => status)).toEqual([200, 200, 200]);
  });

  it('is refused with every row that hangs in the air, and nothing of it stays', async () => {
    const rows = rowsFromJob(demoFile('ridge-cabin'));
    const run = { ...rows.run[0]!, toBusId: randomUUID() };
    const load = { ...rows.load[1]!, code: rows.load[0]!.code };
    const wrong = {
      ...rows,
      run: [run, ...rows.run.slice(1)],
      load: [rows.load[0]!, load, ...rows.load.slice(2)],
    };
    const { status, error } = await firm.admin.call(createJob, {
      params: { firm: firm.firm },
      body: { rows: wrong },
    });
    expect(status).toBe(422);
    expect(error.details).toContainEqual({ path: 'rows.run[0].toBusId', message: 'must be the id of a bus' });
    expect(error.details.map(({ path }) => path)).toContain('rows.load[1].code');
    const job = rows.job[0]!.id;
    expect((await firm.admin.call(getJob, { params: { firm: firm.firm, job } })).status).toBe(404);
  });

  it('is refused with a value at its place', async () => {
    const rows = newRows();
    const wrong = { ...rows, job: [{ ...rows.job[0]!, frequency: 'sixty' }] };
    const { error } = await firm.admin.call(createJob, {
      params: { firm: firm.firm },
      body: { rows: wrong },
    });
    expect(error.details).toEqual([
      { path: 'rows.job[0].frequency', message: 'must be a decimal number, as 0.85' },
    ]);
    const two = { ...rows, job: [...rows.job, ...newRows().job] };
    expect(
      (await firm.admin.call(createJob, { params: { firm: firm.firm }, body: { rows: two } })).error
        .details[0]?.path,
    ).toBe('rows.job');
  });

  it('is listed with what changed last first, and found by name and address', async () => {
    const { job } = await aJob('Fulling Mill');
    const list = async (query: { search?: string; archived?: 'yes' | 'no' }) =>
      (await firm.admin.call(listJobs, { params: { firm: firm.firm }, query })).body.jobs;
    expect((await list({}))[0]).toMatchObject({
      id: job,
      changedBy: 'Ada Bream',
      circuits: 0,
      verdict: null,
      revision: null,
    });
    expect((await list({ search: 'fulling' })).map(({ name }) => name)).toEqual(['Fulling Mill']);
    expect(await list({ search: '%' })).toEqual([]);
    await firm.admin.call(archiveJob, { params: { firm: firm.firm, job }, body: { archived: true } });
    expect(await list({ search: 'fulling' })).toEqual([]);
    expect(await list({ search: 'fulling', archived: 'yes' })).toHaveLength(1);
  });

  it('keeps the newest verdict that a browser found', async () => {
    const params = await aJob('Verdict House');
    const verdict = {
      atSeq: 0,
      solverVersion: '0.1.0',
      worstPercent: 4.2,
      over: 1,
      near: 2,
      within: 3,
      leftOut: 0,
    };
    expect((await firm.admin.call(reportVerdict, { params, body: verdict })).body).toEqual({ ok: true });
    const { jobs } = (await firm.admin.call(listJobs, { params, query: { search: 'Verdict House' } })).body;
    expect(jobs[0]?.verdict).toEqual(verdict);
    const wrong = { ...verdict, over: 'many' as unknown as number };
    expect((await firm.admin.call(reportVerdict, { params, body: wrong })).error.details[0]?.path).toBe(
      'over',
    );
  });

  it('is duplicated under a new name, once', async () => {
    const params = await aJob('First Hall');
    const body = { id: randomUUID(), name: 'Second Hall' };
    const made = await firm.admin.call(duplicateJob, { params, body });
    expect(made.body).toEqual({ id: body.id, headSeq: 0 });
    expect((await firm.admin.call(duplicateJob, { params, body })).status).toBe(200);
    const copy = await firm.admin.call(getJob, { params: { ...params, job: body.id } });
    expect(copy.body.rows.job).toMatchObject([{ id: body.id, name: 'Second Hall' }]);
    const taken = { id: params.job, name: 'Third' };
    expect((await firm.admin.call(duplicateJob, { params, body: taken })).error.code).toBe('conflict');
  });

  it('is deleted with everything in it, unless reports were issued', async () => {
    const params = await aJob();
    expect((await firm.admin.call(deleteJob, { params })).body).toEqual({ ok: true });
    expect((await firm.admin.call(getJob, { params })).status).toBe(404);
    expect((await firm.admin.call(deleteJob, { params })).status).toBe(404);
    const issued = await aJob();
    await withRevision(api, issued, firm.adminId);
    expect((await firm.admin.call(deleteJob, { params: issued })).error).toMatchObject({
      code: 'conflict',
      message: expect.stringMatching(/Archive it/),
    });
  });

  it('leaves as a job file that can come back, with what it leaves out in a header', async () => {
    const rows = rowsFromJob(demoFile('weaving-hall'));
    const params = { firm: firm.firm, job: rows.job[0]!.id };
    await firm.admin.call(createJob, { params, body: { rows } });
    const { headers, bytes } = await firm.admin.call(downloadJobFile, { params });
    expect(headers['x-left-out']).toBe('0');
    expect(headers['content-disposition']).toContain('filename="Weaving-hall.farlug.json"');
    const parsed = parseJob(JSON.parse(bytes.toString()));
    expect(parsed.ok).toBe(true);
  });
});

describe('an edit', () => {
  it('gets the next number, and the same edit twice is applied once', async () => {
    const params = await aJob();
    const edit = rename(params.job, 'Kiln House', 'Kiln House East');
    expect((await firm.admin.call(postEdit, { params, body: edit })).body).toEqual({ seq: 1, headSeq: 1 });
    expect((await firm.admin.call(postEdit, { params, body: edit })).body).toEqual({ seq: 1, headSeq: 1 });
    const next = rename(params.job, 'Kiln House East', 'Kiln House West');
    expect((await firm.admin.call(postEdit, { params, body: next })).body).toEqual({ seq: 2, headSeq: 2 });
    const { body } = await firm.admin.call(listEdits, { params, query: { since: '1' } });
    expect(body).toMatchObject({
      headSeq: 2,
      edits: [{ seq: 2, editId: next.editId, person: 'Ada Bream', ops: next.ops }],
    });
  });

  it('is a conflict with both values where the job has moved on, and changes nothing', async () => {
    const params = await aJob();
    await firm.admin.call(postEdit, { params, body: rename(params.job, 'Kiln House', 'North') });
    const { status, error } = await firm.admin.call(postEdit, {
      params,
      body: rename(params.job, 'Kiln House', 'South'),
    });
    expect(status).toBe(409);
    expect(error.code).toBe('conflict');
    expect(error.details).toEqual([
      {
        path: 'ops[0].set.name',
        message: 'the value is not what it was',
        op: 0,
        table: 'job',
        row: params.job,
        field: 'name',
        was: 'Kiln House',
        is: 'North',
        set: 'South',
      },
    ]);
    expect((await firm.admin.call(getJob, { params })).body).toMatchObject({
      headSeq: 1,
      rows: { job: [{ name: 'North' }] },
    });
  });

  it('is applied whole or not at all', async () => {
    const params = await aJob();
    const good = rename(params.job, 'Kiln House', 'Half');
    const body = {
      ...good,
      ops: [
        ...good.ops,
        { table: 'job' as const, row: params.job, was: { basis: 'impedance' }, set: { basis: 'guess' } },
      ],
    };
    const { status, error } = await firm.admin.call(postEdit, { params, body });
    expect(status).toBe(422);
    expect(error.details[0]?.path).toBe('ops[1].set.basis');
    expect((await firm.admin.call(getJob, { params })).body).toMatchObject({
      headSeq: 0,
      rows: { job: [{ name: 'Kiln House' }] },
    });
  });

  it('is refused by an archived job until it is taken out of the archive', async () => {
    const params = await aJob();
    await firm.admin.call(archiveJob, { params, body: { archived: true } });
    const edit = rename(params.job, 'Kiln House', 'Later');
    expect(await firm.admin.call(postEdit, { params, body: edit })).toMatchObject({
      status: 409,
      error: { code: 'archived' },
    });
    await firm.admin.call(archiveJob, { params, body: { archived: false } });
    expect((await firm.admin.call(postEdit, { params, body: edit })).status).toBe(200);
  });

  it('cannot be larger than 24 MB', async () => {
    const params = await aJob();
    const body = { ...rename(params.job, 'Kiln House', 'x'), label: 'x'.repeat(25 * 1024 * 1024) };
    expect(await firm.admin.call(postEdit, { params, body })).toMatchObject({
      status: 413,
      error: { code: 'too_large' },
    });
    expect(await firm.admin.call(createJob, { params, body: body as never })).toMatchObject({
      status: 413,
      error: { code: 'too_large' },
    });
  });
});

it('refuses a character that no database holds, wherever text is taken', async () => {
  const params = await aJob();
  const NUL = 'a\0b';
  const copy = await firm.admin.call(duplicateJob, { params, body: { id: randomUUID(), name: NUL } });
  expect(copy.error).toMatchObject({ code: 'invalid', details: [{ path: 'name' }] });
  const search = await firm.admin.call(listJobs, { params: { firm: firm.firm }, query: { search: NUL } });
  expect(search.error).toMatchObject({ code: 'bad_request', details: [{ path: 'search' }] });
  const verdict = await firm.admin.call(reportVerdict, {
    params,
    body: { atSeq: 0, solverVersion: NUL, worstPercent: null, over: 0, near: 0, within: 0, leftOut: 0 },
  });
  expect(verdict.error).toMatchObject({ code: 'invalid', details: [{ path: 'solverVersion' }] });
});

it('asks for a number where the address must hold one', async () => {
  const params = await aJob();
  const answer = await firm.admin.call(listEdits, { params, query: { since: 'yesterday' } });
  expect(answer).toMatchObject({ status: 400, error: { code: 'bad_request', details: [{ path: 'since' }] } });
});
