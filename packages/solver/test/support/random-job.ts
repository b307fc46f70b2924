import {
  type Conductor,
  type JobFile,
  type Pair,
  SYSTEM_CONDUCTORS,
  SYSTEMS,
  type System,
} from '@farlug/solver/job';
import type { LoadFile, RunFile, TransformerFile } from './job-file.ts';
import { type Random, randomFrom } from './random.ts';
import { randomLimits, randomSize } from './random-parts.ts';

/** What a random job may contain; a property that needs less says so. */
export interface Wanted {
  system?: System;
  basis?: 'impedance' | 'resistance';
  /** Loads that are iterated (`power`, `angle: local`) and conductors at operating temperature. */
  iterated?: boolean;
  transformers?: boolean;
  /** Rings, parallel feeders, ties and second sources. */
  meshed?: boolean;
  diversity?: boolean;
  impedanceLoads?: boolean;
}

interface Place {
  bus: string;
  system: System;
  volts: number;
  /** Whether its feed is the only way to it, so that a feeder below may carry a demand. */
  radial: boolean;
}

const NOMINAL: Record<System, number[]> = {
  'dc-2w': [48, 120, 250],
  '1ph-2w': [120, 230],
  '1ph-3w': [240],
  '1ph-3w-wye': [208, 400],
  '3ph-3w': [208, 480],
  '3ph-4w': [208, 400, 480],
  '3ph-4w-delta': [240],
};

type Lists = 'buses' | 'runs' | 'transformers' | 'loads' | 'panels' | 'conductorRows';
type GrowingJob = JobFile & { [K in Lists]: NonNullable<JobFile[K]> };

class Builder {
  readonly random: Random;
  readonly wanted: Required<Omit<Wanted, 'system' | 'basis'>>;
  readonly job: GrowingJob;
  readonly metric: boolean;
  private count = 0;

  constructor(random: Random, wanted: Wanted) {
    this.random = random;
    this.wanted = {
      iterated: true,
      transformers: true,
      meshed: true,
      diversity: true,
      impedanceLoads: true,
      ...wanted,
    };
    const system = wanted.system ?? random.pick(SYSTEMS);
    this.metric = random.chance(0.4);
    const job: GrowingJob = {
      format: 'farlug-job/1',
      name: 'random',
      lengthUnit: random.pick(['ft', 'm']),
      frequency: system === 'dc-2w' ? 0 : random.pick([50, 60, 60, 400]),
      basis: wanted.basis ?? (random.chance(0.2) ? 'resistance' : 'impedance'),
      angle: this.wanted.iterated && random.chance(0.15) ? 'local' : 'nominal',
      limits: randomLimits(random),
      sources: [],
      buses: [],
      runs: [],
      transformers: [],
      loads: [],
      panels: [],
      conductorRows: [],
    };
    this.job = job;
    this.grow(system, random.pick(NOMINAL[system]));
  }

  private name(prefix: string): string {
    this.count++;
    return `${prefix}${this.count}`;
  }

  private grow(system: System, volts: number): void {
    const { random, job } = this;
    const source: JobFile['sources'][number] = { id: 'service', bus: 'service', system, volts };
    if (random.chance(0.3)) source.openVolts = volts * random.between(0.98, 1.05);
    const behind = random.pick(['ideal', 'ohms', 'ohms', 'fault', 'fault']);
    if (behind === 'ohms') source.impedance = { r: random.between(0, 0.01), x: random.between(0, 0.01) };
    if (behind === 'fault')
      source.fault = { amps: random.between(3000, 30000), xOverR: random.between(0, 6) };
    job.sources.push(source);
    job.buses.push({ id: 'service', kind: 'service' });
    let root: Place = { bus: 'service', system, volts, radial: true };
    if (this.wanted.meshed && random.chance(0.15)) root = { ...root, radial: false };
    const head = root;
    if (random.chance(0.6)) root = this.feed(root, 'service');
    const panels = [root];
    const count = random.whole(1, 4);
    for (let k = 0; k < count; k++) {
      const above = random.pick(panels);
      panels.push(this.feed(above, 'feeder'));
    }
    if (this.wanted.transformers && system !== 'dc-2w' && random.chance(0.6))
      for (let k = random.whole(1, 2); k > 0; k--) {
        const below = this.transform(random.pick(panels));
        if (below) panels.push(below, ...(random.chance(0.4) ? [this.feed(below, 'feeder')] : []));
      }
    if (this.wanted.meshed) this.mesh(panels, head, source);
    for (const place of panels) {
      job.panels.push({ bus: place.bus, spaces: 42, lines: this.lines(place).slice(0, 3) });
      const circuits = random.whole(0, 3);
      for (let k = 0; k < circuits; k++) this.circuit(place);
      if (random.chance(0.2)) this.load(place, place.bus, SYSTEM_CONDUCTORS[place.system]);
    }
  }

