import type { Job, Transformer } from './schema.ts';
import type { Phasor } from './solution.ts';
import type { Conductor, System } from './vocabulary.ts';
import { CONDUCTORS, SYSTEM_CONDUCTORS } from './vocabulary.ts';

/**
 * The one home of what every bus nominally is: its supply system, its nominal EMF phasors (volts), its
 * open-voltage ratio and its source. The checks of a job file (`parse.ts`) and the network both read it here.
 * Only + − × ÷ and square roots are used, so that every machine gets the same bits.
 */
export type Emfs = Partial<Record<Conductor, Phasor>>;

/** A supply system as a source or a transformer secondary sets it up; shared by every bus that it reaches. */
export interface Origin {
  system: System;
  /** Nominal volts: between lines, except `1ph-2w` and `dc-2w`. */
  volts: number;
  /** Nominal phasor of each conductor that the system has, volts. */
  emfs: Emfs;
  /** `openVolts / volts` of the source; carried through transformers. */
  openRatio: number;
  /** The source that it goes back to, as its index in `job.sources`, and that source's bus. */
  source: number;
  sourceBus: string;
  /** Index in `job.transformers` of the transformer that starts it, `null` at a source. */
  transformer: number | null;
}

export interface BusSystem {
  origin: Origin;
  /** The conductors that runs, sources and transformers bring to this bus, in the usual order. */
  conductors: readonly Conductor[];
  /** False where only an open run or a source that is off leads here. */
  live: boolean;
}

const SQRT3 = Math.sqrt(3);
const add = (a: Phasor, b: Phasor): Phasor => [a[0] + b[0], a[1] + b[1]];
const minus = (a: Phasor, b: Phasor): Phasor => [a[0] - b[0], a[1] - b[1]];
const times = (a: Phasor, b: Phasor): Phasor => [a[0] * b[0] - a[1] * b[1], a[0] * b[1] + a[1] * b[0]];
const scaled = (a: Phasor, k: number): Phasor => [a[0] * k, a[1] * k];
export const magnitude = (a: Phasor): number => Math.sqrt(a[0] * a[0] + a[1] * a[1]);
const ZERO: Phasor = [0, 0];
const ONE: Phasor = [1, 0];
const LAG_120: Phasor = [-0.5, -SQRT3 / 2];
const LEAD_120: Phasor = [-0.5, SQRT3 / 2];
const LAG_30: Phasor = [SQRT3 / 2, -0.5];
const LEAD_30: Phasor = [SQRT3 / 2, 0.5];

const unit = (a: Phasor): Phasor => scaled(a, 1 / magnitude(a));

/** Three-phase star of line volts `volts`, its L1 along `direction`; a mid-point delta is referred to its N. */
const threePhase = (system: System, volts: number, direction: Phasor): Emfs => {
  const L1 = scaled(direction, volts / SQRT3);
  const L2 = times(L1, LAG_120);
  const L3 = times(L1, LEAD_120);
  if (system === '3ph-3w') return { L1, L2, L3 };
  if (system === '3ph-4w') return { L1, L2, L3, N: ZERO };
  const middle = scaled(add(L1, L3), 0.5);
  return { L1: minus(L1, middle), L2: minus(L2, middle), L3: minus(L3, middle), N: ZERO };
};

const singlePhase = (system: System, volts: number, direction: Phasor): Emfs => {
  if (system === '1ph-2w' || system === 'dc-2w') return { L1: scaled(direction, volts), N: ZERO };
  const L1 = scaled(direction, volts / 2);
  return { L1, L2: scaled(L1, -1), N: ZERO };
};

/**
 * Nominal EMF phasors (volts) of a supply system at a source.
 * `volts`: between lines; line to neutral for `1ph-2w`; L1 against N for `dc-2w`.
 */
export function nominalEmfs(system: System, volts: number): Emfs {
  if (system === '3ph-3w' || system === '3ph-4w') return threePhase(system, volts, ONE);
  if (system === '1ph-3w-wye') return { L1: [volts / SQRT3, 0], L2: scaled(LAG_120, volts / SQRT3), N: ZERO };
  if (system === '3ph-4w-delta')
    return { L1: [volts / 2, 0], L2: [0, (-volts * SQRT3) / 2], L3: [-volts / 2, 0], N: ZERO };
  return singlePhase(system, volts, ONE);
}

/** EMF between two conductors, volts; `null` where one of them has none. */
export function emfBetween(emfs: Emfs, from: Conductor, to: Conductor): Phasor | null {
  const a = emfs[from];
  const b = emfs[to];
  return a && b ? minus(a, b) : null;
}

/** The two conductors of a pair such as `L1-N`. */
export const pairConductors = (pair: string): [Conductor, Conductor] =>
  pair.split('-') as [Conductor, Conductor];

