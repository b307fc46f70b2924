import type { JobRows, JobTable } from '../rows/index.ts';
import type { Edit, EditProblem } from './edit.ts';
import { CODE_FIELD, REFERENCES } from './references.ts';

type AnyRow = Record<string, unknown> & { id: string };

/** What only the rows after the whole edit can show: references without a row, and codes used twice. */
export function checkWhole(after: JobRows, edit: Edit): EditProblem[] {
  return [...missingTargets(after, edit), ...deletedTargets(after, edit), ...repeatedCodes(after, edit)];
}

const tableOf = (rows: JobRows, table: JobTable) => rows[table] as ReadonlyMap<string, AnyRow>;

function missingTargets(after: JobRows, edit: Edit): EditProblem[] {
  const problems: EditProblem[] = [];
  edit.ops.forEach((op, index) => {
    const row = tableOf(after, op.table).get(op.row);
    if (op.set === null || row === undefined) return;
    for (const [field, target] of Object.entries(REFERENCES[op.table] ?? {})) {
      const id = row[field];
      if (!Object.hasOwn(op.set, field) || id === null) continue;
      if (!tableOf(after, target).has(id as string))
        problems.push({ path: `ops[${index}].set.${field}`, message: `must be the id of a ${target}` });
    }
  });
  return problems;
}

function deletedTargets(after: JobRows, edit: Edit): EditProblem[] {
  const gone = new Map<string, number>();
  edit.ops.forEach((op, index) => {
    if (op.set === null && !tableOf(after, op.table).has(op.row)) gone.set(`${op.table} ${op.row}`, index);
  });
  if (gone.size === 0) return [];
  const problems: EditProblem[] = [];
  for (const [table, references] of Object.entries(REFERENCES) as [JobTable, Record<string, JobTable>][])
    for (const [field, target] of Object.entries(references))
      for (const row of tableOf(after, table).values()) {
        const index = gone.get(`${target} ${row[field]}`);
        if (index !== undefined)
          problems.push({
            path: `ops[${index}]`,
            message: `must not delete the ${target}: ${table} ${row[CODE_FIELD[table] ?? 'id']} refers to it (${field})`,
          });
      }
  return problems;
}

function repeatedCodes(after: JobRows, edit: Edit): EditProblem[] {
  const written = new Map<JobTable, Map<string, number>>();
  edit.ops.forEach((op, index) => {
    const field = CODE_FIELD[op.table];
    if (field === undefined || op.set === null || !Object.hasOwn(op.set, field)) return;
    const rows = written.get(op.table) ?? new Map<string, number>();
    written.set(op.table, rows.set(op.row, index));
  });
  const problems: EditProblem[] = [];
  for (const [table, ops] of written) {
    const field = CODE_FIELD[table]!;
    const holders = new Map<unknown, string[]>();
    for (const row of tableOf(after, table).values())
      holders.set(row[field], [...(holders.get(row[field]) ?? []), row.id]);
    for (const [rowId, index] of ops) {
      const value = tableOf(after, table).get(rowId)?.[field];
      if (value !== undefined && (holders.get(value)?.length ?? 0) > 1)
        problems.push({
          path: `ops[${index}].set.${field}`,
          message: `${value} is already the ${field} of a ${table}`,
        });
    }
  }
  return problems;
}
