import { JOB_TABLE_NAMES, type JobRows } from '@farlug/contract/rows';
import { expect, test } from 'vitest';
import type { FromAnswerer, ToAnswerer } from '../workers/protocol.ts';
import { AnswerClient } from './answer-client.ts';

const rowsOf = (): JobRows =>
  Object.fromEntries(JOB_TABLE_NAMES.map((name) => [name, new Map()])) as unknown as JobRows;

/** Workers that answer when they are told to. */
function workshop() {
  const started: { sent: ToAnswerer[]; ended: boolean; say: (message: FromAnswerer) => void }[] = [];
  const start = (listen: (message: FromAnswerer) => void) => {
    const one = { sent: [] as ToAnswerer[], ended: false, say: listen };
    started.push(one);
    return {
      postMessage: (message: ToAnswerer) => one.sent.push(message),
      terminate: () => {
        one.ended = true;
      },
    };
  };
  return { started, start };
}
const question = { kind: 'sizes', run: 'r' } as const;
const none = (reason: string) => ({ kind: 'none', reason }) as const;

test('rows go over before the question, and again only when they changed', async () => {
  let rows = rowsOf();
  const { started, start } = workshop();
  const client = new AnswerClient(() => rows, start);
  const first = client.ask(question, 'each-circuit');
  started[0]!.say({ kind: 'answer', id: 0, answer: none('one') });
  expect(await first).toEqual(none('one'));
  void client.ask(question, 'light');
  rows = rowsOf();
  void client.ask(question, 'light');
  expect(started[0]!.sent.map(({ kind }) => kind)).toEqual(['open', 'ask', 'ask', 'open', 'ask']);
});

test('what is no longer wanted holds up nothing: the worker starts anew with what still is', () => {
  const rows = rowsOf();
  const { started, start } = workshop();
  const client = new AnswerClient(() => rows, start);
  const passing = new AbortController();
  void client.ask(question, 'each-circuit', passing.signal);
  void client.ask({ kind: 'hand-check', runs: ['r'] }, 'each-circuit');
  passing.abort();
  void client.ask({ kind: 'sizes', run: 's' }, 'each-circuit');
  expect(started).toHaveLength(2);
  expect(started[0]!.ended).toBe(true);
  expect(started[1]!.sent.map((sent) => (sent.kind === 'ask' ? sent.question.kind : sent.kind))).toEqual([
    'open',
    'hand-check',
    'sizes',
  ]);
});

test('an answer that came in time is no reason to start anew', () => {
  const { started, start } = workshop();
  const rows = rowsOf();
  const client = new AnswerClient(() => rows, start);
  const asked = new AbortController();
  void client.ask(question, 'each-circuit', asked.signal);
  started[0]!.say({ kind: 'answer', id: 0, answer: none('done') });
  asked.abort();
  void client.ask(question, 'each-circuit');
  expect(started).toHaveLength(1);
});

test('a fault of the worker is an answer in words, and the next question finds a fresh one', async () => {
  const { started, start } = workshop();
  const rows = rowsOf();
  const client = new AnswerClient(() => rows, start);
  const asked = client.ask(question, 'each-circuit');
  started[0]!.say({ kind: 'fault', message: 'out of memory' });
  expect(await asked).toEqual(none('The solver stopped: out of memory'));
  void client.ask(question, 'each-circuit');
  expect(started).toHaveLength(2);
});
