import { readdirSync, readFileSync } from 'node:fs';
import { type Job, jobSchema } from '@farlug/solver/job';
import { circuitsOf } from '@farlug/solver/judge';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { randomJob } from '../../test/random-job.ts';
import { panelsAsListed, spelledOut } from '../../test/same-job.ts';
import { type JobRows, jobRowLists, rowsFromLists } from '../rows/index.ts';
import { branchPieces } from './branch-pieces.ts';
import { jobFromRows } from './job-from-rows.ts';
import { rowsFromJob } from './rows-from-job.ts';

const rowsOf = (job: Job): JobRows => rowsFromLists(rowsFromJob(job));
const through = (job: Job) => jobFromRows(rowsOf(job));

describe('job → rows → job', () => {
  test('keeps everything that a job file says', () => {
    fc.assert(
      fc.property(randomJob, (job) => {
        const { job: back, leftOut, problems } = through(job);
        expect(leftOut).toEqual([]);
        expect(problems).toEqual([]);
        expect(spelledOut(back)).toEqual(spelledOut(job));
        expect(panelsAsListed(back, job)).toEqual(job.panels);
      }),
    );
  });

  test('changes nothing the second time', () => {
    fc.assert(
      fc.property(randomJob, (job) => {
        const once = through(job).job;
        expect(through(once).job).toEqual(once);
      }),
    );
  });

  test('makes rows that the schemas take', () => {
    fc.assert(
      fc.property(randomJob, (job) => {
        const parsed = jobRowLists.safeParse(rowsFromJob(job));
        expect(parsed.error?.issues ?? []).toEqual([]);
      }),
    );
  });

  test('makes each circuit of a panel exactly one connected piece of branch runs', () => {
    fc.assert(
      fc.property(randomJob, (job) => {
        const rows = rowsOf(job);
        const pieces = branchPieces(job).map((piece) =>
          [
            ...piece.runs.map((i) => `run ${job.runs[i]!.id}`),
            ...piece.loads.map((i) => `load ${job.loads[i]!.id}`),
          ].sort(),
        );
        const circuits = [...rows.circuit.values()]
          .filter((circuit) => circuit.kind === 'branch')
          .map((circuit) =>
            [
              ...[...rows.run.values()]
                .filter((run) => run.circuitId === circuit.id)
                .map((run) => `run ${run.code}`),
              ...[...rows.load.values()]
                .filter((load) => load.circuitId === circuit.id)
                .map((load) => `load ${load.code}`),
            ].sort(),
          );
        expect(inOrder(circuits)).toEqual(inOrder(pieces));
      }),
    );
  });
});

describe('pieces of branch runs', () => {
  test('are the circuits that the solver judges', () => {
    fc.assert(
      fc.property(randomJob, (job) => {
        const circuits = circuitsOf(job);
        if ('kind' in circuits) return;
        const pieces = branchPieces(job).map(({ runs, loads, starts }) => ({
          runs: runs.map((i) => job.runs[i]!.id),
          loads: loads.map((i) => job.loads[i]!.id),
          begins: starts,
        }));
        expect(inOrder(pieces.map(sorted))).toEqual(inOrder(circuits.map(sorted)));
      }),
    );
  });
});

const inOrder = (lists: string[][]) => lists.map((list) => list.join()).sort();
const sorted = ({ runs, loads, begins }: { runs: string[]; loads: string[]; begins: string[] }) => [
  `runs ${[...runs].sort().join(' ')}`,
  `loads ${[...loads].sort().join(' ')}`,
  `begins ${[...new Set(begins)].sort().join(' ')}`,
];

describe('fixtures', () => {
  const folder = new URL('../../../../fixtures/jobs/', import.meta.url);
  const files = readdirSync(folder).filter((file) => file.endsWith('.json') && !file.includes('unfinished'));

  test.each(files)('%s comes back as it went in', (file) => {
    const job = jobSchema.parse(JSON.parse(readFileSync(new URL(file, folder), 'utf8')));
    const { job: back, leftOut } = through(job);
    expect(leftOut).toEqual([]);
    expect(spelledOut(back)).toEqual(spelledOut(job));
    expect(panelsAsListed(back, job)).toEqual(job.panels);
  });
});
