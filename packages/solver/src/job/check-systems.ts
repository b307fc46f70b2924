import { motorAmps } from '../tables/motors.ts';
import type { Report } from './draft.ts';
import type { Job } from './schema.ts';
import type { BusSystem, Emfs, Origin } from './systems.ts';
import { emfBetween, magnitude, pairConductors, sourceOrigin } from './systems.ts';
import type { Conductor, Terminals } from './vocabulary.ts';
import { SYSTEM_CONDUCTORS } from './vocabulary.ts';

/** Systems are joined only where no EMF differs by more than this, in angle and in size. */
const TAN_1_DEGREE = 0.017455064928217585;
const LARGEST_RATIO = 0.1;

/** Frequency against systems: 0 exactly when every system is direct current. */
export function checkFrequency(job: Job, report: Report): void {
  const direct = job.frequency === 0;
  job.sources.forEach((source, i) => {
    if (direct !== (source.system === 'dc-2w'))
      report(
        `sources[${i}].system`,
        direct
          ? `must be dc-2w at frequency 0; is ${source.system}`
          : `must not be dc-2w at ${job.frequency} Hz; frequency 0 is direct current`,
      );
  });
  if (direct && job.transformers.length > 0)
    report('transformers', 'must be empty at frequency 0: a transformer passes no direct current');
}

/** What two systems disagree on between the conductors of a join, in words, or `null`. */
export function emfMismatch(a: Emfs, b: Emfs, conductors: readonly Conductor[]): string | null {
  for (const [i, one] of conductors.entries())
    for (const other of conductors.slice(i + 1)) {
      const first = emfBetween(a, one, other);
      const second = emfBetween(b, one, other);
      if (!first || !second) continue;
      const [x, y] = [magnitude(first), magnitude(second)];
      if (Math.abs(y - x) > LARGEST_RATIO * x) return `${one}-${other} is ${volts(x)} and ${volts(y)}`;
      const dot = first[0] * second[0] + first[1] * second[1];
      const cross = Math.abs(first[0] * second[1] - first[1] * second[0]);
      if (dot <= 0 || cross > TAN_1_DEGREE * dot) return `${one}-${other} differs in angle`;
    }
  return null;
}

const volts = (value: number): string => `${Number(value.toFixed(1))} V`;
const named = (origin: Origin): string => `${origin.system} at ${volts(origin.volts)}`;

/** Conductors that lead nowhere, and systems joined that differ. */
export function checkJoins(job: Job, systems: ReadonlyMap<string, BusSystem>, report: Report): void {
  job.runs.forEach((run, i) => {
    const from = systems.get(run.from);
    const to = systems.get(run.to);
    if (!from || !to) return;
    const missing = run.conductors.filter((c) => !from.conductors.includes(c) && !to.conductors.includes(c));
    if (missing.length > 0)
      report(
        `runs[${i}].conductors`,
        `must be conductors of its buses; ${missing.join(', ')} ${missing.length > 1 ? 'are' : 'is'} neither at "${run.from}" nor at "${run.to}" (${named(from.origin)}, with ${from.conductors.join(', ')})`,
      );
    if (from.origin === to.origin) return;
    const mismatch = emfMismatch(from.origin.emfs, to.origin.emfs, run.conductors);
    if (mismatch)
      report(
        `runs[${i}].to`,
        `must join equal systems; "${run.from}" is ${named(from.origin)}, "${run.to}" is ${named(to.origin)}: ${mismatch}`,
      );
  });
  job.sources.forEach((source, i) => {
    const there = systems.get(source.bus)!.origin;
    if (there.source === i && there.transformer === null) return;
    const own = sourceOrigin(job, i);
    const mismatch = emfMismatch(there.emfs, own.emfs, SYSTEM_CONDUCTORS[source.system]);
    if (mismatch)
      report(
        `sources[${i}].bus`,
        `must join equal systems; "${source.bus}" is ${named(there)}, this source is ${named(own)}: ${mismatch}`,
      );
  });
}

const needed = (terminals: Terminals): readonly Conductor[] =>
  terminals === 'three-phase' ? ['L1', 'L2', 'L3'] : pairConductors(terminals);

/** Terminals that a bus does not have, and motors that the tables do not print. */
export function checkLoads(job: Job, systems: ReadonlyMap<string, BusSystem>, report: Report): void {
  const runs = new Map(job.runs.map((run) => [run.id, run]));
  job.loads.forEach((load, i) => {
    const along = load.along === null ? null : runs.get(load.along)!;
    const system = systems.get(along ? along.from : load.bus!);
    if (load.hp !== null && job.frequency === 0) {
      report(
        `loads[${i}].hp`,
        'must be amps or watts on direct current: the motor tables are for alternating current',
      );
      return;
    }
    if (!system) return;
    const has = along ? along.conductors : system.conductors;
    const missing = needed(load.terminals).filter((c) => !has.includes(c));
    if (missing.length > 0) {
      const where = along ? `run "${along.id}"` : `bus "${load.bus}"`;
      report(
        `loads[${i}].terminals`,
        `must be terminals that are there; ${where} has no ${missing.join(' and no ')}, it has ${has.join(', ')}`,
      );
      return;
    }
    if (load.hp === null) return;
    const motor = motorAmps({ hp: load.hp, ...nominalMotor(load.terminals, system.origin.emfs) });
    if (!motor.ok) report(`loads[${i}].hp`, motor.message);
  });
  job.readings.forEach((reading, i) => {
    const system = systems.get(reading.bus);
    const missing = needed(reading.terminals).filter((c) => system && !system.conductors.includes(c));
    if (missing.length > 0)
      report(
        `readings[${i}].terminals`,
        `must be terminals of the bus; "${reading.bus}" has no ${missing.join(' and no ')}`,
      );
  });
}

/** Phases and nominal volts of a motor at these terminals: of its pair, or between lines. */
export function nominalMotor(terminals: Terminals, emfs: Emfs): { phases: 1 | 3; volts: number } {
  const [a, b] = terminals === 'three-phase' ? (['L1', 'L2'] as const) : pairConductors(terminals);
  return { phases: terminals === 'three-phase' ? 3 : 1, volts: magnitude(emfBetween(emfs, a, b)!) };
}
