/** The network cannot be solved: at which bus, run, source or load, and why. */
export interface Refusal {
  kind: 'unsolvable';
  at: string;
  reason: string;
}
export const refusal = (at: string, reason: string): Refusal => ({ kind: 'unsolvable', at, reason });
