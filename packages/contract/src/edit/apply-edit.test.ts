import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { emptyRows, inIdOrder, randomRows, rowsAndEdit } from '../../test/random-rows.ts';
import { blankBus, blankLoad, blankRun } from '../job/blank-rows.ts';
import { type JobRows, jobRowLists, listsFromRows } from '../rows/index.ts';
import { applyEdit } from './apply-edit.ts';
import { edit as editSchema } from './edit.ts';
import { newId } from './new-id.ts';
import { composeEdits, deleteOp, editOf, insertOp, invertEdit, updateOp } from './ops.ts';

const same = (rows: JobRows) => inIdOrder(listsFromRows(rows));
const applied = (rows: JobRows, edit: Parameters<typeof applyEdit>[1]): JobRows => {
  const outcome = applyEdit(rows, edit);
  if (!outcome.ok) throw new Error(JSON.stringify(outcome));
  return outcome.rows;
};

const busA = blankBus({ id: newId(), code: 'A', orderKey: 'a' });
const busB = blankBus({ id: newId(), code: 'B', orderKey: 'b' });
const run = blankRun({
  id: newId(),
  code: 'R',
  orderKey: 'a',
  kind: 'branch',
  fromBusId: busA.id,
  toBusId: busB.id,
  conductors: ['L1', 'N'],
  length: '120 ft',
});
const small = applied(
  emptyRows(),
  editOf('rows', [insertOp('bus', busA), insertOp('bus', busB), insertOp('run', run)])!,
);

describe('laws of edits', () => {
  test('random rows and edits are what the schemas take', () => {
    fc.assert(
      fc.property(rowsAndEdit(), ({ rows, edit }) => {
        expect(jobRowLists.safeParse(listsFromRows(rows)).success).toBe(true);
        expect(editSchema.safeParse(edit).success).toBe(true);
      }),
    );
  });

  test('an edit and its inverse leave the rows as they were', () => {
    fc.assert(
      fc.property(rowsAndEdit(), ({ rows, edit }) => {
        const after = applied(rows, edit);
        expect(same(applied(after, invertEdit(edit, 'undo')))).toEqual(same(rows));
      }),
    );
  });

  test('the inverse of the inverse is the edit', () => {
    fc.assert(
      fc.property(rowsAndEdit(), ({ edit }) => {
        expect(invertEdit(invertEdit(edit, 'undo'), edit.label, edit.editId)).toEqual(edit);
      }),
    );
  });

  test('the order in which fields are named is irrelevant', () => {
    const reversed = (fields: Record<string, unknown> | null) =>
      fields && Object.fromEntries(Object.entries(fields).reverse());
    fc.assert(
      fc.property(rowsAndEdit(), ({ rows, edit }) => {
        const ops = edit.ops.map((op) => ({ ...op, was: reversed(op.was), set: reversed(op.set) }));
        expect(same(applied(rows, { ...edit, ops }))).toEqual(same(applied(rows, edit)));
      }),
    );
  });

  test('one edit of many operations is many edits of one, and composing them is the one', () => {
    fc.assert(
      fc.property(rowsAndEdit(), ({ rows, edit }) => {
        const parts = edit.ops.map((op) => ({ editId: newId(), label: 'part', ops: [op] }));
        const whole = composeEdits(parts, edit.label, edit.editId);
        expect(whole).toEqual(edit);
        expect(same(applied(rows, whole))).toEqual(same(parts.reduce(applied, rows)));
      }),
    );
  });

  test('rows that came in are not written to, and tables that no operation names are shared', () => {
    fc.assert(
      fc.property(rowsAndEdit(), ({ rows, edit }) => {
        const before = structuredClone(listsFromRows(rows));
        const after = applied(rows, edit);
        expect(listsFromRows(rows)).toEqual(before);
        const named = new Set(edit.ops.map((op) => op.table));
        for (const table of Object.keys(rows) as (keyof JobRows)[])
          if (!named.has(table)) expect(after[table]).toBe(rows[table]);
      }),
    );
  });

  test('a second application of an inserting edit is refused whole', () => {
    fc.assert(
      fc.property(randomRows, (rows) => {
        const bus = blankBus({ id: newId(), code: newId(), orderKey: 'a' });
        const edit = editOf('add', [insertOp('bus', bus)])!;
        const again = applyEdit(applied(rows, edit), edit);
        expect(again.ok).toBe(false);
        expect('conflicts' in again && again.conflicts[0]).toMatchObject({ field: null, row: bus.id });
      }),
    );
  });
});

