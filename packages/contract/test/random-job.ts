import {
  BEHAVIOURS,
  type Conductor,
  type Job,
  type JobFile,
  jobSchema,
  LOAD_CLASSES,
  MATERIALS,
  RACEWAYS,
  type Terminals,
} from '@farlug/solver/job';
import fc from 'fast-check';

/** Random three-phase jobs of a few panels whose circuits take every form of a schedule row. */

const FORMS = [
  'single',
  'two-pole',
  'three-pole',
  'multiwire',
  'taps',
  'spread',
  'ring',
  'at-panel',
] as const;
type Form = (typeof FORMS)[number];
const tenths = (min: number, max: number) => fc.integer({ min: min * 10, max: max * 10 }).map((n) => n / 10);

const randomCircuit = fc.record({
  form: fc.constantFrom(...FORMS),
  listed: fc.boolean(),
  breaker: fc.option(fc.constantFrom(15, 20, 30, 100)),
  length: tenths(1, 400),
  run: fc.record(
    {
      material: fc.constantFrom(...MATERIALS),
      size: fc.constantFrom('12 AWG', '10 AWG', '1/0 AWG'),
      raceway: fc.constantFrom(...RACEWAYS),
      neutralSize: fc.constantFrom('12 AWG', null),
      temperature: fc.constantFrom('operating' as const, 60, null),
      ambient: fc.option(fc.integer({ min: -10, max: 50 })),
      insulation: fc.constantFrom(60 as const, 75 as const, 90 as const, null),
      terminals: fc.constantFrom(60 as const, 75 as const, null),
      bundled: fc.option(fc.integer({ min: 1, max: 20 })),
      groundingSize: fc.constantFrom('12 AWG', null),
      locked: fc.boolean(),
    },
    { requiredKeys: ['size'] },
  ),
  load: fc.oneof(
    fc
      .tuple(fc.constantFrom('amps', 'va', 'watts', 'kw'), tenths(1, 90))
      .map(([key, value]) => ({ [key]: value })),
    fc.constantFrom(0.5, 0.75, 1, 2).map((hp) => ({ hp })),
  ),
  more: fc.record(
    {
      powerFactor: fc.constantFrom(0.85, 0.95, 1, null),
      leading: fc.boolean(),
      quantity: fc.integer({ min: 0, max: 9 }),
      behaviour: fc.constantFrom(...BEHAVIOURS),
      demand: tenths(0, 1),
      demandVa: fc.option(tenths(0, 5000)),
      minimum: tenths(0, 1),
      continuous: fc.boolean(),
      class: fc.constantFrom(...LOAD_CLASSES),
      ratedVolts: fc.constantFrom(115, 230, null),
      starting: fc.option(fc.record({ amps: tenths(1, 200), powerFactor: fc.constantFrom(0.35, 0.4) })),
    },
    { requiredKeys: [] },
  ),
  description: fc.option(fc.string({ maxLength: 20 })),
});
type RandomCircuit = typeof randomCircuit extends fc.Arbitrary<infer C> ? C : never;

const LINES: Conductor[] = ['L1', 'L2', 'L3'];
const lineOf = (space: number): Conductor => LINES[(Math.ceil(space / 2) - 1) % 3]!;
const POLES: Record<Form, number> = {
  single: 1,
  'two-pole': 2,
  'three-pole': 3,
  multiwire: 2,
  taps: 1,
  spread: 1,
  ring: 1,
  'at-panel': 0,
};

interface Parts {
  runs: NonNullable<JobFile['runs']>;
  loads: NonNullable<JobFile['loads']>;
}

/** The network rows of one circuit of panel `bus`, its first pole in `space`. */
function circuitParts(bus: string, id: string, space: number, c: RandomCircuit): Parts {
  const lines = Array.from({ length: POLES[c.form] }, (_, i) => lineOf(space + 2 * i)).sort();
  const neutral: Conductor[] = c.form === 'two-pole' || c.form === 'three-pole' ? [] : ['N'];
  const conductors = [...lines, ...neutral];
  const poles = c.form === 'multiwire' ? 1 : (POLES[c.form] as 1 | 2 | 3);
  const base = {
    kind: 'branch' as const,
    conductors,
    breaker: c.breaker === null || !c.listed ? null : { amps: c.breaker, poles },
    ...c.run,
  };
  const load = (suffix: string, at: string, terminals: Terminals, along: string | null = null) => ({
    id: `${id}${suffix}`,
    terminals,
    ...c.load,
    ...c.more,
    ...(along === null ? { bus: at } : { along }),
  });
  const run = (suffix: string, from: string, to: string) => ({
    id: `${id}${suffix}`,
    from,
    to,
    length: c.length,
    ...base,
  });
  const end = `${id}-end`;
  const pair = `${lines[0]}-N` as Terminals;
  switch (c.form) {
    case 'single':
      return { runs: [run('', bus, end)], loads: [load('', end, pair)] };
    case 'two-pole':
      return { runs: [run('', bus, end)], loads: [load('', end, lines.join('-') as Terminals)] };
    case 'three-pole':
      return { runs: [run('', bus, end)], loads: [load('', end, 'three-phase')] };
    case 'multiwire':
      return {
        runs: [run('', bus, end)],
        loads: [load('a', end, `${lines[0]}-N` as Terminals), load('b', end, `${lines[1]}-N` as Terminals)],
      };
    case 'taps':
      return {
        runs: [run('', bus, `${id}-t1`), run('.2', `${id}-t1`, end)],
        loads: [load('a', `${id}-t1`, pair), load('b', end, pair)],
      };
    case 'spread':
      return { runs: [run('', bus, end)], loads: [load('', end, pair, id)] };
    case 'ring':
      return {
        runs: [run('', bus, `${id}-r1`), run('.2', `${id}-r1`, `${id}-r2`), run('.3', `${id}-r2`, bus)],
        loads: [load('a', `${id}-r1`, pair), load('b', `${id}-r2`, pair)],
      };
    case 'at-panel':
      return { runs: [], loads: [load('', bus, 'L1-N')] };
  }
}

