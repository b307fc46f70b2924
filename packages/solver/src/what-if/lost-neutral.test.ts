import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { runs, seeds } from '../../test/support/against-dense.ts';
import { jobFile, ohmLoad, ohmRun } from '../../test/support/job-file.ts';
import { randomFrom } from '../../test/support/random.ts';
import { randomJob } from '../../test/support/random-job.ts';
import { type Job, type JobFile, NEUTRAL_CAUTION, parseJob } from '../job/index.ts';
import { solveJob } from '../judge/index.ts';
import { isZero, jobOhms } from '../network/index.ts';
import { type LostNeutral, lostNeutral } from './lost-neutral.ts';

const parsed = (file: JobFile): Job => {
  const outcome = parseJob(file);
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.problems));
  return outcome.job;
};
const lost = (file: JobFile, run: string): LostNeutral => {
  const outcome = lostNeutral(parsed(file), { run });
  if (outcome.kind !== 'lost-neutral') throw new Error(outcome.reason);
  return outcome;
};
const loadOf = (result: LostNeutral, id: string) => result.loads.find((load) => load.id === id)!;

const SPLIT = ['L1', 'L2', 'N'] as const;
/** 120/240 V, a feeder of 0.1 Ω a line and 0.2 Ω in the neutral, 10 Ω on one leg and 30 Ω on the other. */
const cabin = (more: Partial<JobFile> = {}): JobFile =>
  jobFile({
    sources: [{ id: 'service', bus: 'head', system: '1ph-3w', volts: 240 }],
    runs: [ohmRun('F1', 'head', 'panel', [...SPLIT], 0.1, 0, { kind: 'feeder', neutral: { r: 0.2 } })],
    loads: [
      { id: 'many', bus: 'panel', terminals: 'L1-N', ...ohmLoad(10, 0, 120), behaviour: 'current' },
      { id: 'few', bus: 'panel', terminals: 'L2-N', ...ohmLoad(30, 0, 120), behaviour: 'power' },
    ],
    ...more,
  });

describe('the lost neutral of a three-wire circuit', () => {
  const result = lost(cabin(), 'F1');

  it('is a voltage divider: 240 V over both loads and both lines', () => {
    const amps = 240 / (0.1 + 10 + 30 + 0.1);
    expect(loadOf(result, 'many').withoutNeutralVolts).toBeCloseTo(amps * 10, 9);
    expect(loadOf(result, 'few').withoutNeutralVolts).toBeCloseTo(amps * 30, 9);
    expect(loadOf(result, 'few').percent).toBeCloseTo((amps * 30 * 100) / 120, 9);
    expect(result.neutral.withoutNeutralVolts).toBeCloseTo(Math.abs(120 - amps * 10.1), 9);
  });

  it('stands beside the volts with the neutral in place (two meshes, by hand)', () => {
    const shift = (120 / 10.1 - 120 / 30.1) / (1 / 10.1 + 1 / 30.1 + 1 / 0.2);
    expect(result.neutral.withNeutralVolts).toBeCloseTo(shift, 9);
    expect(loadOf(result, 'many').withNeutralVolts).toBeCloseTo(((120 - shift) * 10) / 10.1, 9);
    expect(loadOf(result, 'few').withNeutralVolts).toBeCloseTo(((120 + shift) * 30) / 30.1, 9);
  });

  it('lists the worst load first, against bounds whose ground is named, and with the caution', () => {
    expect(result.loads.map(({ id, status }) => [id, status])).toEqual([
      ['few', 'over'],
      ['many', 'under'],
    ]);
    expect(result.bounds).toEqual({ lowPercent: 90, highPercent: 110, basis: 'common practice' });
    expect(result.caution).toBe(NEUTRAL_CAUTION);
    expect(result).toMatchObject({ otherPath: false, note: null, neutral: { bus: 'panel' } });
  });

  it('takes bounds of one’s own', () => {
    const outcome = lostNeutral(parsed(cabin()), { run: 'F1', bounds: { lowPercent: 40, highPercent: 160 } });
    expect(outcome).toMatchObject({ bounds: { basis: 'as given' }, loads: [{ status: 'within' }, {}] });
  });

  it('draws each load at its design demand', () => {
    const file = cabin();
    Object.assign(file.loads![0]!, { demand: 0.5 });
    const amps = 240 / (0.1 + 20 + 30 + 0.1);
    expect(loadOf(lost(file, 'F1'), 'many').withoutNeutralVolts).toBeCloseTo(amps * 20, 9);
  });

  it('opens a neutral of no length as well', () => {
    const file = cabin();
    file.runs!.push({
      id: 'lug',
      kind: 'feeder',
      from: 'panel',
      to: 'bar',
      length: 0,
      conductors: [...SPLIT],
    });
    for (const load of file.loads!) load.bus = 'bar';
    const amps = 240 / (0.1 + 10 + 30 + 0.1);
    const at = lost(file, 'lug');
    expect(loadOf(at, 'few').withoutNeutralVolts).toBeCloseTo(amps * 30, 9);
    expect(at.neutral.bus).toBe('bar');
    expect(at.neutral.withNeutralVolts).toBeCloseTo(result.neutral.withNeutralVolts, 9);
  });

  it('puts a load that is spread along the run beyond the break with all of it', () => {
    const file = cabin({
      runs: [ohmRun('F1', 'head', 'panel', [...SPLIT], 1e-9, 0, { neutral: { r: 0.2 } })],
    });
    Object.assign(file.loads![0]!, { bus: null, along: 'F1' });
    expect(loadOf(lost(file, 'F1'), 'few').withoutNeutralVolts).toBeCloseTo(180, 6);
  });
});

