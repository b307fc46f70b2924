import { applyEdit, type Edit, editOf, newId, updateOp } from '@farlug/contract/edit';
import { blankBus } from '@farlug/contract/job';
import { JOB_TABLE_NAMES, type JobRows } from '@farlug/contract/rows';
import { beforeEach, expect, test } from 'vitest';
import { type LaterEdits, Replica, type Sent } from './replica.ts';

const bus = blankBus({ id: newId(), code: 'LP-1', orderKey: 'a' });
const start = (): JobRows => {
  const tables = Object.fromEntries(JOB_TABLE_NAMES.map((name) => [name, new Map()]));
  tables.bus = new Map([[bus.id, bus]]);
  return tables as unknown as JobRows;
};

/** A server of one job that keeps to the contract: order, idempotency, conflicts. */
class FakeServer {
  rows = start();
  log: LaterEdits['edits'] = [];
  down = false;
  /** Edits in one answer, as the server bounds them. */
  most = 500;
  kept: readonly Edit[] = [];
  waits: (() => void)[] = [];

  port() {
    return {
      send: async (edit: Edit): Promise<Sent> => {
        if (this.down) return { kind: 'unreachable', message: 'no network' };
        return this.take(edit, 'me');
      },
      editsSince: async (seq: number) => ({
        headSeq: this.log.length,
        edits: this.log.filter((one) => one.seq > seq).slice(0, this.most),
      }),
      keep: (pending: readonly Edit[]) => {
        this.kept = pending;
      },
      later: (_: number, run: () => void) => {
        this.waits.push(run);
      },
    };
  }

  take(edit: Edit, person: string): Sent {
    const known = this.log.find((one) => one.edit.editId === edit.editId);
    if (known) return { kind: 'applied', seq: known.seq };
    const outcome = applyEdit(this.rows, edit);
    if (!outcome.ok)
      return 'conflicts' in outcome
        ? { kind: 'conflict', conflicts: outcome.conflicts }
        : { kind: 'refused', message: outcome.problems[0]!.message };
    this.rows = outcome.rows;
    this.log.push({ seq: this.log.length + 1, edit, person });
    return { kind: 'applied', seq: this.log.length };
  }
}

let server: FakeServer;
beforeEach(() => {
  server = new FakeServer();
});
const open = (pending: readonly Edit[] = []) =>
  new Replica(server.rows, server.log.length, pending, server.port());
const rename = (rows: JobRows, name: string, label = `name ${name}`) =>
  editOf(label, [updateOp('bus', rows.bus.get(bus.id)!, { name })])!;
const nameOf = (rows: JobRows) => rows.bus.get(bus.id)!.name;
const quiet = () => new Promise((done) => setTimeout(done, 0));

test('an edit shows at once and is saved in order', async () => {
  const replica = open();
  replica.apply(rename(replica.getSnapshot().rows, 'one'));
  replica.apply(rename(replica.getSnapshot().rows, 'two'));
  expect(nameOf(replica.getSnapshot().rows)).toBe('two');
  expect(replica.getSnapshot().sync.kind).toBe('saving');
  await quiet();
  expect(replica.getSnapshot()).toMatchObject({ sync: { kind: 'saved' }, headSeq: 2, settled: true });
  expect(server.log.map(({ edit }) => edit.label)).toEqual(['name one', 'name two']);
});

test('undo and redo go through the same edits, in words', async () => {
  const replica = open();
  replica.apply(rename(replica.getSnapshot().rows, 'one', 'name of LP-1'));
  expect(replica.getSnapshot().undo).toBe('name of LP-1');
  replica.undo();
  expect(nameOf(replica.getSnapshot().rows)).toBe(null);
  expect(replica.getSnapshot().redo).toBe('name of LP-1');
  replica.redo();
  await quiet();
  expect(nameOf(server.rows)).toBe('one');
  expect(server.log.map(({ edit }) => edit.label)).toEqual([
    'name of LP-1',
    'Undo: name of LP-1',
    'Redo: name of LP-1',
  ]);
});

