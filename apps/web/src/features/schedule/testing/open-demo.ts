import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { JobRows } from '@farlug/contract/rows';
import { type PanelView, scheduleView, unfinishedSchema, withUnfinished } from '@farlug/contract/schedule';
import { demoRows } from '../upload/testing/sample-sheet.ts';

const unfinished = join(import.meta.dirname, '../../../../../../fixtures/jobs/tannery-row-unfinished.json');

/** The demo job as it is opened: with rooms, assumed values and the rows that still lack a length. */
export const openDemoRows = (): JobRows =>
  withUnfinished(
    demoRows('tannery-row.json'),
    unfinishedSchema.parse(JSON.parse(readFileSync(unfinished, 'utf8'))),
  );

export function panelOf(rows: JobRows, code: string): PanelView {
  const found = scheduleView(rows).panels.find((panel) => panel.code === code);
  if (!found) throw new Error(`${code} is not in the job`);
  return found;
}
