import { randomUUID } from 'node:crypto';
import {
  applyEdit as applyToRows,
  deleteOp,
  type Edit,
  editOf,
  insertOp,
  updateOp,
} from '@farlug/contract/edit';
import { blankBus, blankCircuit, blankLoad, blankPanel, blankRun } from '@farlug/contract/job';
import { type JobRows, listsFromRows, rowsFromLists } from '@farlug/contract/rows';
import { emptyRows, inIdOrder, rowsAndEdit } from '@farlug/contract/testing';
import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { makeFirm, makeJob, type TestFirm } from '../../test/factories.ts';
import { type TestDatabase, withTestDatabase } from '../testing/index.ts';
import { applyEdit, type EditResult, editsSince } from './edits.ts';
import { loadRowLists } from './job-rows.ts';
import { createJob, openJob, setArchived } from './jobs.ts';

let database: TestDatabase;
let firm: TestFirm;
beforeAll(async () => {
  database = await withTestDatabase();
  firm = await makeFirm(database.db);
});
afterAll(() => database.close());

const inFirm = <T>(run: Parameters<typeof database.db.withFirm<T>>[2]) =>
  database.db.withFirm(firm.firmId, firm.personId, run);
const post = (jobId: string, edit: Edit): Promise<EditResult> => inFirm((tx) => applyEdit(tx, jobId, edit));
const stored = (jobId: string) => inFirm((tx) => loadRowLists(tx, jobId));
const store = (rows: JobRows) => inFirm((tx) => createJob(tx, listsFromRows(rows)));
/** Random rows and ids repeat while an example is made smaller: each attempt is a job and an edit of its own. */
function fresh({ rows, edit }: { rows: JobRows; edit: Edit }) {
  const jobId = randomUUID();
  const [job] = [...rows.job.values()];
  const ops = edit.ops.map((op) => (op.table === 'job' ? { ...op, row: jobId } : op));
  return {
    jobId,
    rows: { ...rows, job: new Map([[jobId, { ...job!, id: jobId }]]) },
    edit: { editId: randomUUID(), label: 'some edit', ops },
  };
}
const RUNS = process.env.FARLUG_DEEP === '1' ? 2000 : 60;

describe('held to the reducer', () => {
  test('random rows come back as they were put in', async () => {
    await fc.assert(
      fc.asyncProperty(rowsAndEdit(), async (drawn) => {
        const { jobId, rows } = fresh(drawn);
        await store(rows);
        expect(inIdOrder(await stored(jobId))).toEqual(inIdOrder(listsFromRows(rows)));
      }),
      { numRuns: RUNS },
    );
  });

  test('after a random edit the rows are those of the reducer', async () => {
    await fc.assert(
      fc.asyncProperty(rowsAndEdit(), async (drawn) => {
        const { jobId, rows, edit } = fresh(drawn);
        const expected = applyToRows(rows, edit);
        if (!expected.ok) return fc.pre(false);
        await store(rows);
        expect(await post(jobId, edit)).toEqual({ kind: 'applied', seq: 1, headSeq: 1 });
        expect(inIdOrder(await stored(jobId))).toEqual(inIdOrder(listsFromRows(expected.rows)));
      }),
      { numRuns: RUNS },
    );
  });

  test('an edit upon other rows than it was made for is refused for the same reasons, and leaves no trace', async () => {
    const refusals = { conflict: 0, invalid: 0 };
    await fc.assert(
      fc.asyncProperty(rowsAndEdit(), fc.nat(), async (drawn, pick) => {
        const { jobId, rows, edit: valid } = fresh(drawn);
        await store(rows);
        const before = inIdOrder(await stored(jobId));
        const edit = spoil(valid, pick, rows);
        const expected = applyToRows(rows, edit);
        const result = await post(jobId, edit);
        if (expected.ok) {
          expect(result.kind).toBe('applied');
          return;
        }
        const kind = 'problems' in expected ? 'invalid' : 'conflict';
        refusals[kind] += 1;
        expect(result.kind).toBe(kind);
        expect(reasonsOf(result)).toEqual(reasonsOf(expected));
        expect(inIdOrder(await stored(jobId))).toEqual(before);
      }),
      { numRuns: RUNS * 2 },
    );
    expect(refusals.conflict).toBeGreaterThan(0);
    expect(refusals.invalid).toBeGreaterThan(0);
  });
});

/** In an order of their own: rows that refer to a deleted one are found in no particular one. */
function reasonsOf(outcome: object): string[] {
  const { problems, conflicts } = outcome as { problems?: unknown[]; conflicts?: unknown[] };
  return (problems ?? conflicts ?? []).map((reason) => JSON.stringify(reason)).sort();
}

