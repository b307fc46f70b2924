import type { Scenario } from '@farlug/solver/job';
import { SCENARIOS } from '@farlug/solver/job';
import { useCallback, useEffect, useState, useSyncExternalStore } from 'react';
import { useSearchParams } from 'react-router-dom';
import type { AnswerTo } from '../workers/answers.ts';
import type { Question } from '../workers/questions.ts';
import { useOpenJob } from './open-job.tsx';
import type { SolverSnapshot } from './solver-client.ts';

export function useResult(): SolverSnapshot {
  const { solver } = useOpenJob();
  return useSyncExternalStore(solver.subscribe, solver.getSnapshot);
}

const isScenario = (text: string | null): text is Scenario =>
  (SCENARIOS as readonly string[]).includes(text ?? '');

/** The scenario stands in the address, so that a link shows what its sender saw. */
export function useScenario(): [Scenario, (scenario: Scenario) => void] {
  const { solver } = useOpenJob();
  const [params, setParams] = useSearchParams();
  const named = params.get('scenario');
  const scenario = isScenario(named) ? named : 'each-circuit';
  useEffect(() => solver.setScenario(scenario), [solver, scenario]);
  const choose = useCallback(
    (next: Scenario) =>
      setParams(
        (before) => {
          const after = new URLSearchParams(before);
          if (next === 'each-circuit') after.delete('scenario');
          else after.set('scenario', next);
          return after;
        },
        { replace: true },
      ),
    [setParams],
  );
  return [scenario, choose];
}

/** Nobody waits for what is passed by on the way to another row. */
const PAUSE_MS = 120;

/** The worker's answer, asked anew whenever the result changes; the last one stands until then. */
export function useAnswer<Q extends Question>(question: Q | null): AnswerTo<Q> | null {
  const { solver } = useOpenJob();
  const { result, solving } = useResult();
  const key = question === null ? null : JSON.stringify(question);
  const [kept, setKept] = useState<{ key: string; answer: AnswerTo<Q> } | null>(null);
  useEffect(() => {
    if (key === null || solving) return;
    const unwanted = new AbortController();
    const timer = setTimeout(() => {
      void solver.ask(JSON.parse(key) as Q, unwanted.signal).then((answer) => {
        if (!unwanted.signal.aborted) setKept({ key, answer });
      });
    }, PAUSE_MS);
    return () => {
      clearTimeout(timer);
      unwanted.abort();
    };
  }, [solver, key, result, solving]);
  return kept !== null && kept.key === key ? kept.answer : null;
}
