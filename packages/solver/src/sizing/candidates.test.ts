import { describe, expect, it } from 'vitest';
import { SOLVERS } from '../../test/support/solvers.ts';
import type { JobFile } from '../job/index.ts';
import { parseJob } from '../job/index.ts';
import { candidates } from './candidates.ts';
import type { Solve } from './solve.ts';

/** A 120 V circuit on the resistance basis: every figure is 2·I·R·L with R of NEC Chapter 9 Table 9 in PVC. */
const circuit = (run: object = {}, rest: Partial<JobFile> = {}) => {
  const outcome = parseJob({
    format: 'farlug-job/1',
    name: 'x',
    basis: 'resistance',
    lengthUnit: 'ft',
    limits: { branch: 3, total: 5 },
    sources: [{ id: 's', bus: 'P', system: '1ph-2w', volts: 120 }],
    buses: [{ id: 'P', kind: 'panel' }],
    runs: [
      {
        id: 'B',
        kind: 'branch',
        from: 'P',
        to: 'E',
        length: 100,
        conductors: ['L1', 'N'],
        size: '12',
        breaker: { amps: 20, poles: 1 },
        ...run,
      },
    ],
    loads: [{ id: 'l', bus: 'E', terminals: 'L1-N', amps: 16, powerFactor: 1, continuous: true }],
    ...rest,
  });
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.problems));
  return outcome.job;
};