/** Repeats an operation, points one elsewhere, deletes what is referred to, takes a used code or refers to nothing. */
function spoil(edit: Edit, pick: number, rows: JobRows): Edit {
  const at = pick % edit.ops.length;
  const op = edit.ops[at]!;
  const replaced = (next: Edit['ops'][number]) => ({ ...edit, ops: edit.ops.with(at, next) });
  switch (pick % 5) {
    case 0:
      return { ...edit, ops: [...edit.ops, op] };
    case 1:
      return replaced({ ...op, row: randomUUID() });
    case 2: {
      const bus = [...rows.bus.values()][0]!;
      return { ...edit, ops: [...edit.ops, deleteOp('bus', bus)] };
    }
    case 3: {
      const bus = [...rows.bus.values()][0]!;
      return { ...edit, ops: [...edit.ops, insertOp('bus', { ...bus, id: randomUUID() })] };
    }
    default:
      return {
        ...edit,
        ops: [
          ...edit.ops,
          insertOp('run', {
            ...blankRun({
              id: randomUUID(),
              code: `r-${pick}`,
              orderKey: 'a',
              kind: 'branch',
              fromBusId: randomUUID(),
              toBusId: [...rows.bus.keys()][0]!,
              conductors: ['L1', 'N'],
            }),
          }),
        ],
      };
  }
}

describe('one job', () => {
  const bus = (code: string) => blankBus({ id: randomUUID(), code, orderKey: 'a' });

  test('an edit that comes twice is applied once, and every edit has its number', async () => {
    const jobId = await makeJob(database.db, firm);
    const first = editOf('A', [insertOp('bus', bus('A'))])!;
    const second = editOf('B', [insertOp('bus', bus('B'))])!;
    expect(await post(jobId, first)).toEqual({ kind: 'applied', seq: 1, headSeq: 1 });
    expect(await post(jobId, second)).toEqual({ kind: 'applied', seq: 2, headSeq: 2 });
    expect(await post(jobId, first)).toEqual({ kind: 'already', seq: 1, headSeq: 2 });
    expect((await stored(jobId)).bus).toHaveLength(2);
    const since = await inFirm((tx) => editsSince(tx, jobId, 1));
    expect(since).toMatchObject({
      headSeq: 2,
      edits: [{ seq: 2, editId: second.editId, person: 'Ida Marlow', label: 'B', ops: second.ops }],
    });
  });

  test('edits that come at once are put in a row', async () => {
    const jobId = await makeJob(database.db, firm);
    const edits = Array.from({ length: 8 }, (_, i) => editOf(`bus ${i}`, [insertOp('bus', bus(`B${i}`))])!);
    const results = await Promise.all([...edits, ...edits].map((edit) => post(jobId, edit)));
    const seqs = results.map((result) => ('seq' in result ? result.seq : result.kind));
    expect([...new Set(seqs)].sort()).toEqual([1, 2, 3, 4, 5, 6, 7, 8]);
    expect(results.filter((result) => result.kind === 'applied')).toHaveLength(8);
    expect((await stored(jobId)).bus).toHaveLength(8);
  });

  test('of two people who change one field the second is told both values', async () => {
    const jobId = await makeJob(database.db, firm);
    const a = bus('A');
    await post(jobId, editOf('A', [insertOp('bus', a)])!);
    await post(jobId, editOf('name', [updateOp('bus', a, { name: 'Attic' })])!);
    expect(await post(jobId, editOf('name', [updateOp('bus', a, { name: 'Annex' })])!)).toEqual({
      kind: 'conflict',
      conflicts: [{ op: 0, table: 'bus', row: a.id, field: 'name', was: null, is: 'Attic', set: 'Annex' }],
    });
    expect((await stored(jobId)).bus[0]).toMatchObject({ name: 'Attic' });
  });

  test('two rows may exchange their codes', async () => {
    const jobId = await makeJob(database.db, firm);
    const [a, b] = [bus('A'), bus('B')];
    await post(jobId, editOf('both', [insertOp('bus', a), insertOp('bus', b)])!);
    const swap = editOf('swap', [updateOp('bus', a, { code: 'B' }), updateOp('bus', b, { code: 'A' })])!;
    expect(await post(jobId, swap)).toMatchObject({ kind: 'applied' });
    const codes = new Map((await stored(jobId)).bus.map((row) => [row.id, row.code]));
    expect([codes.get(a.id), codes.get(b.id)]).toEqual(['B', 'A']);
  });

  test('a chain of rows goes in one edit, whatever the order of its operations', async () => {
    const jobId = await makeJob(database.db, firm);
    const [a, b] = [bus('A'), bus('B')];
    const run = blankRun({
      id: randomUUID(),
      code: 'R',
      orderKey: 'a',
      kind: 'branch',
      fromBusId: a.id,
      toBusId: b.id,
      conductors: ['L1', 'N'],
    });
    await post(jobId, editOf('add', [insertOp('run', run), insertOp('bus', b), insertOp('bus', a)])!);
    const gone = editOf('delete', [deleteOp('bus', a), deleteOp('run', run), deleteOp('bus', b)])!;
    expect(await post(jobId, gone)).toMatchObject({ kind: 'applied', seq: 2 });
    expect(await stored(jobId)).toMatchObject({ bus: [], run: [] });
  });

  test('text is kept to the letter, and what is no text is refused at its field', async () => {
    const jobId = await makeJob(database.db, firm);
    const name = ` Ω "quoted" \\ 'single' \u{1F50C} é e\u0301 \t\n\u200d{"$1"} `;
    const a = { ...bus('A'), name };
    await post(jobId, editOf('A', [insertOp('bus', a)])!);
    expect((await stored(jobId)).bus).toEqual([a]);
    for (const bad of ['a\0b', '\ud83d'])
      expect(await post(jobId, editOf('bad', [updateOp('bus', a, { name: bad })])!)).toMatchObject({
        kind: 'invalid',
        problems: [{ path: 'ops[0].set.name' }],
      });
  });

  test('decimals and quantities come back exactly as they were typed', async () => {
    const jobId = await makeJob(database.db, firm);
    const [a, b] = [bus('A'), bus('B')];
    const run = {
      ...blankRun({
        id: randomUUID(),
        code: 'R',
        orderKey: 'a',
        kind: 'branch',
        fromBusId: a.id,
        toBusId: b.id,
        conductors: ['N', 'L1'],
      }),
      length: '0120.50 ft',
      demand: '1.000',
      temperature: '-0',
      ohmsR: '000000000001.000000000001',
    };
    await post(jobId, editOf('add', [insertOp('bus', a), insertOp('bus', b), insertOp('run', run)])!);
    expect((await stored(jobId)).run).toEqual([run]);
  });

  test('an archived job takes no edit, a job of nobody none either', async () => {
    const jobId = await makeJob(database.db, firm);
    await inFirm((tx) => setArchived(tx, jobId, true));
    const edit = editOf('A', [insertOp('bus', bus('A'))])!;
    expect(await post(jobId, edit)).toEqual({ kind: 'archived' });
    expect(await post(randomUUID(), edit)).toEqual({ kind: 'missing' });
    const stranger = await makeFirm(database.db, 'Sorrel Wiring');
    const result = await database.db.withFirm(stranger.firmId, stranger.personId, (tx) =>
      applyEdit(tx, jobId, edit),
    );
    expect(result).toEqual({ kind: 'missing' });
  });

  test('an edit touches the versions of its own rows alone', async () => {
    const jobId = await makeJob(database.db, firm);
    const [a, b] = [bus('A'), bus('B')];
    await post(jobId, editOf('both', [insertOp('bus', a), insertOp('bus', b)])!);
    await post(jobId, editOf('name', [updateOp('bus', a, { name: 'Attic' })])!);
    const versions = await database.asOwner('select code, version from bus where job_id = $1 order by code', [
      jobId,
    ]);
    expect(versions).toEqual([
      { code: 'A', version: 2 },
      { code: 'B', version: 1 },
    ]);
  });
});

