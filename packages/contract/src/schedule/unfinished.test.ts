import { readFileSync } from 'node:fs';
import { jobSchema } from '@farlug/solver/job';
import { describe, expect, test } from 'vitest';
import { jobFromRows, rowsFromJob } from '../job/index.ts';
import { jobRowLists, listsFromRows, rowsFromLists } from '../rows/index.ts';
import { scheduleView } from './schedule-view.ts';
import { unfinishedSchema, withUnfinished } from './unfinished.ts';

const read = (file: string): unknown =>
  JSON.parse(readFileSync(new URL(`../../../../fixtures/jobs/${file}`, import.meta.url), 'utf8'));

describe('the demo job with what its file cannot hold', () => {
  const file = jobSchema.parse(read('tannery-row.json'));
  const rows = withUnfinished(
    rowsFromLists(rowsFromJob(file)),
    unfinishedSchema.parse(read('tannery-row-unfinished.json')),
  );
  const { job, leftOut, leftOutCount, assumed } = jobFromRows(rows);

  test('has nine panels and about 160 circuits, none of them claiming the space of another', () => {
    const { panels } = scheduleView(rows);
    const circuits = panels.flatMap((panel) => panel.circuits);
    expect(panels).toHaveLength(9);
    expect(circuits.length).toBeGreaterThan(150);
    expect(circuits.filter((one) => one.clashes.length > 0 || one.beyond)).toEqual([]);
  });

  test('leaves out the four circuits whose length nobody has measured, and says so', () => {
    expect(leftOutCount).toBe(4);
    expect(
      leftOut.filter((one) => !one.follows).map(({ code, field, reason }) => [code, field, reason]),
    ).toEqual(
      ['LP-2-9', 'LP-2-32', 'LP-1-24', 'LP-3-9'].map((code) => [code, 'length', 'The length is missing.']),
    );
  });

  test('solves the very network of its file', () => {
    const numbered = job.runs.map((run, i) => ({ ...run, circuit: file.runs[i]?.circuit }));
    expect(numbered).toEqual(file.runs);
    expect(job.loads).toEqual(file.loads);
  });

  test('marks what is assumed', () => {
    const count = (field: string) => assumed.filter((one) => one.field === field).length;
    expect(count('length')).toBe(3);
    expect(count('size')).toBeGreaterThan(20);
    expect(count('powerFactor')).toBeGreaterThan(50);
  });

  test('is made of rows that the schemas take', () => {
    expect(jobRowLists.safeParse(listsFromRows(rows)).error?.issues ?? []).toEqual([]);
  });
});
