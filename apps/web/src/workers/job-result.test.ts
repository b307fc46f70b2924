import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { jobFromRows, rowsFromJob } from '@farlug/contract/job';
import { type JobRows, rowsFromLists } from '@farlug/contract/rows';
import { parseJob } from '@farlug/solver/job';
import { describe, expect, it } from 'vitest';
import { jobResult, prepareRows } from './job-result.ts';

const rowsOf = (name: string): JobRows => {
  const path = join(import.meta.dirname, '../../../../fixtures/jobs', `${name}.json`);
  const parsed = parseJob(JSON.parse(readFileSync(path, 'utf8')));
  if (!parsed.ok) throw new Error(parsed.problems[0]!.message);
  return rowsFromLists(rowsFromJob(parsed.job));
};
const resultOf = (rows: JobRows, scenario: 'each-circuit' | 'light' = 'each-circuit') =>
  jobResult(prepareRows(jobFromRows(rows)), scenario, 3, () => 0);

describe('results by row', () => {
  it('gives every served row its figures, circuits by their worst load, and the counts', () => {
    const rows = rowsOf('tannery-row');
    const result = resultOf(rows);
    expect(result).toMatchObject({ generation: 3, state: 'solved', trouble: [], leftOutCount: 0 });
    expect(result.loads.size).toBe(rows.load.size);
    expect(result.runs.size).toBe(rows.run.size);
    expect(result.panels.size).toBe(rows.panel.size);
    const total = Object.values(result.counts).reduce((sum, n) => sum + n, 0);
    expect(total).toBe(result.circuits.size);
    const over = [...result.circuits.values()].filter(({ shown }) => shown === 'over');
    expect(over.length).toBe(result.counts.over);
    for (const circuit of result.circuits.values())
      for (const load of circuit.loads)
        expect(Math.abs(load.totalPercent!)).toBeLessThanOrEqual(Math.abs(circuit.worst.totalPercent!) + 10);
    expect(result.worst?.worst.verdict).toBe('over');
  });

  it('follows a change of a row: a circuit twice as long drops twice as much in its branch', () => {
    const rows = rowsOf('tannery-row');
    const before = resultOf(rows).worst!;
    const branch = [...rows.run.values()].find((run) => run.circuitId === before.circuitId)!;
    const length = branch.length!.replace(/^[\d.]+/, (feet) => String(2 * Number(feet)));
    const longer = { ...rows, run: new Map(rows.run).set(branch.id, { ...branch, length }) };
    const after = resultOf(longer).loads.get(before.worst.row)!;
    expect(after.branchPercent! / before.worst.branchPercent!).toBeCloseTo(2, 1);
  });

  it('says why nothing can be computed, and which row it is about', () => {
    const rows = rowsOf('ridge-cabin');
    const [load] = rows.load.values();
    const huge = {
      ...rows,
      load: new Map(rows.load).set(load!.id, { ...load!, behaviour: 'power' as const, size: '90000 kW' }),
    };
    const result = resultOf(huge);
    expect(result.state).toBe('stopped');
    expect(result.trouble[0]).toMatchObject({ at: { table: 'load', row: load!.id } });
    expect(result.trouble[0]!.text).toMatch(/cannot be served/);
  });

  it('leaves a row without a length out, counts it, and judges the rest', () => {
    const rows = rowsOf('tannery-row');
    const branch = [...rows.run.values()].find((run) => run.kind === 'branch')!;
    const unfinished = {
      ...rows,
      run: new Map(rows.run).set(branch.id, { ...branch, length: null, lengthState: null }),
    };
    const result = resultOf(unfinished);
    expect(result).toMatchObject({ state: 'solved', leftOutCount: 1 });
    expect(result.runs.has(branch.id)).toBe(false);
    expect(result.runs.size).toBe(rows.run.size - 1);
  });
});
