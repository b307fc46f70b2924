import { randomUUID } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { JOB_TABLE_NAMES, type JobRowLists } from '@farlug/contract/rows';
import { insertRevision } from '@farlug/db';
import { type Job, jobSchema, SCENARIOS } from '@farlug/solver/job';
import type { TestApi } from './start-test-api.ts';

export function emptyRows(): JobRowLists {
  return Object.fromEntries(JOB_TABLE_NAMES.map((table) => [table, []])) as unknown as JobRowLists;
}

export function demoFile(name: 'tannery-row' | 'weaving-hall' | 'ridge-cabin'): Job {
  const file = new URL(`../../../fixtures/jobs/${name}.json`, import.meta.url);
  return jobSchema.parse(JSON.parse(readFileSync(file, 'utf8')));
}

/** Issues a revision past the reports' own checks, for what only asks whether there is one. */
export function withRevision(
  api: TestApi,
  { firm, job }: { firm: string; job: string },
  issuedBy: string,
): Promise<void> {
  return api.deps.db.withFirm(firm, issuedBy, (tx) =>
    insertRevision(tx, job, {
      id: randomUUID(),
      no: 1,
      seq: 0,
      scenario: SCENARIOS[0],
      paper: 'a4',
      input: {},
      result: {},
      solverVersion: '0.1.0',
      sha256: '0'.repeat(64),
      worstPercent: null,
      over: 0,
      near: 0,
      within: 0,
      issuedBy,
      issuedAt: new Date(),
    }),
  );
}