it('shifts the star point of three unequal loads as Millman’s theorem says: V = Σ Y·E / Σ Y', () => {
  const z = [
    [8, 3],
    [15, 0],
    [40, -12],
  ] as const;
  const line = [0.05, 0.03] as const;
  const file = jobFile({
    sources: [{ id: 'service', bus: 'head', system: '3ph-4w', volts: 208 }],
    runs: [ohmRun('F1', 'head', 'panel', ['L1', 'L2', 'L3', 'N'], ...line, { kind: 'feeder' })],
    loads: z.map(([r, x], k) => ({
      id: `star ${k}`,
      bus: 'panel',
      terminals: (['L1-N', 'L2-N', 'L3-N'] as const)[k]!,
      ...ohmLoad(r, x, 208 / Math.sqrt(3)),
    })),
  });
  const e = [0, -120, 120].map((deg) => {
    const angle = (deg * Math.PI) / 180;
    return [(208 / Math.sqrt(3)) * Math.cos(angle), (208 / Math.sqrt(3)) * Math.sin(angle)] as const;
  });
  const through = (r: number, x: number) => [r / (r * r + x * x), -x / (r * r + x * x)] as const;
  const y = z.map(([r, x]) => through(r + line[0], x + line[1]));
  const times = (a: readonly [number, number], b: readonly [number, number]) =>
    [a[0] * b[0] - a[1] * b[1], a[0] * b[1] + a[1] * b[0]] as const;
  const sum = (list: readonly (readonly [number, number])[]) =>
    list.reduce<readonly [number, number]>((s, v) => [s[0] + v[0], s[1] + v[1]], [0, 0]);
  const driven = sum(y.map((each, k) => times(each, e[k]!)));
  const star = times(driven, through(...sum(y)));

  const result = lost(file, 'F1');
  expect(result.neutral.withoutNeutralVolts).toBeCloseTo(Math.hypot(...star), 9);
  for (const [k, [r, x]] of z.entries()) {
    const amps = times(y[k]!, [e[k]![0] - star[0], e[k]![1] - star[1]]);
    expect(loadOf(result, `star ${k}`).withoutNeutralVolts).toBeCloseTo(
      Math.hypot(...times(amps, [r, x])),
      9,
    );
  }
});

