import type { Complex } from './complex.ts';
import type { Sink } from './equations.ts';
import type { Drawn } from './sinks.ts';

export interface State {
  drawn: Map<string, Drawn>;
  /** Credits of diversity, whatever the voltages. */
  credits: Sink[];
}

export type VoltageAt = (node: string) => Complex;