const randomPanel = fc.record({
  circuits: fc.array(randomCircuit, { maxLength: 6 }),
  overlay: fc.boolean(),
  feederListed: fc.boolean(),
  length: tenths(1, 300),
  demand: tenths(0, 1),
  spare: fc.boolean(),
});

const randomLimits = fc.record(
  {
    feeder: fc.constantFrom(2, 3, null),
    branch: fc.constantFrom(2.5, 3),
    total: fc.constantFrom(4, 5),
    longRun: fc.boolean(),
    includeService: fc.boolean(),
    byClass: fc.constantFrom({}, { sensitive: { branch: 1.5, total: 2.5 } }, { lighting: { total: 3 } }),
    starting: fc.option(tenths(5, 20)),
    lowestVolts: fc.constantFrom(null, 110, { 120: 110, 277: 260.5 }),
    highestVolts: fc.constantFrom(null, 130),
    rating: fc.constantFrom(null, { low: 90, high: 110 }, { low: 90 }),
    basis: fc.constantFrom('NEC informational notes', null),
    force: fc.constantFrom('recommendation' as const, 'mandatory' as const),
  },
  { requiredKeys: [] },
);

export const randomJob: fc.Arbitrary<Job> = fc
  .record({
    panels: fc.array(randomPanel, { minLength: 1, maxLength: 4 }),
    limits: randomLimits,
    lengthUnit: fc.constantFrom('ft' as const, 'm' as const),
    supply: fc.constantFrom(
      { impedance: { r: 0.004, x: 0.009 } },
      { fault: { amps: 22000, xOverR: 4 } },
      { openVolts: 210 },
    ),
    ohms: fc.boolean(),
    readings: fc.array(tenths(100, 125), { maxLength: 3 }),
  })
  .map(({ panels, limits, lengthUnit, supply, ohms, readings }) => {
    const file: Required<Pick<JobFile, 'runs' | 'loads' | 'panels' | 'buses'>> = {
      runs: [],
      loads: [],
      panels: [],
      buses: [],
    };
    panels.forEach((panel, p) => {
      const bus = `P${p}`;
      const parent = p === 0 ? 'service' : `P${Math.floor((p - 1) / 2)}`;
      const circuits: NonNullable<NonNullable<JobFile['panels']>[number]['circuits']> = [];
      file.buses!.push({ id: bus, name: `Panel ${p}`, kind: 'panel' });
      file.runs!.push({
        id: `F${p}`,
        kind: p === 0 ? 'service' : 'feeder',
        from: parent,
        to: bus,
        length: panel.length,
        conductors: ['L1', 'L2', 'L3', 'N'],
        demand: panel.demand,
        ...(ohms
          ? { ohms: { r: 0.1, x: 0.05, per: 'km' as const, neutral: { r: 0.2 } } }
          : { size: '3/0 AWG', sets: 2, raceway: 'steel' as const }),
      });
      let space = 1;
      panel.circuits.forEach((circuit, i) => {
        const id = `${bus}.${i}`;
        const { runs, loads } = circuitParts(bus, id, space, circuit);
        file.runs!.push(...runs);
        file.loads!.push(...loads);
        if (!circuit.listed || runs.length === 0) return;
        const spaces = Array.from({ length: POLES[circuit.form] }, (_, k) => space + 2 * k);
        space += 2 * spaces.length;
        circuits.push({ spaces, run: id, kind: 'branch', description: circuit.description });
      });
      if (panel.spare) circuits.push({ spaces: [2], kind: 'spare', description: 'Spare' });
      if (panel.overlay || circuits.length > 0)
        file.panels!.push({ bus, spaces: 84, lines: ['L1', 'L2', 'L3'], mainAmps: 225, circuits });
    });
    return jobSchema.parse({
      format: 'farlug-job/1',
      name: 'Random job',
      lengthUnit,
      limits,
      sources: [{ id: 'service', bus: 'service', system: '3ph-4w', volts: 208, ...supply }],
      ...file,
      conductorRows: [
        {
          name: 'Flat 3',
          material: 'copper',
          areaMm2: 3.5,
          r: 5.21,
          x: 0.08,
          per: 'km',
          source: 'maker’s sheet',
        },
      ],
      readings: readings.map((volts, i) => ({
        bus: 'P0',
        terminals: 'L1-N',
        volts,
        at: `2026-11-0${i + 1}T09:20:00Z`,
      })),
    } satisfies JobFile);
  });
