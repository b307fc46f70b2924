import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { type Job, parseJob, type Run, type Solution } from '../job/index.ts';
import { solveJob } from './solve-job.ts';

const jobOf = (name: string): Job => {
  const path = new URL(`../../../../fixtures/jobs/${name}.json`, import.meta.url);
  const parsed = parseJob(JSON.parse(readFileSync(path, 'utf8')));
  if (!parsed.ok) throw new Error(parsed.problems[0]!.message);
  return parsed.job;
};
const solved = (job: Job, like?: { job: Job; run: number }): Solution => {
  const outcome = solveJob(job, { scenario: 'each-circuit', ...(like ? { like } : {}) });
  if (outcome.kind !== 'solved') throw new Error(outcome.reason);
  return outcome.solution;
};
const withRun = (job: Job, at: number, change: Partial<Run>): Job => ({
  ...job,
  runs: job.runs.map((run, i) => (i === at ? { ...run, ...change } : run)),
});

describe('a job that is like another but for one run', () => {
  it.each([
    ['tannery-row', 'LP-2-20', { size: '6 AWG' }],
    ['tannery-row', 'F8', { size: '4/0 AWG', material: 'aluminum', sets: 2 }],
    ['tannery-row', 'F8', { length: 12.5 }],
    ['tannery-row', 'F8', { length: 0 }],
    ['weaving-hall', 'OF-1.2', { size: '6 mm2', neutralSize: '4 mm2' }],
    ['ridge-cabin', 'DC-2-3', { size: null, ohms: { r: 2, x: 0, per: 'km', neutral: null } }],
  ] as [string, string, Partial<Run>][])('%s, %s as %j: what the job by itself gives', (name, id, change) => {
    const job = jobOf(name);
    const at = job.runs.findIndex((run) => run.id === id);
    expect(at).toBeGreaterThanOrEqual(0);
    solved(job);
    const shared = solved(withRun(job, at, change), { job, run: at });
    expect(shared).toEqual(solved(withRun(job, at, change)));
    expect(shared).not.toEqual(solved(job));
  });

  it('takes a run from no length to some: nodes that were one part again', () => {
    const job = jobOf('tannery-row');
    const at = job.runs.findIndex((run) => run.id === 'F8');
    const joined = withRun(job, at, { length: 0 });
    expect(solved({ ...job }, { job: joined, run: at })).toEqual(solved(job));
  });
});
