import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { parseJob } from '../job/index.ts';
import { circuitsOf } from './circuits-of.ts';
import { prepareJob } from './solve-job.ts';

const prepared = (name: string) => {
  const path = new URL(`../../../../fixtures/jobs/${name}.json`, import.meta.url);
  const parsed = parseJob(JSON.parse(readFileSync(path, 'utf8')));
  if (!parsed.ok) throw new Error(parsed.problems[0]!.message);
  const outcome = prepareJob(parsed.job);
  if (outcome.kind !== 'prepared') throw new Error(outcome.reason);
  return outcome;
};
const solved = (name: string, scenario: 'each-circuit' | 'design') => {
  const { job, solve, shownRuns } = prepared(name);
  const outcome = solve(scenario);
  if (outcome.kind !== 'solved') throw new Error(outcome.reason);
  return { job, solution: outcome.solution, runs: shownRuns(outcome.solution) };
};

describe('runs as pages show them', () => {
  it('shows a branch run with one load at its end as its load shows it: branch percent', () => {
    const { job, solution, runs } = solved('tannery-row', 'each-circuit');
    const circuits = circuitsOf(job);
    if ('kind' in circuits) throw new Error(circuits.reason);
    const single = circuits.filter(({ runs, loads }) => runs.length === 1 && loads.length === 1);
    const twoWire = single.filter(({ loads }) =>
      loads.some((id) => /-N$/.test(byId(solution.loads, id).terminals)),
    );
    expect(twoWire.length).toBeGreaterThan(20);
    for (const {
      runs: [run],
      loads: [load],
    } of twoWire)
      expect(byId(runs, run!).dropPercent).toBeCloseTo(byId(solution.loads, load!).branchPercent!, 9);
  });

  it('shows one run alone as it shows it among all', () => {
    const { job, solve, shownRuns } = prepared('tannery-row');
    const outcome = solve('each-circuit');
    if (outcome.kind !== 'solved') throw new Error(outcome.reason);
    const all = shownRuns(outcome.solution);
    const at = job.runs.findIndex(({ id }) => id === 'LP-2-20');
    const alone = shownRuns(outcome.solution, at);
    expect(alone[at]).toEqual(all[at]);
    expect(alone[at]).not.toEqual(outcome.solution.runs[at]);
    expect(alone.filter((run, i) => run !== outcome.solution.runs[i])).toHaveLength(1);
  });

  it('leaves feeders at design demand, and every run in the other scenarios', () => {
    const { job, solution, runs } = solved('tannery-row', 'each-circuit');
    for (const { id } of job.runs.filter(({ kind }) => kind !== 'branch'))
      expect(byId(runs, id)).toEqual(byId(solution.runs, id));
    const design = solved('tannery-row', 'design');
    expect(design.runs).toEqual(design.solution.runs);
  });
});

const byId = <T extends { id: string }>(list: readonly T[], id: string): T =>
  list.find((each) => each.id === id)!;
