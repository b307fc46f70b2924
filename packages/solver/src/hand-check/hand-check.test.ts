import { describe, expect, it } from 'vitest';
import type { Conductor, JobFile, Phasor } from '../job/index.ts';
import { jobSchema } from '../job/index.ts';
import { handCheckRun, prepareHandChecks } from './hand-check.ts';
import type { Phasors, RunState } from './run-state.ts';
import { difference, product } from './run-state.ts';

const at = (size: number, degrees: number): Phasor => [
  size * Math.cos((degrees * Math.PI) / 180),
  size * Math.sin((degrees * Math.PI) / 180),
];
/** The far end by Ohm's law, conductor by conductor: V_far = V_near − z·I. */
const stateOf = (near: Phasors, currents: Phasors, ohms: Partial<Record<Conductor, Phasor>>): RunState => ({
  near,
  currents,
  far: Object.fromEntries(
    (Object.keys(near) as Conductor[]).map((c) => [
      c,
      currents[c] && ohms[c] ? difference(near[c]!, product(ohms[c]!, currents[c]!)) : near[c]!,
    ]),
  ),
  factor: () => 1,
});

const job = (run: object, load: object, rest: Partial<JobFile> = {}) =>
  jobSchema.parse({
    format: 'farlug-job/1',
    name: 'x',
    lengthUnit: 'ft',
    sources: [{ id: 's', bus: 'S', system: '3ph-4w', volts: 208 }],
    runs: [
      {
        id: 'B',
        kind: 'branch',
        from: 'S',
        to: 'E',
        length: 132,
        conductors: ['L1', 'N'],
        size: '10 AWG',
        raceway: 'steel',
        ...run,
      },
    ],
    loads: [{ id: 'l', bus: 'E', terminals: 'L1-N', amps: 16, powerFactor: 0.85, ...load }],
    ...rest,
  });
const check = (j: ReturnType<typeof job>, state: RunState, index = 0) =>
  handCheckRun(prepareHandChecks(j), index, state);
const good = (j: ReturnType<typeof job>, state: RunState, index = 0) => {
  const result = check(j, state, index);
  if (!result.ok) throw new Error(result.reason);
  return result;
};
const VOLTS = 208 / Math.sqrt(3);
const LAG_085 = -31.788331;
/** 10 AWG Cu in steel, Table 9: 1.2 and 0.063 Ω per 1000 ft, 132 ft. */
const TEN: Phasor = [1.2 * 0.132, 0.063 * 0.132];
const line = at(16, LAG_085);
const back = at(16, 180 + LAG_085);