  private lines(place: Place): Conductor[] {
    return SYSTEM_CONDUCTORS[place.system].filter((c) => c !== 'N');
  }

  /** A run between two buses; `heavy` for feeders. */
  private run(from: string, to: string, conductors: readonly Conductor[], more: Partial<RunFile>): RunFile {
    const heavy = (more.kind ?? 'branch') !== 'branch';
    const run: RunFile = {
      id: this.name(heavy ? 'F' : 'c'),
      kind: 'branch',
      from,
      to,
      conductors: [...conductors],
      ...randomSize(this.random, this.job, conductors, heavy, this.metric, this.wanted.iterated),
      ...more,
    };
    if (this.random.chance(0.06)) run.length = 0;
    this.job.runs.push(run);
    return run;
  }

  private feed(above: Place, kind: 'service' | 'feeder'): Place {
    const { random } = this;
    const bus = this.name('P');
    this.job.buses.push({ id: bus, kind: random.chance(0.7) ? 'panel' : 'junction' });
    const parallel = kind === 'feeder' && this.wanted.meshed && random.chance(0.12);
    const conductors = SYSTEM_CONDUCTORS[above.system];
    const run = this.run(above.bus, bus, conductors, { kind });
    if (parallel) this.run(above.bus, bus, conductors, { kind });
    else if (above.radial && kind === 'feeder' && this.wanted.diversity && random.chance(0.35))
      run.demand = random.between(0.3, 1);
    return { ...above, bus, radial: above.radial };
  }

  private transform(above: Place): Place | null {
    const { random, job } = this;
    const near = random.chance(0.6) ? this.feed(above, 'feeder') : above;
    const choices = secondaries(above.system);
    if (choices.length === 0) return null;
    const choice = random.pick(choices);
    const to = this.name('X');
    job.buses.push({ id: to, kind: 'panel' });
    const primary = choice.connection === 'single-phase' ? random.pick(choice.pairs) : undefined;
    const primaryVolts = primary ? pairVolts(above, primary) : above.volts;
    const transformer: TransformerFile = {
      id: this.name('T'),
      from: near.bus,
      to,
      kva: random.between(15, 150),
      primaryVolts: random.chance(0.85) ? primaryVolts : primaryVolts * random.between(0.97, 1.03),
      secondaryVolts: random.pick(NOMINAL[choice.system]),
      connection: choice.connection,
      percentZ: random.between(1.5, 6),
      xOverR: random.between(0.3, 4),
      system: choice.system,
    };
    if (primary) transformer.primary = primary;
    if (random.chance(0.3)) transformer.tapPercent = random.pick([-5, -2.5, 2.5, 5]);
    job.transformers.push(transformer);
    return { bus: to, system: choice.system, volts: transformer.secondaryVolts, radial: above.radial };
  }

  /** Ties between panels of one system, and a second source; what they touch is no longer radial. */
  private mesh(panels: Place[], head: Place, source: JobFile['sources'][number]): void {
    const { random, job } = this;
    const noDemand = () => {
      for (const run of job.runs) run.demand = undefined;
    };
    if (random.chance(0.3)) {
      const a = random.pick(panels);
      const same = panels.filter((p) => p !== a && this.joinable(p, a));
      if (same.length > 0) {
        const tie = this.run(a.bus, random.pick(same).bus, SYSTEM_CONDUCTORS[a.system], { kind: 'feeder' });
        if (random.chance(0.4)) tie.open = true;
        else noDemand();
      }
    }
    if (random.chance(0.15)) {
      const gen: JobFile['sources'][number] = {
        id: 'generator',
        bus: 'generator',
        system: source.system,
        volts: source.volts,
        openVolts: source.volts * random.between(0.99, 1.02),
        impedance: { r: random.between(0.001, 0.02), x: random.between(0, 0.02) },
      };
      const swap = random.chance(0.5);
      if (swap) source.off = true;
      else if (random.chance(0.5)) gen.off = true;
      else noDemand();
      if (random.chance(0.5)) job.sources.push(gen);
      else job.sources.unshift(gen);
      this.run('generator', head.bus, SYSTEM_CONDUCTORS[head.system], { kind: 'service' });
      if (swap) noDemand();
    }
  }

