import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { newId } from '@farlug/contract/edit';
import { rowsFromJob } from '@farlug/contract/job';
import { type JobRowLists, listsFromRows, rowsFromLists } from '@farlug/contract/rows';
import { unfinishedSchema, withUnfinished } from '@farlug/contract/schedule';
import { jobSchema } from '@farlug/solver/job';

/** In the order in which the list shows them, the one to begin with first. */
const FILES = ['tannery-row', 'weaving-hall', 'ridge-cabin'];

export function demoJobs(fixturesDir: string): JobRowLists[] {
  // Jobs that were changed at the same moment stand in the order of their ids.
  const ids = FILES.map(() => newId()).sort();
  return FILES.map((name, index) => {
    const rows = rowsFromJob(jobSchema.parse(readJson(fixturesDir, `${name}.json`)));
    const job = rows.job.map((row) => ({ ...row, id: ids[index]! }));
    const unfinished = path.join(fixturesDir, 'jobs', `${name}-unfinished.json`);
    if (!existsSync(unfinished)) return { ...rows, job };
    const open = unfinishedSchema.parse(readJson(fixturesDir, `${name}-unfinished.json`));
    return listsFromRows(withUnfinished(rowsFromLists({ ...rows, job }), open));
  });
}

function readJson(fixturesDir: string, file: string): unknown {
  return JSON.parse(readFileSync(path.join(fixturesDir, 'jobs', file), 'utf8'));
}
