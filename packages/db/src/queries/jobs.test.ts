import { randomUUID } from 'node:crypto';
import { editOf, insertOp } from '@farlug/contract/edit';
import { blankBus, blankCircuit, blankPanel, blankRun } from '@farlug/contract/job';
import { listsFromRows, type Row } from '@farlug/contract/rows';
import { emptyRows, inIdOrder, randomRows } from '@farlug/contract/testing';
import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { makeFirm, makeJob, makeRevision, type TestFirm } from '../../test/factories.ts';
import type { FirmTransaction } from '../database.ts';
import { STORED_TABLES } from '../job-tables.ts';
import { type TestDatabase, withTestDatabase } from '../testing/index.ts';
import { recordDecision } from './decisions.ts';
import { applyEdit } from './edits.ts';
import { listJobs } from './job-list.ts';
import { createJob, deleteJob, duplicateJob, openJob, saveVerdict, setArchived } from './jobs.ts';

let database: TestDatabase;
let firm: TestFirm;
beforeAll(async () => {
  database = await withTestDatabase();
  firm = await makeFirm(database.db);
});
afterAll(() => database.close());

const inFirm = <T>(run: (tx: FirmTransaction) => Promise<T>, of = firm) =>
  database.db.withFirm(of.firmId, of.personId, run);
const named = (id: string, name: string, address: string | null = null) => {
  const rows = listsFromRows(emptyRows(id));
  return { ...rows, job: [{ ...(rows.job[0] as Row<'job'>), name, address }] };
};

test('a job opens as it was created, with its number and no history', async () => {
  const jobId = await makeJob(database.db, firm);
  const opened = await inFirm((tx) => openJob(tx, jobId));
  expect(opened).toMatchObject({ headSeq: 0, archivedAt: null, hasRevisions: false });
  expect(opened?.rows).toEqual(listsFromRows(emptyRows(jobId)));
  expect(await inFirm((tx) => openJob(tx, randomUUID()))).toBeNull();
});

test('the same job is created once', async () => {
  const rows = listsFromRows(emptyRows());
  expect(await inFirm((tx) => createJob(tx, rows))).toEqual({ kind: 'created', headSeq: 0 });
  expect(await inFirm((tx) => createJob(tx, rows))).toEqual({ kind: 'exists' });
});

test('rows come in the order of their keys, by bytes', async () => {
  const jobId = await makeJob(database.db, firm);
  const keys = ['b', 'Z', 'a1', 'a', '0'];
  const ops = keys.map((orderKey, i) =>
    insertOp('bus', blankBus({ id: randomUUID(), code: `B${i}`, orderKey })),
  );
  await inFirm((tx) => applyEdit(tx, jobId, editOf('add', ops)!));
  const opened = await inFirm((tx) => openJob(tx, jobId));
  expect(opened?.rows.bus.map((row) => row.orderKey)).toEqual(['0', 'Z', 'a', 'a1', 'b']);
});

test('a duplicate has every row of its source and goes its own way', async () => {
  await fc.assert(
    fc.asyncProperty(randomRows, async (rows) => {
      const [sourceId, copyId] = [randomUUID(), randomUUID()];
      const job = { ...[...rows.job.values()][0]!, id: sourceId };
      await inFirm((tx) => createJob(tx, { ...listsFromRows(rows), job: [job] }));
      expect(await inFirm((tx) => duplicateJob(tx, sourceId, copyId, 'Copy'))).toMatchObject({
        kind: 'created',
      });
      const [source, copy] = await inFirm(async (tx) => [
        await openJob(tx, sourceId),
        await openJob(tx, copyId),
      ]);
      expect(inIdOrder(copy!.rows)).toEqual({
        ...inIdOrder(source!.rows),
        job: [{ ...source!.rows.job[0], id: copyId, name: 'Copy' }],
      });
    }),
    { numRuns: 10 },
  );
  expect(await inFirm((tx) => duplicateJob(tx, randomUUID(), randomUUID(), 'Copy'))).toEqual({
    kind: 'missing',
  });
});

describe('deleting', () => {
  test('takes every row and the history, and leaves other jobs alone', async () => {
    const [jobId, otherId] = [await makeJob(database.db, firm), await makeJob(database.db, firm)];
    for (const id of [jobId, otherId]) await inFirm((tx) => applyEdit(tx, id, smallPanel()));
    expect(await inFirm((tx) => deleteJob(tx, jobId))).toEqual({ kind: 'deleted' });
    for (const { name, table } of Object.values(STORED_TABLES)) {
      const column = table === 'job' ? 'id' : 'job_id';
      const left = await database.asOwner(`select 1 from "${name}" where ${column} = $1`, [jobId]);
      expect(left).toEqual([]);
    }
    expect(await database.asOwner('select 1 from job_edit where job_id = $1', [jobId])).toEqual([]);
    expect((await inFirm((tx) => openJob(tx, otherId)))?.rows.run).toHaveLength(1);
    expect(await inFirm((tx) => deleteJob(tx, jobId))).toEqual({ kind: 'missing' });
  });

  test('is refused while a revision exists, by the query and by the database', async () => {
    const jobId = await makeJob(database.db, firm);
    await makeRevision(database.db, firm, jobId);
    expect(await inFirm((tx) => deleteJob(tx, jobId))).toEqual({ kind: 'has-revisions' });
    await expect(database.asOwner('delete from job where id = $1', [jobId])).rejects.toMatchObject({
      code: '23503',
    });
    expect((await inFirm((tx) => openJob(tx, jobId)))?.hasRevisions).toBe(true);
  });
});

