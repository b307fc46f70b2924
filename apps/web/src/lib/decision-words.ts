import type { DecisionKind } from '@farlug/contract/routes';

export const DECISION_WORDS: Record<DecisionKind, string> = {
  'no-exceptions': 'No exceptions',
  'corrections-needed': 'Corrections needed',
  other: 'In other words',
};

/** A decision as it stands in a list, whatever a newer server may call it. */
export function decisionWord(decision: string): string {
  return DECISION_WORDS[decision as DecisionKind] ?? decision;
}