test('without a network edits wait, are kept, and go out when it is back', async () => {
  const replica = open();
  server.down = true;
  replica.apply(rename(replica.getSnapshot().rows, 'one'));
  await quiet();
  expect(replica.getSnapshot().sync).toMatchObject({ kind: 'waiting', waiting: 1, message: 'no network' });
  expect(server.kept).toHaveLength(1);
  server.down = false;
  server.waits.shift()!();
  await quiet();
  expect(replica.getSnapshot().sync.kind).toBe('saved');
  expect(server.kept).toEqual([]);
});

test('edits kept from an earlier page are sent on opening, those that had arrived are not applied twice', async () => {
  const arrived = rename(server.rows, 'one');
  server.take(arrived, 'me');
  const lost = rename(server.rows, 'two');
  const replica = open([arrived, lost]);
  await quiet();
  expect(replica.getSnapshot()).toMatchObject({ sync: { kind: 'saved' }, headSeq: 2 });
  expect(nameOf(replica.getSnapshot().rows)).toBe('two');
  expect(server.log).toHaveLength(2);
});

test('what others saved comes in before one’s own, and is told', async () => {
  const replica = open();
  const told: string[] = [];
  replica.onOthers((person, label) => told.push(`${person}: ${label}`));
  server.take(editOf('kind', [updateOp('bus', bus, { kind: 'panel' })])!, 'Odile');
  replica.apply(rename(replica.getSnapshot().rows, 'mine'));
  await quiet();
  expect(replica.getSnapshot().rows.bus.get(bus.id)).toMatchObject({ name: 'mine', kind: 'panel' });
  expect(replica.getSnapshot().headSeq).toBe(2);
  expect(told).toEqual(['Odile: kind']);
});

test('a long absence is caught up answer by answer', async () => {
  server.most = 2;
  const replica = open();
  for (const name of ['one', 'two', 'three', 'four', 'five']) server.take(rename(server.rows, name), 'Odile');
  await replica.refresh();
  expect(replica.getSnapshot().headSeq).toBe(5);
  expect(nameOf(replica.getSnapshot().rows)).toBe('five');
});

test.each([
  ['mine', 'mine'],
  ['theirs', 'theirs'],
] as const)('a conflict shows both values and is settled by the person: %s', async (choice, name) => {
  const replica = open();
  const mine = rename(replica.getSnapshot().rows, 'mine');
  server.take(rename(server.rows, 'theirs'), 'Odile');
  replica.apply(mine);
  await quiet();
  expect(replica.getSnapshot().sync).toMatchObject({
    kind: 'conflict',
    conflicts: [{ field: 'name', was: null, is: 'theirs', set: 'mine' }],
  });
  replica.resolve(choice);
  await quiet();
  expect(replica.getSnapshot().sync.kind).toBe('saved');
  expect(nameOf(server.rows)).toBe(name);
  expect(nameOf(replica.getSnapshot().rows)).toBe(name);
});

test('an edit that the server will not take is shown and can be let go', async () => {
  const replica = open();
  const gone = { ...bus, id: newId() };
  const bad: Edit = {
    editId: newId(),
    label: 'bad',
    ops: [{ table: 'bus', row: gone.id, was: null, set: { ...gone, code: '' } }],
  };
  expect(replica.apply(bad)).toMatchObject({ ok: false });
  server.take = () => ({ kind: 'refused', message: 'This job is archived.' });
  replica.apply(rename(replica.getSnapshot().rows, 'one'));
  await quiet();
  expect(replica.getSnapshot().sync).toMatchObject({ kind: 'refused', message: 'This job is archived.' });
  replica.discard();
  expect(replica.getSnapshot().sync.kind).toBe('saved');
  expect(nameOf(replica.getSnapshot().rows)).toBe(null);
});
