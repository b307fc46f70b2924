import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { rowsFromJob } from '@farlug/contract/job';
import { type JobRows, rowsFromLists } from '@farlug/contract/rows';
import { jobSchema } from '@farlug/solver/job';

const fixture = (path: string) =>
  readFileSync(join(import.meta.dirname, '../../../../../../../fixtures', path), 'utf8');

/** A sample upload as cells. */
export function sampleSheet(file: string, separator = ','): string[][] {
  const cell = new RegExp(`("(?:[^"]|"")*"|[^${separator}]*)(?:${separator}|$)`, 'g');
  return fixture(`uploads/${file}`)
    .trimEnd()
    .split('\n')
    .map((line) =>
      [...line.matchAll(cell)]
        .map((match) => match[1]!)
        .slice(0, -1)
        .map((field) => (field.startsWith('"') ? field.slice(1, -1).replaceAll('""', '"') : field)),
    );
}

/** A demo job as rows. */
export const demoRows = (file: string): JobRows =>
  rowsFromLists(rowsFromJob(jobSchema.parse(JSON.parse(fixture(`jobs/${file}`)))));
