import { JOB_TABLES, type JobRows, type JobTable } from '../rows/index.ts';
import { checkWhole } from './check-whole.ts';
import type { Edit, EditConflict, EditOp, EditProblem } from './edit.ts';
import { sameValue } from './same-value.ts';

type AnyRow = { id: string } & Record<string, unknown>;
export type EditOutcome =
  | { ok: true; rows: JobRows }
  | { ok: false; conflicts: EditConflict[] }
  | { ok: false; problems: EditProblem[] };

/**
 * The rows after an edit, or why not: values that the tables do not take (`problems`) before current values that
 * are not those the edit was made upon (`conflicts`). Operations apply one after the other; references, codes and
 * the one job row are judged after the last. Untouched tables are shared with the rows that came in.
 */
export function applyEdit(rows: JobRows, edit: Edit): EditOutcome {
  const draft = new Draft(rows);
  const conflicts: EditConflict[] = [];
  const problems: EditProblem[] = [];
  edit.ops.forEach((op, index) => {
    const misshapen = shapeProblems(op, index);
    if (misshapen.length > 0) problems.push(...misshapen);
    else applyOp(draft, op, index, conflicts, problems);
  });
  if (problems.length > 0) return { ok: false, problems };
  if (conflicts.length > 0) return { ok: false, conflicts };
  const after = draft.finish();
  const dangling = checkWhole(after, edit);
  return dangling.length > 0 ? { ok: false, problems: dangling } : { ok: true, rows: after };
}

/** Copies a table when it is first written to. */
class Draft {
  private readonly before: JobRows;
  private readonly written: Partial<Record<JobTable, Map<string, AnyRow>>> = {};

  constructor(before: JobRows) {
    this.before = before;
  }

  get(table: JobTable, id: string): AnyRow | undefined {
    return (this.written[table] ?? (this.before[table] as ReadonlyMap<string, AnyRow>)).get(id);
  }

  writable(table: JobTable): Map<string, AnyRow> {
    this.written[table] ??= new Map(this.before[table] as ReadonlyMap<string, AnyRow>);
    return this.written[table];
  }

  finish(): JobRows {
    return { ...this.before, ...this.written } as JobRows;
  }
}

/** What can be said of an operation without looking at the rows. */
function shapeProblems(op: EditOp, index: number): EditProblem[] {
  const at = `ops[${index}]`;
  if (op.was === null && op.set === null)
    return [{ path: at, message: 'must set something or delete a row: was and set are both null' }];
  if (op.table === 'job' && (op.was === null || op.set === null))
    return [{ path: at, message: 'must not add or delete the job itself' }];
  const fields = JOB_TABLES[op.table].shape;
  const problems: EditProblem[] = [];
  for (const side of ['was', 'set'] as const) {
    for (const key of Object.keys(op[side] ?? {}))
      if (!Object.hasOwn(fields, key))
        problems.push({ path: `${at}.${side}.${key}`, message: `is not a field of ${op.table}` });
    if (op[side]?.id !== undefined && op[side].id !== op.row)
      problems.push({ path: `${at}.${side}.id`, message: `must be the id of the row, ${op.row}` });
  }
  if (op.set === null)
    for (const key of Object.keys(fields))
      if (key !== 'id' && !Object.hasOwn(op.was!, key))
        problems.push({ path: `${at}.was.${key}`, message: 'must be given: a deletion names the whole row' });
  if (op.was !== null && op.set !== null) {
    for (const key of Object.keys(op.set))
      if (!Object.hasOwn(op.was, key))
        problems.push({ path: `${at}.was.${key}`, message: 'must be given beside the value that is set' });
    for (const key of Object.keys(op.was))
      if (!Object.hasOwn(op.set, key))
        problems.push({ path: `${at}.set.${key}`, message: 'must be given beside the value that was' });
  }
  return problems;
}

function applyOp(
  draft: Draft,
  op: EditOp,
  index: number,
  conflicts: EditConflict[],
  problems: EditProblem[],
): void {
  const { table, row: id, was, set } = op;
  const current = draft.get(table, id);
  const conflict = (field: string | null, wasValue: unknown, is: unknown, setValue: unknown) =>
    conflicts.push({ op: index, table, row: id, field, was: wasValue, is, set: setValue });

  if (was === null) {
    if (current !== undefined) conflict(null, null, current, set);
    else store({ ...set, id });
    return;
  }
  if (current === undefined) {
    conflict(null, was, null, set);
    return;
  }
  const moved = Object.keys(was).filter((key) => !sameValue(current[key], was[key]));
  for (const key of moved) conflict(key, was[key], current[key], set === null ? null : set[key]);
  if (moved.length > 0) return;
  if (set === null) draft.writable(table).delete(id);
  else store({ ...current, ...set, id });

  function store(next: AnyRow): void {
    const parsed = JOB_TABLES[table].safeParse(next);
    if (parsed.success) draft.writable(table).set(id, parsed.data as AnyRow);
    else
      for (const issue of parsed.error.issues)
        problems.push({ path: `ops[${index}].set.${issue.path.join('.')}`, message: issue.message });
  }
}