// About 0.5 s on two cores; the bound leaves room for a machine that does other things beside.
test('an import of 2,000 rows is one quick edit', async () => {
  const jobId = await makeJob(database.db, firm);
  const edit = importOf(400);
  expect(edit.ops.length).toBeGreaterThanOrEqual(2000);
  const started = performance.now();
  expect(await post(jobId, edit)).toMatchObject({ kind: 'applied' });
  expect(performance.now() - started).toBeLessThan(5000);
  const opened = await inFirm((tx) => openJob(tx, jobId));
  expect(opened?.rows.circuit).toHaveLength(400);
  const expected = applyToRows(emptyRows(jobId), edit);
  expect(expected.ok && rowsFromLists(opened!.rows).run).toEqual(expected.ok && expected.rows.run);
});

/** A panel of so many circuits: each its bus, circuit, run, load and a note that was not understood. */
function importOf(circuits: number): Edit {
  const home = blankBus({ id: randomUUID(), code: 'LP1', orderKey: 'a' });
  const panel = blankPanel({ id: randomUUID(), busId: home.id, spaces: 42, lines: ['L1', 'L2', 'L3'] });
  const rows = Array.from({ length: circuits }, (_, i) => {
    const code = `LP1-${i + 1}`;
    const end = blankBus({ id: randomUUID(), code: `${code}-end`, orderKey: 'b' });
    const circuit = blankCircuit({ id: randomUUID(), orderKey: 'a', panelId: panel.id });
    const run = blankRun({
      id: randomUUID(),
      code,
      orderKey: 'a',
      kind: 'branch',
      fromBusId: home.id,
      toBusId: end.id,
      conductors: ['L1', 'N'],
    });
    const load = blankLoad({ id: randomUUID(), code, orderKey: 'a', terminals: 'L1-N', busId: end.id });
    const draft = { id: randomUUID(), table: 'run', rowId: run.id, field: 'length', text: 'see plan' };
    return [
      insertOp('bus', end),
      insertOp('circuit', circuit),
      insertOp('run', { ...run, circuitId: circuit.id }),
      insertOp('load', { ...load, circuitId: circuit.id }),
      insertOp('draft', draft),
    ];
  });
  return editOf('import of LP1', [insertOp('bus', home), insertOp('panel', panel), ...rows.flat()])!;
}
