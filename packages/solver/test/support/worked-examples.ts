import type { JobFile, LoadResult, RunResult, Scenario, Solution } from '@farlug/solver/job';
import { jobFile, type LoadFile, ohmRun, type RunFile } from './job-file.ts';
import { reference } from './reference.ts';

export interface WorkedRow {
  id: string;
  title: string;
  answers: {
    quantity: string;
    published: number;
    as_printed: string;
    unit: string;
    tolerance_abs: number;
  }[];
}
export const workedRows = reference<{ rows: WorkedRow[] }>('worked-examples').rows;

export type Solve = (job: JobFile, scenario: Scenario) => Solution;
/** An example as one or more jobs: every quantity that it prints, read from our solutions. */
export type Example = (solve: Solve) => Record<string, number>;

/** Looks things up in a solution, and throws where they are missing. */
export const look = (solution: Solution) => {
  const load = (id: string): LoadResult => found(solution.loads, id);
  const run = (id: string): RunResult => found(solution.runs, id);
  return {
    load,
    run,
    volts: (id: string): number => load(id).volts!,
    amps: (id: string, conductor: 'L1' | 'L2' | 'L3' | 'N' = 'L1'): number => run(id).amps![conductor]!,
    /** Amps with the sign of the drop: positive from `from` to `to` on direct current. */
    flow: (id: string): number => run(id).amps!.L1! * Math.sign(run(id).dropVolts!),
    busVolts: (id: string): number => found(solution.buses, id).volts!['L1-N']!,
    phasor: (id: string, conductor: 'L1' | 'L2' | 'L3' | 'N') =>
      found(solution.buses, id).phasors![conductor]!,
  };
};
const found = <T extends { id: string }>(list: T[], id: string): T => {
  const item = list.find((each) => each.id === id);
  if (!item) throw new Error(`nothing called ${id}`);
  return item;
};

const METER_OHMS = 1e-6;
/** A run of 1 µΩ that only shows amps. */
export const meter = (id: string, from: string, to: string, conductors: RunFile['conductors']): RunFile =>
  ohmRun(id, from, to, conductors, METER_OHMS);

/** A two-wire direct-current job; `r` of the runs is that of both wires together. */
export const direct = (
  sources: [bus: string, volts: number, openVolts?: number][],
  runs: RunFile[],
  loads: LoadFile[],
): JobFile =>
  jobFile({
    frequency: 0,
    sources: sources.map(([bus, volts, openVolts], k) => ({
      id: `s${k}`,
      bus,
      system: 'dc-2w',
      volts,
      openVolts,
    })),
    runs,
    loads,
  });
export const pairRun = (id: string, from: string, to: string, goAndReturn: number): RunFile =>
  ohmRun(id, from, to, ['L1', 'N'], goAndReturn / 2);
/** A run whose return is a node of no impedance: the network's reference. */
export const groundRun = (id: string, from: string, to: string, ohms: number): RunFile =>
  ohmRun(id, from, to, ['L1', 'N'], ohms, 0, { neutral: { r: 0, x: 0 } });
export const draws = (bus: string, amps: number): LoadFile => ({ id: bus, bus, terminals: 'L1-N', amps });
export const resists = (bus: string, ohms: number, volts: number): LoadFile => ({
  ...draws(bus, volts / ohms),
  behaviour: 'impedance',
  minimum: 1,
});
export const spreads = (run: string, amps: number): LoadFile => ({
  id: `along ${run}`,
  along: run,
  terminals: 'L1-N',
  amps,
});
/** A point that draws nothing, to read the voltage at. */
export const reads = (bus: string): LoadFile => draws(bus, 0);