describe('a branch run, 16 A at 0.85 in 132 ft of 10 Cu in steel', () => {
  const straight = good(
    job({}, {}),
    stateOf({ L1: [VOLTS, 0], N: [0, 0] }, { L1: line, N: back }, { L1: TEN, N: TEN }),
  );

  it('fills in Table 9: 2·16·(1.2·0.85 + 0.063·0.527)·0.132 = 4.449 V, 3.70 % of 120.1 V', () => {
    expect(straight.hand.formula).toBe('2·I·(R cosφ + X sinφ)·L');
    expect(straight.hand.filled).toBe('2 · 16 · (1.2·0.85 + 0.063·0.527) · 0.132');
    expect(straight.hand.volts).toBeCloseTo(4.4487, 4);
    expect(straight.hand.percent).toBeCloseTo(3.7045, 3);
    expect(straight.wire).toBe('10 AWG Cu in steel raceway, 132 ft');
    expect(straight.constants).toBe('R 1.2 and X 0.063 Ω per 1000 ft, NEC Chapter 9 Table 9');
  });
  it('agrees with the nodal result to the quadrature part where the voltage has its nominal angle', () => {
    // (I·X cosφ − I·R sinφ)²/(2·V) of both conductors: (0.226 − 2.671)²/240.2 = 0.025 V (IEEE Std 141, exact less approximate).
    expect(Math.abs(straight.difference.volts!)).toBeLessThan(0.03);
    expect(straight.nodal.pair).toBe('L1-N');
  });
  it('says that the angle of the voltage is the reason where it is: 2.2° of lag', () => {
    const near = { L1: at(VOLTS, -2.2), N: [0, 0] as Phasor };
    const result = good(job({}, {}), stateOf(near, { L1: line, N: back }, { L1: TEN, N: TEN }));
    expect(result.difference.percent).toBeGreaterThan(0.03);
    expect(result.reasons[0]!.words).toContain('L1-N at S lags its nominal angle by 2.2°');
  });
  it('adds the drop by circular mils: 2·12.9·16·132/10380 = 5.250 V', () => {
    expect(straight.byCircularMils!.filled).toBe('2 · 12.9 · 16 · 132 / 10380');
    expect(straight.byCircularMils!.volts).toBeCloseTo(5.2495, 4);
  });
  it('names a shared neutral that carries another current', () => {
    const state = stateOf({ L1: [VOLTS, 0], N: [0, 0] }, { L1: line, N: at(6, 120) }, { L1: TEN, N: TEN });
    expect(good(job({}, {}), state).reasons[0]!.words).toMatch(
      /shared neutral: it carries 6.0 A beside 16.0 A in L1/,
    );
  });
  it('names the temperature where the run is not at the table’s', () => {
    const cold: Phasor = [TEN[0] * (1 - 0.00323 * 45), TEN[1]];
    const state = stateOf({ L1: [VOLTS, 0], N: [0, 0] }, { L1: line, N: back }, { L1: cold, N: cold });
    expect(good(job({ temperature: 30 }, {}), state).reasons[0]!.words).toBe(
      'temperature: the conductor is at 30 °C, the table at 75 °C',
    );
  });
  it('takes line and neutral apart where they differ, and half of a load spread along the run', () => {
    const neutral = good(
      job({ neutralSize: '8 AWG' }, { powerFactor: 1 }),
      stateOf({ L1: [VOLTS, 0], N: [0, 0] }, { L1: [16, 0], N: [-16, 0] }, { L1: TEN, N: TEN }),
    );
    expect(neutral.hand.filled).toBe('16 · (1.2 + 0.78) · 0.132');
    const spread = good(
      job({}, { bus: null, along: 'B' }),
      stateOf(
        { L1: [VOLTS, 0], N: [0, 0] },
        { L1: at(8, LAG_085), N: at(8, 180 + LAG_085) },
        { L1: TEN, N: TEN },
      ),
    );
    expect(spread.current).toMatchObject({ from: 'entered', loads: 1 });
    expect(spread.current.amps).toBeCloseTo(8, 10);
  });
  it('adds loads of different power factor in parts: 10 A at 1 and 10 A at 0.8 lagging are 18.97 A at 0.949', () => {
    const two = job(
      {},
      { amps: 10, powerFactor: 1 },
      {
        loads: [
          { id: 'a', bus: 'E', terminals: 'L1-N', amps: 10, powerFactor: 1 },
          { id: 'b', bus: 'E', terminals: 'L1-N', amps: 10, powerFactor: 0.8 },
        ],
      },
    );
    const { current } = good(
      two,
      stateOf({ L1: [VOLTS, 0], N: [0, 0] }, { L1: line, N: back }, { L1: TEN, N: TEN }),
    );
    expect(current.amps).toBeCloseTo(Math.sqrt(18 ** 2 + 6 ** 2), 10);
    expect(current.powerFactor).toBeCloseTo(18 / Math.sqrt(360), 10);
  });
});

describe('line to line, three-phase, feeders', () => {
  it('takes the pair of the load: 30 A at 1 in 88 ft of 8 Cu: 2·30·0.78·0.088 = 4.118 V of 208 V, 1.98 %', () => {
    const z: Phasor = [0.78 * 0.088, 0];
    const kiln = job(
      { conductors: ['L2', 'L3'], size: '8 AWG', length: 88 },
      { terminals: 'L2-L3', amps: 30, powerFactor: 1 },
    );
    const state = stateOf(
      { L2: at(VOLTS, -120), L3: at(VOLTS, 120) },
      { L2: at(30, -90), L3: at(30, 90) },
      { L2: z, L3: z },
    );
    const result = good(kiln, state);
    expect(result.hand).toMatchObject({ formula: '2·I·R·L', filled: '2 · 30 · 0.78 · 0.088' });
    expect(result.hand.volts).toBeCloseTo(4.1184, 4);
    expect(result.hand.percent).toBeCloseTo(1.98, 3);
    expect(result.nodal.pair).toBe('L2-L3');
    expect(result.reasons).toEqual([]);
  });

  const balanced = (amps: number, degrees: number): Phasors => ({
    L1: at(amps, degrees),
    L2: at(amps, degrees - 120),
    L3: at(amps, degrees + 120),
  });
  const star: Phasors = balanced(VOLTS, 0);
  const z8: Phasor = [0.78 * 0.076, 0.065 * 0.076];
  const three = { conductors: ['L1', 'L2', 'L3'], size: '8 AWG', length: 76 };

  it('three-phase, balanced: √3·24.2·(0.78·0.85 + 0.065·0.527)·0.076 = 2.22 V of 208 V, 1.07 %, as the nodes have it', () => {
    const motor = job(three, { terminals: 'three-phase', amps: 24.2 });
    const result = good(motor, stateOf(star, balanced(24.2, LAG_085), { L1: z8, L2: z8, L3: z8 }));
    expect(result.hand.filled).toBe('1.732 · 24.2 · (0.78·0.85 + 0.065·0.527) · 0.076');
    expect(result.hand.volts).toBeCloseTo(2.2212, 3);
    expect(Math.abs(result.difference.volts!)).toBeLessThan(0.01);
  });

  it('a feeder takes the mean of its solved lines, and names the unbalance', () => {
    const z: Phasor = [0.12 * 0.152, 0.055 * 0.152];
    const feeder = job(
      { kind: 'feeder', size: '1/0 AWG', length: 152, conductors: ['L1', 'L2', 'L3', 'N'] },
      { demand: 1 },
    );
    const currents: Phasors = { L1: at(119, -18), L2: at(78, -138), L3: at(95, 102), N: at(36, 160) };
    const result = good(feeder, stateOf({ ...star, N: [0, 0] }, currents, { L1: z, L2: z, L3: z, N: z }));
    expect(result.current).toMatchObject({ from: 'solved', leading: false });
    expect(result.current.amps).toBeCloseTo((119 + 78 + 95) / 3, 10);
    expect(result.current.powerFactor).toBeCloseTo(Math.cos((18 * Math.PI) / 180), 3);
    expect(result.nodal.pair).toBe('L1-N');
    expect(result.difference.volts).toBeNull();
    expect(result.reasons[0]!.words).toMatch(/^unbalance: L1 carries 119.0 A, and the neutral 36.0 A/);
  });
});

