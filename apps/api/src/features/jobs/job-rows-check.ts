import { applyEdit, type EditOp, insertOp } from '@farlug/contract/edit';
import { JOB_TABLE_NAMES, type JobRowLists, type JobTable, rowsFromLists } from '@farlug/contract/rows';
import type { RefusalDetail } from '../../platform/refusal.ts';

/** What is wrong with the rows of a new job as a whole: rows that hang in the air, ids and codes that come twice. */
export function wrongRows(lists: JobRowLists): RefusalDetail[] {
  if (lists.job.length !== 1)
    return [{ path: 'rows.job', message: `must hold exactly one row, not ${lists.job.length}` }];
  const repeated = JOB_TABLE_NAMES.flatMap((table) => repeatedIds(table, lists[table]));
  if (repeated.length > 0) return repeated;
  const places: string[] = [];
  const ops: EditOp[] = [];
  for (const table of JOB_TABLE_NAMES)
    if (table !== 'job')
      lists[table].forEach((row, index) => {
        places.push(`rows.${table}[${index}]`);
        ops.push(insertOp(table, row as never));
      });
  const empty = Object.fromEntries(JOB_TABLE_NAMES.map((table) => [table, []])) as unknown as JobRowLists;
  const outcome = applyEdit(rowsFromLists({ ...empty, job: lists.job }), {
    editId: lists.job[0]!.id,
    label: 'new job',
    ops,
  });
  if (outcome.ok) return [];
  const problems = 'problems' in outcome ? outcome.problems : [];
  return problems.map(({ path, message }) => ({
    path: path.replace(/^ops\[(\d+)\](?:\.set)?/, (_whole, index: string) => places[Number(index)] ?? 'rows'),
    message,
  }));
}

function repeatedIds(table: JobTable, rows: readonly { id: string }[]): RefusalDetail[] {
  const seen = new Set<string>();
  return rows.flatMap(({ id }, index) => {
    if (!seen.has(id)) {
      seen.add(id);
      return [];
    }
    return [{ path: `rows.${table}[${index}].id`, message: 'is already the id of a row above' }];
  });
}
