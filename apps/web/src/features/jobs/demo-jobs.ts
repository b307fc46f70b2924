import { rowsFromJob } from '@farlug/contract/job';
import { type JobRowLists, listsFromRows, rowsFromLists } from '@farlug/contract/rows';
import { unfinishedSchema, withUnfinished } from '@farlug/contract/schedule';
import { parseJob } from '@farlug/solver/job';
import job from '../../../../../fixtures/jobs/tannery-row.json?url';
import unfinished from '../../../../../fixtures/jobs/tannery-row-unfinished.json?url';

async function fetchJson(url: string): Promise<unknown> {
  const response = await fetch(url);
  if (!response.ok) throw new Error(`${url} answered ${response.status}`);
  return response.json();
}

/** The rows of the demo job, with the circuits that are still to be finished; `null` where it cannot be fetched. */
export async function demoJobRows(): Promise<JobRowLists | null> {
  const files = await Promise.all([fetchJson(job), fetchJson(unfinished)]).catch(() => null);
  if (files === null) return null;
  const parsed = parseJob(files[0]);
  const open = unfinishedSchema.safeParse(files[1]);
  if (!parsed.ok || !open.success) return null;
  return listsFromRows(withUnfinished(rowsFromLists(rowsFromJob(parsed.job)), open.data));
}
