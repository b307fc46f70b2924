import { applyEdit } from '@farlug/contract/edit';
import { jobFromRows } from '@farlug/contract/job';
import { type JobRows, rowsFromLists } from '@farlug/contract/rows';
import type { Scenario } from '@farlug/solver/job';
import { jobResult, prepareRows } from '../../../workers/job-result.ts';
import type { ToSolver } from '../../../workers/protocol.ts';

/** Solves in the page's own thread, a turn later, as the worker does in its own. */
export class SolverWorker extends EventTarget {
  private rows: JobRows | null = null;
  private scenario: Scenario = 'each-circuit';
  private generation = 0;
  private ended = false;

  postMessage(message: ToSolver): void {
    if (message.kind === 'scenario') this.scenario = message.scenario;
    else {
      this.generation = message.generation;
      if (message.kind === 'open') this.rows = rowsFromLists(message.rows);
      else {
        const outcome = applyEdit(this.rows!, message.edit);
        if (outcome.ok) this.rows = outcome.rows;
      }
    }
    const { generation } = this;
    setTimeout(() => {
      if (this.ended || generation !== this.generation) return;
      const result = jobResult(prepareRows(jobFromRows(this.rows!)), this.scenario, generation, () => 0);
      this.dispatchEvent(new MessageEvent('message', { data: { kind: 'result', result } }));
    });
  }

  terminate(): void {
    this.ended = true;
  }
}
