import { type JobRows, listsFromRows } from '@farlug/contract/rows';
import type { Scenario } from '@farlug/solver/job';
import type { AnswerTo } from '../workers/answers.ts';
import type { FromSolver, ToSolver } from '../workers/protocol.ts';
import type { Question } from '../workers/questions.ts';
import type { JobResult } from '../workers/results.ts';
import { AnswerClient } from './answer-client.ts';
import type { RowsChange } from './replica.ts';

export interface SolverSnapshot {
  scenario: Scenario;
  /** The newest result, kept on the page while the next one is being found. */
  result: JobResult | null;
  /** True while the result is older than the rows or of another scenario. */
  solving: boolean;
  fault: string | null;
}

/** The page's side of the solver's worker: follows the rows, drops stale results. */
export class SolverClient {
  private readonly worker: Worker;
  private generation = 0;
  private readonly answers: AnswerClient;
  private readonly listeners = new Set<() => void>();
  private snapshot: SolverSnapshot = { scenario: 'each-circuit', result: null, solving: true, fault: null };

  constructor(rowsNow: () => JobRows) {
    this.worker = new Worker(new URL('../workers/solve-worker.ts', import.meta.url), { type: 'module' });
    this.worker.addEventListener('message', (event: MessageEvent<FromSolver>) => this.receive(event.data));
    this.worker.addEventListener('error', (event) => this.update({ fault: event.message, solving: false }));
    this.answers = new AnswerClient(rowsNow);
    this.open(rowsNow());
  }

  getSnapshot = (): SolverSnapshot => this.snapshot;
  subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  follow(change: RowsChange): void {
    if (change.kind === 'rows') {
      this.open(change.rows);
      return;
    }
    this.generation += 1;
    this.send({ kind: 'apply', generation: this.generation, edit: change.edit });
    this.update({ solving: true });
  }

  setScenario(scenario: Scenario): void {
    if (scenario === this.snapshot.scenario) return;
    this.send({ kind: 'scenario', scenario });
    this.update({ scenario, solving: true });
  }

  /** Asks about the rows as they stand, in the scenario that is chosen; never answered once `signal` is aborted. */
  ask<Q extends Question>(question: Q, signal?: AbortSignal): Promise<AnswerTo<Q>> {
    return this.answers.ask(question, this.snapshot.scenario, signal);
  }

  close(): void {
    this.worker.terminate();
    this.answers.close();
  }

  private open(rows: JobRows): void {
    this.generation += 1;
    this.send({ kind: 'open', generation: this.generation, rows: listsFromRows(rows) });
    this.update({ solving: true });
  }

  private receive(message: FromSolver): void {
    if (message.kind === 'fault') {
      this.update({ fault: message.message, solving: false });
      return;
    }
    const { generation, scenario } = message.result;
    if (scenario !== this.snapshot.scenario) return;
    this.update({ result: message.result, solving: generation < this.generation, fault: null });
  }

  private send(message: ToSolver): void {
    this.worker.postMessage(message);
  }

  private update(change: Partial<SolverSnapshot>): void {
    this.snapshot = { ...this.snapshot, ...change };
    for (const listener of this.listeners) listener();
  }
}
