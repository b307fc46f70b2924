import { describe, expect, it } from 'vitest';
import type { Run } from '../job/index.ts';
import { runSchema } from '../job/index.ts';
import { ampacityFloor } from './floor.ts';

const run = (parts: Partial<Run>): Run =>
  runSchema.parse({
    id: 'F',
    kind: 'feeder',
    from: 'A',
    to: 'B',
    length: 100,
    conductors: ['L1', 'L2', 'L3', 'N'],
    size: '1/0 AWG',
    breaker: { amps: 150, poles: 3 },
    ...parts,
  });
const load = { amps: 119, continuousAmps: 0 };

describe('ampacity floor, NEC (ampacities: Table 310.16)', () => {
  it('lets a 150 A breaker stand on 1 Cu at 75 °C (130 A, next standard size up), not on 2 Cu (115 A, up to 125 A)', () => {
    expect(ampacityFloor(run({ size: '1 AWG' }), load)).toMatchObject({ status: 'meets', ampacityAmps: 130 });
    const two = ampacityFloor(run({ size: '2 AWG' }), load);
    expect(two).toMatchObject({ status: 'below', ampacityAmps: 115 });
    expect(two.reasons).toEqual([
      'terminals: 115 A at 75 °C < 119 A of load',
      'in the raceway: 115 A after factors < 119 A of load',
      'breaker: 115 A of ampacity is protected up to 125 A, 240.4, not by 150 A',
    ]);
  });
  it('asks 2/0 Al for the same breaker', () => {
    expect(ampacityFloor(run({ size: '1/0 AWG', material: 'aluminum' }), { ...load, amps: 100 }).status).toBe(
      'below',
    );
    expect(ampacityFloor(run({ size: '2/0 AWG', material: 'aluminum' }), load).status).toBe('meets');
  });
  it('counts 125 % of continuous load at the terminals alone: 100 A continuous wants 125 A', () => {
    const small = run({ size: '2 AWG', breaker: { amps: 125, poles: 3 } });
    expect(ampacityFloor(small, { amps: 90, continuousAmps: 90 }).status).toBe('meets');
    expect(ampacityFloor(small, { amps: 100, continuousAmps: 100 }).reasons).toEqual([
      'terminals: 115 A at 75 °C < 125 A, the load with 125 % of its 100 A continuous',
    ]);
  });
  it('takes 60 °C terminals up to 100 A (110.14(C)), unless they are marked', () => {
    const twenty = run({ size: '12 AWG', breaker: { amps: 20, poles: 1 }, conductors: ['L1', 'N'] });
    expect(ampacityFloor(twenty, { amps: 16, continuousAmps: 16 })).toMatchObject({
      status: 'meets',
      ampacityAmps: 20,
    });
    expect(ampacityFloor({ ...twenty, terminals: 75 }, { amps: 16, continuousAmps: 16 })).toMatchObject({
      ampacityAmps: 25,
    });
  });
  it('holds small conductors to 240.4(D): 12 Cu never on 25 A', () => {
    const floor = ampacityFloor(run({ size: '12 AWG', terminals: 75, breaker: { amps: 25, poles: 1 } }), {
      amps: 16,
      continuousAmps: 0,
    });
    expect(floor.reasons).toEqual(['breaker: 25 A of ampacity is protected up to 20 A, 240.4, not by 25 A']);
  });
  it('derates in the raceway: 8 Cu, 90 °C, 38 °C, six conductors carry 40.04 A', () => {
    const derated = run({
      size: '8 AWG',
      insulation: 90,
      ambient: 38,
      bundled: 6,
      breaker: { amps: 40, poles: 3 },
    });
    expect(ampacityFloor(derated, { amps: 41, continuousAmps: 0 })).toMatchObject({ status: 'below' });
    const floor = ampacityFloor({ ...derated, terminals: 75 }, { amps: 40, continuousAmps: 0 });
    expect(floor.ampacityAmps).toBeCloseTo(40.04, 10);
  });
  it('adds parallel sets from 1/0 up', () => {
    expect(ampacityFloor(run({ sets: 2, breaker: null }), load)).toMatchObject({ ampacityAmps: 300 });
    expect(ampacityFloor(run({ sets: 2, size: '1 AWG' }), load).reasons).toEqual([
      'parallel sets start at 1/0 AWG, 310.10(G)',
    ]);
  });
  it.each(['motor', 'transformer', 'tap', 'dwelling-83'] as const)(
    'never passes a %s circuit',
    (protection) => {
      expect(ampacityFloor(run({ protection }), load)).toMatchObject({
        status: 'not-checked',
        ampacityAmps: null,
      });
    },
  );
});

describe('ampacity floor, mm² (IEC 60364-5-52, IEC 60364-4-43 433.1)', () => {
  const cable = { size: '16 mm2', method: 'B1', breaker: { amps: 63, poles: 3 } } as const;
  it('holds the load and the breaker below the ampacity: 16 mm² PVC, three loaded, B1: 68 A', () => {
    expect(ampacityFloor(run(cable), { amps: 60, continuousAmps: 0 })).toMatchObject({
      status: 'meets',
      ampacityAmps: 68,
    });
    const warm = ampacityFloor(run({ ...cable, ambient: 40 }), { amps: 60, continuousAmps: 0 });
    expect(warm.ampacityAmps).toBeCloseTo(68 * 0.87, 10);
    expect(warm.reasons).toHaveLength(2);
  });
  it('is not checked without a method, or with one that the tables lack', () => {
    expect(ampacityFloor(run({ ...cable, method: null }), load).reasons).toEqual([
      'not checked here: the installation method is not stated',
    ]);
    expect(ampacityFloor(run({ ...cable, method: 'F' }), load).status).toBe('not-checked');
  });
});
