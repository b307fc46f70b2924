import { type CircuitField, changeCircuitFieldEdit, circuitParts } from '@farlug/contract/schedule';
import type { EditChain } from './edit-chain.ts';

export interface BreakerDraft {
  breaker: string;
  breakerSpaces: string;
}

/** Breaker and spaces of the circuit that feeds something; what is left empty stays as it is. */
export function typeBreaker(chain: EditChain, circuitId: string, draft: BreakerDraft): void {
  if (circuitParts(chain.rows, circuitId)?.circuit.kind !== 'feeder') return;
  const type = (field: CircuitField, at: keyof BreakerDraft, word: string) => {
    if (draft[at].trim() === '') return;
    const change = changeCircuitFieldEdit(chain.rows, circuitId, field, draft[at]);
    chain.take(at, { ...change, problem: change.problem && `${word} ${change.problem}.` });
  };
  type('breaker', 'breaker', 'Breaker');
  type('spaces', 'breakerSpaces', 'Spaces');
}