  private joinable(a: Place, b: Place): boolean {
    const secondary = (p: Place) =>
      p.bus.startsWith('X') || this.job.runs.some((r) => r.to === p.bus && r.from.startsWith('X'));
    return a.system === b.system && a.volts === b.volts && !secondary(a) && !secondary(b);
  }

  private circuit(place: Place): void {
    const { random } = this;
    const all = SYSTEM_CONDUCTORS[place.system];
    const lines = this.lines(place);
    const neutral = all.includes('N');
    const line = random.pick(lines);
    const two = lines.length > 1 ? ([line, random.pick(lines.filter((l) => l !== line))] as const) : null;
    const sorted = (list: readonly Conductor[]) => all.filter((c) => list.includes(c));
    const shapes: (() => void)[] = [];
    const simple = neutral ? sorted([line, 'N']) : sorted(two ?? lines);
    shapes.push(() => this.single(place, simple));
    shapes.push(() => this.taps(place, simple));
    shapes.push(() => this.spread(place, simple));
    if (two)
      shapes.push(() => this.single(place, sorted(neutral && random.chance(0.5) ? [...two, 'N'] : two)));
    if (lines.length === 3)
      shapes.push(() => this.single(place, neutral && random.chance(0.5) ? all : lines));
    if (two && neutral)
      shapes.push(() => this.multiwire(place, random.chance(0.5) ? all : sorted([...two, 'N'])));
    if (this.wanted.meshed) shapes.push(() => this.ring(place, simple));
    random.pick(shapes)();
  }

  private single(place: Place, conductors: readonly Conductor[]): void {
    const end = this.name('e');
    const run = this.run(place.bus, end, conductors, {});
    if (this.random.chance(0.2)) {
      run.from = end;
      run.to = place.bus;
    }
    if (this.random.chance(0.05)) run.open = true;
    for (let k = this.random.whole(1, 3); k > 0; k--) this.load(place, end, conductors);
  }

  private taps(place: Place, conductors: readonly Conductor[]): void {
    let at = place.bus;
    for (let k = this.random.whole(2, 5); k > 0; k--) {
      const next = this.name('t');
      this.run(at, next, conductors, {});
      if (this.random.chance(0.8)) this.load(place, next, conductors);
      at = next;
    }
  }

  private spread(place: Place, conductors: readonly Conductor[]): void {
    const end = this.name('e');
    const run = this.run(place.bus, end, conductors, {});
    this.load(place, { along: run.id }, conductors);
    if (this.random.chance(0.4)) this.load(place, end, conductors);
  }

  private multiwire(place: Place, conductors: readonly Conductor[]): void {
    const split = this.name('m');
    this.run(place.bus, split, conductors, {});
    for (const line of conductors.filter((c) => c !== 'N')) {
      if (this.random.chance(0.3)) this.load(place, split, [line, 'N']);
      else {
        const end = this.name('e');
        this.run(split, end, [line, 'N'], {});
        this.load(place, end, [line, 'N']);
      }
    }
    if (this.random.chance(0.3)) this.load(place, split, conductors);
  }

  private ring(place: Place, conductors: readonly Conductor[]): void {
    let at = place.bus;
    const legs = this.random.whole(2, 4);
    for (let k = 0; k < legs; k++) {
      const next = k === legs - 1 ? place.bus : this.name('r');
      this.run(at, next, conductors, {});
      if (next !== place.bus) this.load(place, next, conductors);
      at = next;
    }
  }