describe('the list', () => {
  test('shows what is looked for, last change first, archived jobs apart', async () => {
    const own = await makeFirm(database.db, 'Sorrel Wiring');
    const ids = { mill: randomUUID(), barn: randomUUID(), old: randomUUID() };
    await inFirm((tx) => createJob(tx, named(ids.mill, 'Mill', '1 Weir Lane')), own);
    await inFirm((tx) => createJob(tx, named(ids.barn, 'Barn 100% oak', null)), own);
    await inFirm((tx) => createJob(tx, named(ids.old, 'Old forge', '2 Weir Lane')), own);
    await inFirm((tx) => setArchived(tx, ids.old, true), own);
    await inFirm((tx) => applyEdit(tx, ids.mill, smallPanel()), own);

    const list = await inFirm((tx) => listJobs(tx), own);
    expect(list.map((job) => job.name)).toEqual(['Mill', 'Barn 100% oak']);
    expect(list[0]).toMatchObject({
      headSeq: 1,
      circuits: 1,
      changedBy: 'Ida Marlow',
      verdict: null,
      revision: null,
    });
    const names = async (query: Parameters<typeof listJobs>[1]) =>
      (await inFirm((tx) => listJobs(tx, query), own)).map((job) => job.name);
    expect(await names({ search: 'weir' })).toEqual(['Mill']);
    expect(await names({ search: '0%' })).toEqual(['Barn 100% oak']);
    expect(await names({ search: '_' })).toEqual([]);
    expect(await names({ search: 'we\0ir' })).toEqual(['Mill']);
    expect(await names({ archived: true })).toEqual(['Old forge']);
    await inFirm((tx) => setArchived(tx, ids.old, false), own);
    expect(await names({ archived: true })).toEqual([]);
  });

  test('shows the newest verdict and the newest revision with what was decided', async () => {
    const own = await makeFirm(database.db, 'Teasel Power');
    const jobId = await makeJob(database.db, own);
    await inFirm((tx) => applyEdit(tx, jobId, smallPanel()), own);
    const verdict = { solverVersion: '0.1.0', worstPercent: 4.2, over: 1, near: 0, within: 3, leftOut: 2 };
    const save = (atSeq: number, over: number) =>
      inFirm((tx) => saveVerdict(tx, jobId, { ...verdict, atSeq, over }), own);
    await save(1, 5);
    await save(0, 9);
    await save(7, 9);
    expect(await inFirm((tx) => saveVerdict(tx, randomUUID(), { ...verdict, atSeq: 0 }), own)).toBe(false);
    await makeRevision(database.db, own, jobId);
    const second = await makeRevision(database.db, own, jobId);
    const [before] = await inFirm((tx) => listJobs(tx), own);
    expect(before).toMatchObject({
      verdict: { ...verdict, atSeq: 1, over: 5 },
      revision: { no: 2, decision: null },
    });
    await inFirm(
      (tx) =>
        recordDecision(tx, jobId, {
          id: randomUUID(),
          revisionId: second,
          deliveryId: null,
          decision: 'no-exceptions',
          words: '',
          comments: '',
          name: 'R. Osei',
          title: 'Inspector',
          via: 'paper',
          enteredBy: own.personId,
        }),
      own,
    );
    const [after] = await inFirm((tx) => listJobs(tx), own);
    expect(after?.revision).toMatchObject({ no: 2, decision: 'no-exceptions' });
  });
});

function smallPanel() {
  const bus = blankBus({ id: randomUUID(), code: 'LP1', orderKey: 'a' });
  const panel = blankPanel({ id: randomUUID(), busId: bus.id, spaces: 42, lines: ['L1'] });
  const circuit = blankCircuit({ id: randomUUID(), orderKey: 'a', panelId: panel.id });
  const run = blankRun({
    id: randomUUID(),
    code: 'LP1-1',
    orderKey: 'a',
    kind: 'branch',
    fromBusId: bus.id,
    toBusId: bus.id,
    conductors: ['L1', 'N'],
  });
  return editOf('panel LP1', [
    insertOp('bus', bus),
    insertOp('panel', panel),
    insertOp('circuit', circuit),
    insertOp('run', { ...run, circuitId: circuit.id }),
  ])!;
}
