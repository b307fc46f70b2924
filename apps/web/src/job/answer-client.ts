import { type JobRows, listsFromRows } from '@farlug/contract/rows';
import type { Scenario } from '@farlug/solver/job';
import type { Answer, AnswerTo } from '../workers/answers.ts';
import type { FromAnswerer, ToAnswerer } from '../workers/protocol.ts';
import type { Question } from '../workers/questions.ts';

/** What a client needs of a worker. */
export interface AnswerWorker {
  postMessage(message: ToAnswerer): void;
  terminate(): void;
}
type Listen = (message: FromAnswerer) => void;

interface Asked {
  scenario: Scenario;
  question: Question;
  resolve: (answer: Answer) => void;
}

/**
 * The page's side of the worker that answers questions. Where a question is no longer wanted while it is still being
 * worked on, the next one does not wait for it: the worker is started anew.
 */
export class AnswerClient {
  private readonly rowsNow: () => JobRows;
  private readonly start: (listen: Listen) => AnswerWorker;
  private worker: AnswerWorker | null = null;
  private opened: JobRows | null = null;
  private nextId = 0;
  private readonly waiting = new Map<number, Asked>();
  private readonly unwanted = new Set<number>();

  constructor(rowsNow: () => JobRows, start: (listen: Listen) => AnswerWorker = startWorker) {
    this.rowsNow = rowsNow;
    this.start = start;
  }

  /** About the rows as they stand now. A question whose signal is aborted is never answered. */
  ask<Q extends Question>(question: Q, scenario: Scenario, signal?: AbortSignal): Promise<AnswerTo<Q>> {
    if (this.unwanted.size > 0) this.restart();
    const id = this.nextId++;
    return new Promise((resolve) => {
      this.waiting.set(id, { scenario, question, resolve: (answer) => resolve(answer as AnswerTo<Q>) });
      signal?.addEventListener('abort', () => {
        if (this.waiting.delete(id)) this.unwanted.add(id);
      });
      this.send(id);
    });
  }

  close(): void {
    this.worker?.terminate();
    this.worker = null;
  }

  private restart(): void {
    this.close();
    this.opened = null;
    this.unwanted.clear();
    for (const id of this.waiting.keys()) this.send(id);
  }

  private send(id: number): void {
    const asked = this.waiting.get(id);
    if (!asked) return;
    this.worker ??= this.start((message) => this.receive(message));
    const rows = this.rowsNow();
    if (rows !== this.opened) {
      this.opened = rows;
      this.worker.postMessage({ kind: 'open', rows: listsFromRows(rows) });
    }
    this.worker.postMessage({ kind: 'ask', id, scenario: asked.scenario, question: asked.question });
  }

  private receive(message: FromAnswerer): void {
    if (message.kind === 'fault') {
      const answer: Answer = { kind: 'none', reason: `The solver stopped: ${message.message}` };
      for (const { resolve } of this.waiting.values()) resolve(answer);
      this.waiting.clear();
      this.unwanted.clear();
      this.close();
      this.opened = null;
      return;
    }
    this.unwanted.delete(message.id);
    this.waiting.get(message.id)?.resolve(message.answer);
    this.waiting.delete(message.id);
  }
}

function startWorker(listen: Listen): AnswerWorker {
  const worker = new Worker(new URL('../workers/answer-worker.ts', import.meta.url), { type: 'module' });
  worker.addEventListener('message', (event: MessageEvent<FromAnswerer>) => listen(event.data));
  worker.addEventListener('error', (event) => listen({ kind: 'fault', message: event.message }));
  return worker;
}