describe('conflicts', () => {
  test('are reported field by field, with both values, and the fields that agree do not matter', () => {
    const edit = {
      editId: newId(),
      label: 'length and size of R',
      ops: [
        {
          table: 'run' as const,
          row: run.id,
          was: { length: '110 ft', size: null, sets: 2 },
          set: { length: '130 ft', size: '10 AWG', sets: 3 },
        },
      ],
    };
    const outcome = applyEdit(small, edit);
    expect(outcome).toEqual({
      ok: false,
      conflicts: [
        { op: 0, table: 'run', row: run.id, field: 'length', was: '110 ft', is: '120 ft', set: '130 ft' },
        { op: 0, table: 'run', row: run.id, field: 'sets', was: 2, is: 1, set: 3 },
      ],
    });
  });

  test('changes of different fields of one row do not conflict', () => {
    const one = editOf('length', [updateOp('run', run, { length: '130 ft' })])!;
    const other = editOf('size', [updateOp('run', run, { size: '10 AWG' })])!;
    const after = applied(applied(small, one), other);
    expect(after.run.get(run.id)).toMatchObject({ length: '130 ft', size: '10 AWG' });
  });

  test('lists are compared by what they hold', () => {
    const op = {
      table: 'run' as const,
      row: run.id,
      was: { conductors: ['L1', 'N'] },
      set: { conductors: ['L2', 'N'] },
    };
    expect(applyEdit(small, { editId: newId(), label: 'line', ops: [op] }).ok).toBe(true);
    const moved = { ...op, was: { conductors: ['N', 'L1'] } };
    expect(applyEdit(small, { editId: newId(), label: 'line', ops: [moved] }).ok).toBe(false);
  });

  test('a row that is gone is a conflict about the whole row', () => {
    const gone = applied(small, editOf('delete R', [deleteOp('run', run)])!);
    const outcome = applyEdit(gone, editOf('length', [updateOp('run', run, { length: '1 ft' })])!);
    expect('conflicts' in outcome && outcome.conflicts).toEqual([
      {
        op: 0,
        table: 'run',
        row: run.id,
        field: null,
        was: { length: '120 ft' },
        is: null,
        set: { length: '1 ft' },
      },
    ]);
  });

  test('a row that somebody changed is not deleted', () => {
    const changed = applied(small, editOf('length', [updateOp('run', run, { length: '1 ft' })])!);
    const outcome = applyEdit(changed, editOf('delete R', [deleteOp('run', run)])!);
    expect('conflicts' in outcome && outcome.conflicts.map(({ field, is }) => [field, is])).toEqual([
      ['length', '1 ft'],
    ]);
  });
});

describe('problems', () => {
  const problemsOf = (ops: Parameters<typeof editOf>[1]) => {
    const outcome = applyEdit(small, editOf('edit', ops)!);
    return 'problems' in outcome ? outcome.problems : outcome;
  };

  test('a value that the table does not take is named with its path', () => {
    expect(
      problemsOf([{ table: 'run', row: run.id, was: { length: '120 ft' }, set: { length: 'far' } }]),
    ).toEqual([{ path: 'ops[0].set.length', message: 'must be a length with its unit, as 120 ft' }]);
  });

  test('every problem is listed, not only the first', () => {
    const problems = problemsOf([
      { table: 'run', row: run.id, was: { length: '120 ft', sets: 1 }, set: { length: 'far', sets: 0 } },
      { table: 'bus', row: busA.id, was: { colour: null }, set: { colour: 'red' } },
    ]);
    expect(Array.isArray(problems) && problems.map(({ path }) => path)).toEqual([
      'ops[0].set.length',
      'ops[0].set.sets',
      'ops[1].was.colour',
      'ops[1].set.colour',
    ]);
  });

  test('a reference must exist after the whole edit, in whatever order its operations come', () => {
    const bus = blankBus({ id: newId(), code: 'C', orderKey: 'c' });
    const load = blankLoad({ id: newId(), code: 'L', orderKey: 'a', terminals: 'L1-N', busId: bus.id });
    expect(problemsOf([insertOp('load', load)])).toEqual([
      { path: 'ops[0].set.busId', message: 'must be the id of a bus' },
    ]);
    expect(applyEdit(small, editOf('add', [insertOp('load', load), insertOp('bus', bus)])!).ok).toBe(true);
  });

  test('a deletion must leave no reference', () => {
    expect(problemsOf([deleteOp('bus', busB)])).toEqual([
      { path: 'ops[0]', message: 'must not delete the bus: run R refers to it (toBusId)' },
    ]);
    expect(applyEdit(small, editOf('delete', [deleteOp('bus', busB), deleteOp('run', run)])!).ok).toBe(true);
  });

  test('a code is unique within its table, and may change hands within one edit', () => {
    const again = blankBus({ id: newId(), code: 'A', orderKey: 'c' });
    expect(problemsOf([insertOp('bus', again)])).toEqual([
      { path: 'ops[0].set.code', message: 'A is already the code of a bus' },
    ]);
    const swap = [updateOp('bus', busA, { code: 'B' }), updateOp('bus', busB, { code: 'A' })];
    expect(applyEdit(small, editOf('swap', swap)!).ok).toBe(true);
  });

  test('the job itself is neither added nor deleted', () => {
    const job = [...small.job.values()][0]!;
    expect(problemsOf([deleteOp('job', job)])).toEqual([
      { path: 'ops[0]', message: 'must not add or delete the job itself' },
    ]);
  });

  test('a deletion names the whole row, an update names each field on both sides', () => {
    expect(problemsOf([{ table: 'bus', row: busA.id, was: { code: 'A' }, set: null }])).toContainEqual({
      path: 'ops[0].was.orderKey',
      message: 'must be given: a deletion names the whole row',
    });
    expect(problemsOf([{ table: 'bus', row: busA.id, was: {}, set: { name: 'x' } }])).toEqual([
      { path: 'ops[0].was.name', message: 'must be given beside the value that is set' },
    ]);
    expect(problemsOf([{ table: 'bus', row: busA.id, was: null, set: null }])).toHaveLength(1);
  });

  test('a refused edit leaves nothing behind', () => {
    const before = same(small);
    problemsOf([updateOp('bus', busA, { name: 'renamed' }), deleteOp('bus', busB)]);
    expect(same(small)).toEqual(before);
  });
});
