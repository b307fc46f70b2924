import { CONDUCTORS, type Conductor, type Job, type Run, SYSTEM_CONDUCTORS } from '@farlug/solver/job';
import { type Complex, sub } from './complex.ts';
import { D, type Decimal } from './decimal.ts';
import { nominalPhasors, type Phasors, secondaryPhasors, windingPairs } from './systems.ts';

/** What a separately derived system carries: its nominal EMFs, open-voltage ratio and source bus. */
export interface Supply {
  nominal: Phasors;
  openRatio: Decimal;
  sourceBus: string;
}

export interface Topology {
  /** Buses in the order of `buses`, then as sources, runs, transformers and loads first name them. */
  buses: string[];
  /** Conductors that a bus has, live or not. */
  conductors: Map<string, Conductor[]>;
  live: Set<string>;
  /** The separately derived system that a bus belongs to: one number per system. */
  region: Map<string, number>;
  supply: Map<number, Supply>;
}

export const nodeOf = (bus: string, conductor: Conductor): string => `${bus}|${conductor}`;

/** Follows `next` from `starts` until nothing new turns up. */
export const flood = (starts: Iterable<string>, next: (at: string) => Iterable<string>): Set<string> => {
  const seen = new Set(starts);
  for (const at of seen) for (const other of next(at)) seen.add(other);
  return seen;
};

export const topologyOf = (job: Job): Topology => {
  const buses = [
    ...new Set([
      ...job.buses.map((b) => b.id),
      ...job.sources.map((s) => s.bus),
      ...job.runs.flatMap((r) => [r.from, r.to]),
      ...job.transformers.flatMap((t) => [t.from, t.to]),
      ...job.loads.flatMap((l) => (l.bus === null ? [] : [l.bus])),
    ]),
  ];
  const has = new Map(buses.map((bus) => [bus, new Set<Conductor>()]));
  const give = (bus: string, list: readonly Conductor[]) => {
    for (const conductor of list) has.get(bus)!.add(conductor);
  };
  for (const source of job.sources) give(source.bus, SYSTEM_CONDUCTORS[source.system]);
  for (const t of job.transformers) give(t.to, SYSTEM_CONDUCTORS[t.system]);
  for (const run of job.runs) {
    give(run.from, run.conductors);
    give(run.to, run.conductors);
  }
  const conductors = new Map(
    buses.map((bus) => [bus, CONDUCTORS.filter((conductor) => has.get(bus)!.has(conductor))]),
  );
  const closed = job.runs.filter((run) => !run.open);
  const region = regionsOf(buses, closed);
  return { buses, conductors, live: liveNodes(job, closed), region, supply: supplies(job, region) };
};

const regionsOf = (buses: string[], closed: Run[]): Map<string, number> => {
  const region = new Map<string, number>();
  buses.forEach((start, number) => {
    if (region.has(start)) return;
    const reached = flood([start], (bus) =>
      closed.flatMap((run) => (run.from === bus ? [run.to] : run.to === bus ? [run.from] : [])),
    );
    for (const bus of reached) region.set(bus, number);
  });
  return region;
};

const liveNodes = (job: Job, closed: Run[]): Set<string> => {
  const starts = job.sources
    .filter((source) => !source.off)
    .flatMap((source) => SYSTEM_CONDUCTORS[source.system].map((c) => nodeOf(source.bus, c)));
  let live = new Set(starts);
  for (;;) {
    live = flood(live, (node) =>
      closed.flatMap((run) =>
        run.conductors.flatMap((c) => {
          if (nodeOf(run.from, c) === node) return [nodeOf(run.to, c)];
          if (nodeOf(run.to, c) === node) return [nodeOf(run.from, c)];
          return [];
        }),
      ),
    );
    const before = live.size;
    for (const t of job.transformers) {
      if (!primaryNodes(t).every((node) => live.has(node))) continue;
      for (const c of SYSTEM_CONDUCTORS[t.system]) live.add(nodeOf(t.to, c));
    }
    if (live.size === before) return live;
  }
};

export const primaryNodes = (t: Job['transformers'][number]): string[] =>
  windingPairs(t, 'impedance')
    .flatMap((w) => w.primary)
    .flatMap((end) => (end === 'star' || end === 'earth' ? [] : [nodeOf(t.from, end)]));

/** Sources in file order; each claims what it reaches, through transformers too, and nobody has claimed. */
const supplies = (job: Job, region: Map<string, number>): Map<number, Supply> => {
  const supply = new Map<number, Supply>();
  for (const source of job.sources) {
    const start = region.get(source.bus)!;
    if (source.off || supply.has(start)) continue;
    supply.set(start, {
      nominal: nominalPhasors(source.system, source.volts),
      openRatio: D(source.openVolts ?? source.volts).div(source.volts),
      sourceBus: source.bus,
    });
    const queue = [start];
    for (const at of queue) {
      for (const t of job.transformers) {
        const to = region.get(t.to)!;
        if (region.get(t.from) !== at || supply.has(to)) continue;
        const above = supply.get(at)!;
        supply.set(to, { ...above, nominal: secondaryPhasors(t, above.nominal) });
        queue.push(to);
      }
    }
  }
  return supply;
};

export const supplyAt = (topology: Topology, bus: string): Supply | undefined =>
  topology.supply.get(topology.region.get(bus)!);

/** Nominal EMF between two conductors of the system at a bus. */
export const nominalBetween = (supply: Supply, plus: Conductor, minus: Conductor): Complex =>
  sub(supply.nominal[plus]!, supply.nominal[minus]!);