/** True where the secondary of a delta–wye or wye–delta lags: the high side leads; at equal volts it lags (IEEE C57.12.00). */
export const secondaryLags = (t: Pick<Transformer, 'primaryVolts' | 'secondaryVolts'>): boolean =>
  t.secondaryVolts <= t.primaryVolts;

/**
 * Nominal EMF phasors on the secondary of a transformer, from those on its primary: its own volts, the
 * direction of the primary, and 30° between a delta and a wye. The tap is left out.
 * `null` where the primary lacks the conductors that the connection needs.
 */
export function secondaryEmfs(t: Transformer, primary: Emfs): Emfs | null {
  if (t.connection === 'single-phase') {
    if (t.primary === 'three-phase') return null;
    const [a, b] = pairConductors(t.primary);
    const across = emfBetween(primary, a, b);
    return across && singlePhase(t.system, t.secondaryVolts, unit(across));
  }
  const { L1, L2, L3 } = primary;
  if (!L1 || !L2 || !L3) return null;
  const centre = scaled(add(add(L1, L2), L3), 1 / 3);
  const direction = unit(minus(L1, centre));
  const shifts = t.connection === 'delta-wye' || t.connection === 'wye-delta';
  const shift = shifts ? (secondaryLags(t) ? LAG_30 : LEAD_30) : ONE;
  return threePhase(t.system, t.secondaryVolts, times(direction, shift));
}

const bit = (conductor: Conductor): number => 1 << CONDUCTORS.indexOf(conductor);
const maskOf = (conductors: readonly Conductor[]): number => conductors.reduce((m, c) => m | bit(c), 0);
const SETS = Array.from({ length: 16 }, (_, m) => CONDUCTORS.filter((c) => m & bit(c)));

interface Reach {
  origin: Origin;
  live: boolean;
  mask: number;
}

/**
 * Every bus that a source reaches, by id. The first source in file order that reaches a bus names its system;
 * buses that only open runs or sources that are off lead to come after, with `live: false`.
 * A bus that is missing from the result has no path to any source.
 */
export function busSystems(job: Job): Map<string, BusSystem> {
  const links = new Map<string, { to: string; run: number; transformer: number }[]>();
  const link = (from: string, to: string, run: number, transformer: number) => {
    const list = links.get(from);
    if (list) list.push({ to, run, transformer });
    else links.set(from, [{ to, run, transformer }]);
  };
  job.runs.forEach((run, i) => {
    link(run.from, run.to, i, -1);
    link(run.to, run.from, i, -1);
  });
  job.transformers.forEach((t, i) => {
    link(t.from, t.to, -1, i);
  });
  const runMasks = job.runs.map((run) => maskOf(run.conductors));
  const reached = new Map<string, Reach>();

  const spread = (queue: string[], live: boolean) => {
    for (let at = 0; at < queue.length; at++) {
      const bus = queue[at]!;
      const here = reached.get(bus)!;
      for (const { to, run, transformer } of links.get(bus) ?? []) {
        if (live && run >= 0 && job.runs[run]!.open) continue;
        const origin = run >= 0 ? here.origin : derived(job, transformer, here.origin);
        if (!origin) continue;
        const brings = run >= 0 ? here.mask & runMasks[run]! : maskOf(SYSTEM_CONDUCTORS[origin.system]);
        const there = reached.get(to);
        if (!there) reached.set(to, { origin, live, mask: brings });
        else if ((there.mask | brings) === there.mask) continue;
        else there.mask |= brings;
        queue.push(to);
      }
    }
  };
  const start = (index: number, live: boolean) => {
    const source = job.sources[index]!;
    const mask = maskOf(SYSTEM_CONDUCTORS[source.system]);
    const there = reached.get(source.bus);
    if (there) there.mask |= mask;
    else reached.set(source.bus, { origin: sourceOrigin(job, index), live, mask });
    spread([source.bus], live);
  };
  job.sources.forEach((source, i) => {
    if (!source.off) start(i, true);
  });
  spread([...reached.keys()], false);
  job.sources.forEach((source, i) => {
    if (source.off) start(i, false);
  });
  return new Map(
    [...reached].map(([bus, r]) => [bus, { origin: r.origin, conductors: SETS[r.mask]!, live: r.live }]),
  );
}

/** The system that a source sets up at its bus. */
export function sourceOrigin(job: Job, index: number): Origin {
  const { system, volts, openVolts, bus } = job.sources[index]!;
  const openRatio = (openVolts ?? volts) / volts;
  return {
    system,
    volts,
    emfs: nominalEmfs(system, volts),
    openRatio,
    source: index,
    sourceBus: bus,
    transformer: null,
  };
}

/** The system that a transformer sets up at its secondary, fed from `primary`; `null` where it cannot sit there. */
export function derived(job: Job, index: number, primary: Origin): Origin | null {
  const t = job.transformers[index]!;
  const emfs = secondaryEmfs(t, primary.emfs);
  return emfs && { ...primary, system: t.system, volts: t.secondaryVolts, emfs, transformer: index };
}