  private load(place: Place, at: string | { along: string }, conductors: readonly Conductor[]): void {
    const { random } = this;
    const lines = conductors.filter((c) => c !== 'N');
    const options: (Pair | 'three-phase')[] = [];
    if (conductors.includes('N')) options.push(...lines.map((line) => `${line}-N` as Pair));
    for (const [a, b] of [
      ['L1', 'L2'],
      ['L2', 'L3'],
      ['L1', 'L3'],
    ] as const)
      if (lines.includes(a) && lines.includes(b)) options.push(`${a}-${b}` as Pair);
    if (lines.length === 3) options.push('three-phase', 'three-phase');
    if (options.length === 0) return;
    const terminals = random.pick(options);
    const volts = terminals === 'three-phase' ? place.volts : pairVolts(place, terminals);
    const direct = place.system === 'dc-2w';
    const amps = random.between(0.5, direct ? 6 : 16);
    const vaPerAmp = terminals === 'three-phase' ? Math.sqrt(3) * volts : volts;
    const load: LoadFile = {
      id: this.name('l'),
      terminals,
      ...(typeof at === 'string' ? { bus: at } : at),
      class: random.pick(['lighting', 'motor', 'sensitive', 'equipment']),
    };
    const sign = random.chance(0.08) ? -1 : 1;
    const hp = random.chance(0.08) && sign > 0 ? motorFor(volts, terminals === 'three-phase', direct) : null;
    if (hp !== null) load.hp = random.pick(hp);
    else
      random.pick([
        () => (load.amps = sign * amps),
        () => (load.va = sign * amps * vaPerAmp),
        () => (load.watts = sign * amps * vaPerAmp),
        () => (load.kw = (sign * amps * vaPerAmp) / 1000),
      ])();
    if (random.chance(0.7)) load.powerFactor = random.between(0.6, 1);
    if (random.chance(0.1)) load.leading = true;
    if (random.chance(0.15)) load.quantity = random.whole(1, 3);
    if (this.wanted.iterated && random.chance(0.12)) load.behaviour = 'power';
    else if (this.wanted.impedanceLoads && random.chance(0.15)) load.behaviour = 'impedance';
    if (random.chance(0.5)) load.demand = random.between(0, 1.2);
    if (random.chance(0.1)) load.demandVa = random.between(0, amps * vaPerAmp);
    if (random.chance(0.3)) load.minimum = random.between(0, 0.5);
    if (random.chance(0.3)) load.ratedVolts = volts * random.between(0.95, 1);
    if (sign > 0 && random.chance(0.12))
      load.starting = { amps: amps * random.between(2, 6), powerFactor: random.between(0.2, 0.6) };
    this.job.loads.push(load);
  }
}

/** Nominal volts of a pair at a place. */
const pairVolts = (place: Place, pair: string): number => {
  const { system, volts } = place;
  if (system === 'dc-2w' || system === '1ph-2w') return volts;
  if (!pair.endsWith('-N')) return volts;
  if (system === '1ph-3w') return volts / 2;
  if (system === '3ph-4w-delta') return pair === 'L2-N' ? (volts * Math.sqrt(3)) / 2 : volts / 2;
  return volts / Math.sqrt(3);
};

const motorFor = (volts: number, three: boolean, direct: boolean): number[] | null => {
  if (direct) return null;
  const whole = Math.round(volts);
  const served =
    whole === 200 || whole === 208 || (whole >= 110 && whole <= 120) || (whole >= 220 && whole <= 240);
  if (!three) return served ? [0.5, 1, 1.5] : null;
  return served || (whole >= 440 && whole <= 480) ? [0.5, 1, 1.5, 2] : null;
};

interface Choice {
  connection: TransformerFile['connection'];
  system: System;
  pairs: Pair[];
}
const secondaries = (system: System): Choice[] => {
  const lineLine: Pair[] =
    system === '1ph-3w' || system === '1ph-3w-wye' ? ['L1-L2'] : ['L1-L2', 'L2-L3', 'L1-L3'];
  const single = (pairs: Pair[]): Choice[] => [
    { connection: 'single-phase', system: '1ph-2w', pairs },
    { connection: 'single-phase', system: '1ph-3w', pairs },
  ];
  if (system === 'dc-2w') return [];
  if (system === '1ph-2w') return single(['L1-N']);
  if (system === '1ph-3w' || system === '1ph-3w-wye') return single([...lineLine, 'L1-N', 'L2-N']);
  const three: Choice[] = [
    { connection: 'delta-wye', system: '3ph-4w', pairs: [] },
    { connection: 'delta-delta', system: '3ph-3w', pairs: [] },
    { connection: 'wye-delta', system: '3ph-3w', pairs: [] },
    { connection: 'delta-delta', system: '3ph-4w-delta', pairs: [] },
    { connection: 'wye-delta', system: '3ph-4w-delta', pairs: [] },
    ...(system === '3ph-4w'
      ? [{ connection: 'wye-wye' as const, system: '3ph-4w' as const, pairs: [] }]
      : []),
  ];
  return [...three, ...three, ...single(system === '3ph-4w' ? [...lineLine, 'L3-N'] : lineLine)];
};

/** A valid random job: trees of panels with whatever `wanted` allows, small enough to be solved densely. */
export const randomJob = (seed: number, wanted: Wanted = {}): JobFile =>
  new Builder(randomFrom(seed), wanted).job;
