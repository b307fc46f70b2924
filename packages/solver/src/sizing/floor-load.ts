import type { Beyond, Conductor, Job, RunResult } from '../job/index.ts';
import { loadRating } from '../job/load-rating.ts';
import type { BusSystem } from '../job/systems.ts';
import { emfBetween, magnitude, pairConductors } from '../job/systems.ts';
import type { FloorLoad } from './floor.ts';

const LINES = ['L1', 'L2', 'L3'] as const;

interface Rated {
  amps: number;
  va: number;
  demand: number;
  continuous: boolean;
  lines: readonly Conductor[];
}

/**
 * The load that the ampacity floor of a run is held against. A branch run: its loads as entered, in full, added on
 * each line (the most loaded one counts). Any other run: the amperes of its most loaded line at design demand, with
 * the share of continuous load taken by volt-amperes beyond. Generation counts for nothing.
 */
export function floorLoad(
  job: Job,
  index: number,
  beyond: Beyond | null,
  systems: ReadonlyMap<string, BusSystem>,
  design: RunResult,
): FloorLoad {
  const rated = (beyond?.loads ?? []).flatMap((i) => ratedLoad(job, i, systems) ?? []);
  if (job.runs[index]!.kind === 'branch' && beyond) return busiestLine(rated);
  const amps = Math.max(0, ...LINES.map((c) => design.amps?.[c] ?? 0));
  const va = (list: readonly Rated[]) => list.reduce((sum, load) => sum + load.va * load.demand, 0);
  const all = va(rated);
  const share = all > 0 ? va(rated.filter((load) => load.continuous)) / all : 0;
  return { amps, continuousAmps: amps * share };
}

const busiestLine = (rated: readonly Rated[]): FloorLoad => {
  const on = (line: Conductor, continuous: boolean) =>
    rated
      .filter((load) => load.lines.includes(line) && (!continuous || load.continuous))
      .reduce((sum, load) => sum + load.amps, 0);
  const lines = LINES.map((line) => ({ amps: on(line, false), continuousAmps: on(line, true) }));
  return lines.reduce((most, line) => (line.amps > most.amps ? line : most));
};

const ratedLoad = (job: Job, index: number, systems: ReadonlyMap<string, BusSystem>): Rated | null => {
  const load = job.loads[index]!;
  const bus = load.bus ?? job.runs.find((run) => run.id === load.along)!.from;
  const emfs = systems.get(bus)?.origin.emfs;
  const three = load.terminals === 'three-phase';
  const [a, b] = load.terminals === 'three-phase' ? (['L1', 'L2'] as const) : pairConductors(load.terminals);
  const across = emfs && emfBetween(emfs, a, b);
  const volts = across ? magnitude(across) : 0;
  const rating = volts > 0 ? loadRating(load, volts, job.frequency) : null;
  if (!rating || rating.amps <= 0) return null;
  const va = rating.amps * volts * (three ? Math.sqrt(3) : 1);
  const demand = load.demandVa === null ? load.demand : load.demandVa / va;
  const lines = three ? LINES : ([a, b] as const).filter((c) => c !== 'N');
  return { amps: rating.amps, va, demand, continuous: load.continuous, lines };
};
