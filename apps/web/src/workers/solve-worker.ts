import { applyEdit } from '@farlug/contract/edit';
import { jobFromRows } from '@farlug/contract/job';
import { type JobRows, rowsFromLists } from '@farlug/contract/rows';
import type { Scenario } from '@farlug/solver/job';
import { jobResult, type PreparedRows, prepareRows } from './job-result.ts';
import type { FromSolver, ToSolver } from './protocol.ts';

/** Solves the newest rows in the newest scenario: edits that arrive together are solved once. */
const scope = self as unknown as { postMessage(message: FromSolver): void };
let rows: JobRows | null = null;
let generation = 0;
let scenario: Scenario = 'each-circuit';
let prepared: PreparedRows | null = null;
let woken = false;

self.addEventListener('message', ({ data }: MessageEvent<ToSolver>) => {
  if (data.kind === 'scenario') scenario = data.scenario;
  else {
    generation = data.generation;
    prepared = null;
    if (data.kind === 'open') rows = rowsFromLists(data.rows);
    else if (rows) {
      const outcome = applyEdit(rows, data.edit);
      if (outcome.ok) rows = outcome.rows;
    }
  }
  if (woken) return;
  woken = true;
  // A macrotask: messages that are waiting are taken in first.
  setTimeout(solve);
});

function solve(): void {
  woken = false;
  if (!rows) return;
  try {
    prepared ??= prepareRows(jobFromRows(rows));
    const result = jobResult(prepared, scenario, generation, () => performance.now());
    scope.postMessage({ kind: 'result', result });
  } catch (error) {
    scope.postMessage({ kind: 'fault', message: error instanceof Error ? error.message : String(error) });
  }
}