describe('a neutral that other conductors hold, or that nothing holds', () => {
  it('comes out right where another path of neutral remains', () => {
    const ring = (conductors: ('L1' | 'L2' | 'N')[]) =>
      cabin({
        runs: [
          ohmRun('F1', 'head', 'panel', conductors, 0.1, 0, { kind: 'feeder' }),
          ohmRun('F2', 'head', 'panel', [...SPLIT], 0.3, 0, { kind: 'feeder' }),
        ],
        loads: cabin().loads!.map((load) => ({ ...load, behaviour: 'impedance' })),
      });
    const result = lost(ring([...SPLIT]), 'F1');
    const bare = solveJob(parsed(ring(['L1', 'L2'])), { scenario: 'design' });
    if (bare.kind !== 'solved') throw new Error(bare.reason);
    expect(result.otherPath).toBe(true);
    for (const { id, volts } of bare.solution.loads)
      expect(loadOf(result, id).withoutNeutralVolts).toBeCloseTo(volts!, 9);
    expect(result.neutral.withoutNeutralVolts).toBeCloseTo(
      bare.solution.buses.find((bus) => bus.id === 'panel')!.volts!.N!,
      9,
    );
  });

  it('says so where nothing ties the far neutral, and still gives the loads between lines', () => {
    const file = cabin({
      loads: [
        { id: 'range', bus: 'panel', terminals: 'L1-L2', ...ohmLoad(24, 0, 240) },
        { id: 'lamp', bus: 'panel', terminals: 'L1-N', amps: 1, demand: 0 },
      ],
    });
    const result = lost(file, 'F1');
    expect(result.neutral).toMatchObject({ withNeutralVolts: 0, withoutNeutralVolts: null });
    expect(result.note).toMatch(/nothing holds its voltage/);
    expect(loadOf(result, 'lamp')).toMatchObject({ status: 'undetermined', percent: null });
    expect(loadOf(result, 'range').withoutNeutralVolts).toBeCloseTo((240 * 24) / 24.2, 9);
    expect(result.loads.map(({ id }) => id)).toEqual(['range', 'lamp']);
  });

  it('sees that an unloaded transformer holds nothing either', () => {
    const file = cabin({
      loads: [{ id: 'bell', bus: 'low', terminals: 'L1-N', amps: 1, demand: 0 }],
      transformers: [
        {
          id: 'T1',
          from: 'panel',
          to: 'low',
          kva: 5,
          primary: 'L1-N',
          primaryVolts: 120,
          secondaryVolts: 24,
          connection: 'single-phase',
          percentZ: 3,
          xOverR: 1,
          system: '1ph-2w',
        },
      ],
    });
    expect(lost(file, 'F1')).toMatchObject({
      neutral: { withoutNeutralVolts: null },
      loads: [{ id: 'bell', status: 'undetermined' }],
    });
    Object.assign(file.loads![0]!, { demand: 1 });
    expect(lost(file, 'F1').loads[0]).toMatchObject({ status: 'under' });
    expect(lost(file, 'F1').loads[0]!.withoutNeutralVolts).toBeLessThan(1e-6);
  });

  it('leaves a two-wire circuit without volts', () => {
    const file = jobFile({
      sources: [{ id: 'service', bus: 'head', system: '1ph-2w', volts: 120 }],
      runs: [ohmRun('C1', 'head', 'end', ['L1', 'N'], 0.5)],
      loads: [{ id: 'lamp', bus: 'end', terminals: 'L1-N', amps: 2 }],
    });
    const result = lost(file, 'C1');
    expect(result.neutral.withoutNeutralVolts).toBeCloseTo(120, 9);
    expect(result.loads[0]!.withoutNeutralVolts).toBeLessThan(1e-9);
  });

  it('counts a load that nothing feeds as unserved, last', () => {
    const file = cabin();
    file.runs!.push(ohmRun('C9', 'panel', 'shed', ['L1', 'N'], 1, 0, { open: true }));
    file.loads!.unshift({ id: 'off', bus: 'shed', terminals: 'L1-N', amps: 1 });
    expect(lost(file, 'F1').loads.at(-1)).toMatchObject({ id: 'off', status: 'unserved', percent: null });
  });
});