describe.each(SOLVERS)('candidates by the %s solver', (_, solver) => {
  const solve: Solve = (job, scenario) => ({ kind: 'solved', solution: solver(job, scenario) });
  const list = (job: ReturnType<typeof circuit>, options = {}) => {
    const outcome = candidates(job, 'B', solve, options);
    if (!outcome.ok) throw new Error(outcome.reason);
    return outcome;
  };
  const found = list(circuit());
  const of = (size: string) => found.candidates.find((c) => c.size === size)!;

  it('lay every copper size from 14 AWG up, the drawn one marked', () => {
    expect(found.candidates.map((c) => c.size).slice(0, 4)).toEqual(['14 AWG', '12 AWG', '10 AWG', '8 AWG']);
    expect(found.candidates).toHaveLength(28);
    expect(found.candidates.filter((c) => c.now).map((c) => c.size)).toEqual(['12 AWG']);
  });

  it.each([
    // 2·16·R·0.1 V; 100·V/120 %; 2·16²·R·0.1 W; longest: 3.6 V/(2·16·R/1000).
    ['12 AWG', 6.4, 5.3333333, 102.4, 'over', 56],
    ['10 AWG', 3.84, 3.2, 61.44, 'over', 93],
    ['8 AWG', 2.496, 2.08, 39.936, 'within', 144],
    ['6 AWG', 1.568, 1.3066667, 25.088, 'within', 229],
  ] as const)('%s drops %f V, %f %%, loses %f W', (size, volts, percent, watts, verdict, length) => {
    const c = of(size);
    expect(c.dropVolts).toBeCloseTo(volts, 9);
    expect(c.dropPercent).toBeCloseTo(percent, 6);
    expect(c.lossWatts).toBeCloseTo(watts, 8);
    expect(c.worst).toMatchObject({ id: 'l', verdict });
    expect(c.worst!.totalPercent).toBeCloseTo(percent, 6);
    expect(c.verdict).toBe(verdict);
    expect(c.overBeyond).toBe(verdict === 'over' ? 1 : 0);
    expect(c.longest).toEqual({ kind: 'up-to', length });
  });

  it('hold the floor: 16 A continuous wants 20 A at 60 °C terminals, so 12 Cu; 14 Cu needs an override', () => {
    expect(found.load).toEqual({ amps: 16, continuousAmps: 16 });
    expect(of('14 AWG')).toMatchObject({ needsOverride: true, floor: { status: 'below' } });
    expect(of('12 AWG')).toMatchObject({
      needsOverride: false,
      floor: { status: 'meets', ampacityAmps: 20 },
    });
  });

  it('grow the grounding conductor with the line (250.122(B)): 12 Cu, 10 Cu, 8 Cu', () => {
    expect(of('12 AWG').grounding).toMatchObject({ size: '12 AWG', upsized: false });
    expect(of('10 AWG').grounding).toMatchObject({ size: '10 AWG', upsized: true });
    expect(of('8 AWG').grounding).toMatchObject({ size: '8 AWG', upsized: true });
  });

  it('lay the other metal and parallel sets on request, sets from 1/0 up', () => {
    const { candidates: all } = list(circuit(), { bothMaterials: true, maxSets: 2, longest: false });
    const two = all.filter((c) => c.sets === 2);
    expect(two.every((c) => /\/0|kcmil/.test(c.size))).toBe(true);
    expect(all.some((c) => c.material === 'aluminum' && c.size === '12 AWG')).toBe(true);
    expect(all.every((c) => c.longest === null)).toBe(true);
    const single = all.find((c) => c.size === '2/0 AWG' && c.material === 'copper' && c.sets === 1)!;
    const double = two.find((c) => c.size === '2/0 AWG' && c.material === 'copper')!;
    expect(double.dropVolts!).toBeCloseTo(single.dropVolts! / 2, 10);
  });

  it('say that no length passes where what lies before is too much, and that any does without limits', () => {
    const before: JobFile['runs'] = [
      { id: 'F', kind: 'feeder', from: 'S', to: 'P', length: 900, conductors: ['L1', 'N'], size: '12' },
      { id: 'B', kind: 'branch', from: 'P', to: 'E', length: 10, conductors: ['L1', 'N'], size: '12' },
    ];
    const far = circuit({}, { sources: [{ id: 's', bus: 'S', system: '1ph-2w', volts: 120 }], runs: before });
    expect(list(far).candidates.every((c) => c.longest?.kind === 'none')).toBe(true);
    expect(list(circuit({}, { limits: null })).candidates[1]!.longest).toEqual({ kind: 'any' });
  });

  it('judge a feeder by the panels beyond it', () => {
    const runs: JobFile['runs'] = [
      {
        id: 'B',
        kind: 'feeder',
        from: 'S',
        to: 'P',
        length: 100,
        conductors: ['L1', 'N'],
        size: '8',
        breaker: { amps: 40, poles: 1 },
      },
      { id: 'b', kind: 'branch', from: 'P', to: 'E', length: 100, conductors: ['L1', 'N'], size: '14' },
    ];
    const job = circuit(
      {},
      {
        sources: [{ id: 's', bus: 'S', system: '1ph-2w', volts: 120 }],
        runs,
        limits: { feeder: 3, branch: 3 },
      },
    );
    const eight = list(job).candidates.find((c) => c.size === '8 AWG')!;
    // 2·16·0.78·0.1 = 2.496 V, 2.08 %; 3 % at 144 ft; the branch beyond is over by itself.
    expect(eight.panels).toEqual([{ id: 'P', feederPercent: expect.closeTo(2.08, 9), verdict: 'within' }]);
    expect(eight).toMatchObject({
      feederVerdict: 'within',
      verdict: 'over',
      overBeyond: 1,
      longest: { kind: 'up-to', length: 144 },
    });
  });

  it('take metric sizes for a metric run and leave its grounding conductor unchecked', () => {
    const metric = circuit({ size: '2.5 mm2', method: 'B1' }, { lengthUnit: 'm' });
    const { candidates: sizes } = list(metric, { longest: false });
    expect(sizes[0]).toMatchObject({ size: '1.5 mm2', grounding: { ok: false } });
    expect(sizes.find((c) => c.size === '2.5 mm2')!.floor).toMatchObject({
      status: 'meets',
      ampacityAmps: 24,
    });
  });

  it('refuse an unknown run', () => {
    expect(candidates(circuit(), 'Z', solve)).toEqual({
      ok: false,
      at: 'Z',
      reason: 'no run of the job has this id',
    });
  });
});
