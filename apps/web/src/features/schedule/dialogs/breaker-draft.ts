import {
  type CircuitField,
  changeCircuitFieldEdit,
  circuitParts,
  type Feed,
} from '@farlug/contract/schedule';
import { parseBreaker } from '@farlug/solver/units';
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

/** A feed with poles and amps as typed for its breaker; null where that text is no breaker. */
export function withBreaker(feed: Feed, typed: string): Feed | null {
  if ('busId' in feed || typed.trim() === '') return feed;
  const read = parseBreaker(typed, 3);
  return read.ok ? { ...feed, poles: read.poles, amps: String(read.amps) } : null;
}