describe('mm² and direct current', () => {
  it('writes IEC 60364-5-52 Annex G for metric sizes', () => {
    const metric = job(
      { size: '16 mm2', length: 36, raceway: 'cable' },
      { powerFactor: 0.9 },
      {
        lengthUnit: 'm',
        frequency: 50,
        sources: [{ id: 's', bus: 'S', system: '1ph-2w', volts: 230 }],
      },
    );
    const z: Phasor = [1.376e-3 * 36, 0.08e-3 * 36];
    const result = good(
      metric,
      stateOf({ L1: [230, 0], N: [0, 0] }, { L1: at(16, -25.84), N: at(16, 154.16) }, { L1: z, N: z }),
    );
    expect(result.hand.formula).toBe('b·(ρ1·L/S·cosφ + λ·L·sinφ)·I');
    expect(result.hand.volts).toBeCloseTo(1.49818, 4);
    expect(result.byCircularMils).toBeNull();
    expect(result.constants).toBe('ρ1 0.0225 Ω·mm²/m and λ 0.08 mΩ/m, IEC 60364-5-52 Annex G');
  });
  it('drops X and power factor on direct current', () => {
    const cabin = job(
      { size: '6 AWG', length: 20 },
      { amps: 25, powerFactor: null },
      {
        frequency: 0,
        sources: [{ id: 's', bus: 'S', system: 'dc-2w', volts: 48 }],
      },
    );
    const z: Phasor = [0.491 * 0.02, 0];
    const result = good(
      cabin,
      stateOf({ L1: [48, 0], N: [0, 0] }, { L1: [25, 0], N: [-25, 0] }, { L1: z, N: z }),
    );
    expect(result.hand).toMatchObject({ formula: '2·I·R·L', filled: '2 · 25 · 0.491 · 0.02' });
    expect(result.difference.volts!).toBeCloseTo(0, 12);
    expect(result.constants).toBe('R 0.491 Ω per 1000 ft, NEC Chapter 9 Table 8');
  });
});

describe('refused, with the reason', () => {
  const state = stateOf({ L1: [VOLTS, 0], N: [0, 0] }, { L1: line, N: back }, { L1: TEN, N: TEN });
  it('a run of a ring', () => {
    const ring = job({}, {});
    ring.runs.push({ ...ring.runs[0]!, id: 'C' });
    expect(check(ring, state)).toMatchObject({ ok: false, reason: expect.stringContaining('not radial') });
  });
  it('an open run, one of no length, one that carries nothing', () => {
    expect(check(job({ open: true }, {}), state).ok).toBe(false);
    expect(check(job({ length: 0 }, {}), state)).toMatchObject({
      reason: expect.stringContaining('no impedance'),
    });
    expect(check(job({}, {}, { loads: [] }), stateOf({ L1: [VOLTS, 0], N: [0, 0] }, {}, {}))).toMatchObject({
      reason: expect.stringContaining('no load flows'),
    });
  });
});
