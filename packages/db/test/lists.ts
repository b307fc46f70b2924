import { JOB_TABLE_NAMES, type JobRowLists } from '@farlug/contract/rows';

export function emptyLists(): JobRowLists {
  return Object.fromEntries(JOB_TABLE_NAMES.map((table) => [table, []])) as unknown as JobRowLists;
}

/** The rows without the order in which they came. */
export function inIdOrder(lists: JobRowLists): JobRowLists {
  return Object.fromEntries(
    JOB_TABLE_NAMES.map((table) => [table, [...lists[table]].sort((a, b) => (a.id < b.id ? -1 : 1))]),
  ) as unknown as JobRowLists;
}
