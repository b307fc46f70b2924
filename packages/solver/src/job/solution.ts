import type { Pair, Scenario, Terminals, Verdict } from './vocabulary.ts';

/** (re, im) in volts, amps or ohms. */
export type Phasor = readonly [re: number, im: number];

/** A remark or a problem at a place in the job file, as `runs[3].length`. */
export interface Problem {
  path: string;
  message: string;
}
export interface Warning {
  at: string;
  text: string;
}

export interface BusResult {
  id: string;
  /** Magnitudes in volts: pairs, and N against earth. `null` where the bus is unserved. */
  volts: Partial<Record<Pair | 'N', number>> | null;
  phasors: Partial<Record<'L1' | 'L2' | 'L3' | 'N', Phasor>> | null;
  /** Panels only. */
  feederPercent?: number | null;
  verdict?: Verdict;
}

export interface RunResult {
  id: string;
  /** Amps of each conductor, all sets together; `null` for a run of zero impedance and an open run. */
  amps: Partial<Record<'L1' | 'L2' | 'L3' | 'N', number>> | null;
  dropVolts: number | null;
  dropPercent: number | null;
  lossWatts: number | null;
  verdict: Verdict;
}

export interface LoadResult {
  id: string;
  terminals: Terminals;
  /** Everything below is `null` for an unserved load. Percent of nominal EMF between the terminals. */
  volts: number | null;
  dropVolts: number | null;
  dropPercent: number | null;
  sourcePercent: number | null;
  servicePercent: number | null;
  transformerPercent: number | null;
  feederPercent: number | null;
  branchPercent: number | null;
  totalPercent: number | null;
  limitPercent: number | null;
  verdict: Verdict;
  reasons: string[];
  /** The turn that gave the figures: a line (`L1`), `all` for a circuit's full turn, `null` outside each-circuit. */
  turn: 'L1' | 'L2' | 'L3' | 'all' | null;
  headroomAmps: number | null;
  thevenin: Phasor | null;
  startingPercent: number | null;
}

export interface Totals {
  sourceWatts: number;
  loadWatts: number;
  lossWatts: number;
  kclResidual: number;
  iterations: number;
}

/** What `solve` prints: `farlug-solution/1`. Full double precision, in the order of the input. */
export interface Solution {
  format: 'farlug-solution/1';
  scenario: Scenario;
  buses: BusResult[];
  runs: RunResult[];
  loads: LoadResult[];
  totals: Totals;
  warnings: Warning[];
}

export type ParseOutcome<J> = { ok: true; job: J; warnings: Warning[] } | { ok: false; problems: Problem[] };

export type SolveOutcome =
  | { kind: 'solved'; solution: Solution }
  /** The network: which bus or load, and why. */
  | { kind: 'unsolvable'; at: string; reason: string };