describe('what it refuses', () => {
  it.each([
    ['nowhere', {}, 'run nowhere', /no run of the job/],
    ['F1', { conductors: ['L1', 'L2'] }, 'run F1', /has no neutral to lose: its conductors are L1, L2/],
    ['F1', { open: true }, 'run F1', /is open/],
  ] as const)('%s as %j', (run, change, at, reason) => {
    const file = cabin({ loads: [{ id: 'range', bus: 'panel', terminals: 'L1-L2', amps: 10 }] });
    Object.assign(file.runs![0]!, change);
    const outcome = lostNeutral(parsed(file), { run });
    expect(outcome).toMatchObject({ kind: 'unsolvable', at });
    expect((outcome as { reason: string }).reason).toMatch(reason);
  });

  it.each([
    [110, 90],
    [-1, 110],
    [Number.NaN, 110],
  ])('bounds of %d and %d percent', (lowPercent, highPercent) => {
    const outcome = lostNeutral(parsed(cabin()), { run: 'F1', bounds: { lowPercent, highPercent } });
    expect(outcome).toMatchObject({ kind: 'unsolvable', at: 'bounds' });
  });
});

/** The solver on the same job with 10 MΩ in that neutral: as good as open beside loads of at most some kΩ. */
it('agrees on random jobs with a neutral of ten million ohms', () => {
  let compared = 0;
  fc.assert(
    fc.property(seeds, (seed) => {
      const file = randomJob(seed, { iterated: false, diversity: false });
      const job = parsed(file);
      const ohms = jobOhms(job);
      if ('kind' in ohms) throw new Error(ohms.reason);
      const able = job.runs.flatMap(({ id, conductors, open }, i) =>
        conductors.includes('N') &&
        !open &&
        !isZero(ohms.runs[i]![3]!) &&
        !job.loads.some(({ along }) => along === id)
          ? [i]
          : [],
      );
      if (able.length === 0) return;
      const index = randomFrom(seed).pick(able);
      const result = lostNeutral(job, { run: job.runs[index]!.id });
      if (result.kind !== 'lost-neutral') return;
      const [r, x] = ohms.runs[index]!.find((z) => z !== null)!;
      const metres = job.runs[index]!.length * (job.lengthUnit === 'ft' ? 0.3048 : 1);
      const perKm = (job.runs[index]!.sets * 1000) / metres;
      const open: JobFile = {
        ...file,
        loads: file.loads!.map((load) => ({ ...load, behaviour: 'impedance' })),
        runs: file.runs!.map((run, i) =>
          i === index
            ? {
                ...run,
                size: null,
                neutralSize: null,
                ohms: {
                  r: r * perKm,
                  x: x * perKm,
                  per: 'km',
                  neutral: { r: Math.min(1e9, 1e7 * perKm), x: 0 },
                },
              }
            : run,
        ),
      };
      const outcome = solveJob(parsed(open), { scenario: 'design', headroom: false });
      if (outcome.kind !== 'solved') throw new Error(outcome.reason);
      for (const { id, bus, terminals } of job.loads) {
        const ours = loadOf(result, id);
        if (ours.percent === null || bus === null) continue;
        const volts = outcome.solution.buses.find((each) => each.id === bus)!.volts!;
        const pairs = terminals === 'three-phase' ? (['L1-L2', 'L2-L3', 'L1-L3'] as const) : [terminals];
        const out = (value: number) => Math.abs(value - ours.nominalVolts!) / ours.nominalVolts!;
        expect(pairs).toContain(ours.pair);
        expect(
          Math.abs(ours.withoutNeutralVolts! - volts[ours.pair!]!) / ours.nominalVolts!,
          id,
        ).toBeLessThan(1e-3);
        for (const pair of pairs)
          expect(out(ours.withoutNeutralVolts!)).toBeGreaterThan(out(volts[pair]!) - 1e-3);
        compared++;
      }
    }),
    runs(20),
  );
  expect(compared).toBeGreaterThan(40);
});
