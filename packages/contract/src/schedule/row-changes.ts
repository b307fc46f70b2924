import { deleteOp, type Edit, editOf, insertOp, sameValue, updateOp } from '../edit/index.ts';
import { CODE_FIELD } from '../edit/references.ts';
import { orderKeyBetween } from '../job/index.ts';
import { JOB_TABLE_NAMES, type JobRows, type JobTable, type Row } from '../rows/index.ts';

type Ordered = { [T in JobTable]: Row<T> extends { orderKey: string } ? T : never }[JobTable];

/** Rows that are being changed, and the edit that leads there. */
export class RowChanges {
  rows: JobRows;
  private readonly before: JobRows;
  private readonly touched = new Map<JobTable, Set<string>>();
  private readonly copied = new Set<JobTable>();
  private readonly codes = new Map<JobTable, Set<string>>();
  private readonly lastKeys = new Map<JobTable, string | null>();

  constructor(before: JobRows) {
    this.before = before;
    this.rows = before;
  }

  insert<T extends JobTable>(table: T, row: Row<T>): Row<T> {
    this.writable(table, row.id).set(row.id, row);
    const field = CODE_FIELD[table];
    if (field) this.codes.get(table)?.add((row as unknown as Record<string, string>)[field]!);
    return row;
  }

  update<T extends JobTable>(table: T, id: string, changes: Partial<Omit<Row<T>, 'id'>>): void {
    const row = (this.rows[table] as ReadonlyMap<string, Row<T>>).get(id);
    if (row) this.writable(table, id).set(id, { ...row, ...changes });
  }

  remove(table: JobTable, id: string): void {
    this.writable(table, id).delete(id);
  }

  /** One edit from the rows before to the rows now; null where nothing differs. */
  edit(label: string): Edit | null {
    const inserts = JOB_TABLE_NAMES.flatMap((table) => this.opsOf(table, 'insert'));
    const updates = JOB_TABLE_NAMES.flatMap((table) => this.opsOf(table, 'update'));
    const deletes = [...JOB_TABLE_NAMES].reverse().flatMap((table) => this.opsOf(table, 'delete'));
    return editOf(label, [...inserts, ...updates, ...deletes]);
  }

  /** `base`, or `base.2`, `base.3` … where a row of the table has or had that code; taken from now on. */
  freshCode(table: JobTable, base: string): string {
    const taken = this.codes.get(table) ?? this.codesOf(table);
    this.codes.set(table, taken);
    const short = base.slice(0, 72) || table;
    let code = short;
    for (let n = 2; taken.has(code); n++) code = `${short}.${n}`;
    taken.add(code);
    return code;
  }

  /** An order key after every key of the table, and after those that were given out before. */
  nextKey(table: Ordered): string {
    let last = this.lastKeys.get(table);
    if (last === undefined) {
      last = null;
      for (const row of this.rows[table].values())
        if (last === null || row.orderKey > last) last = row.orderKey;
    }
    const key = orderKeyBetween(last, null);
    this.lastKeys.set(table, key);
    return key;
  }

  private codesOf(table: JobTable): Set<string> {
    const field = CODE_FIELD[table] as 'code';
    return new Set([...this.rows[table].values()].map((row) => (row as { code: string })[field]));
  }

  private writable<T extends JobTable>(table: T, id: string): Map<string, Row<T>> {
    const ids = this.touched.get(table) ?? new Set();
    this.touched.set(table, ids.add(id));
    if (!this.copied.has(table)) {
      this.copied.add(table);
      this.rows = { ...this.rows, [table]: new Map(this.rows[table] as ReadonlyMap<string, Row<T>>) };
    }
    return this.rows[table] as unknown as Map<string, Row<T>>;
  }

  private opsOf(table: JobTable, kind: 'insert' | 'update' | 'delete') {
    return [...(this.touched.get(table) ?? [])].flatMap((id) => {
      const was = this.before[table].get(id) as Row<JobTable> | undefined;
      const is = this.rows[table].get(id) as Row<JobTable> | undefined;
      if (kind === 'insert') return !was && is ? [insertOp(table, is)] : [];
      if (kind === 'delete') return was && !is ? [deleteOp(table, was)] : [];
      return was && is && !sameValue(was, is) ? [updateOp(table, was, is)] : [];
    });
  }
}
