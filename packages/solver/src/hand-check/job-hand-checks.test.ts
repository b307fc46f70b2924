import { describe, expect, it } from 'vitest';
import { parseJob } from '../job/index.ts';
import { handChecks } from './job-hand-checks.ts';

/** 120/240 V on the resistance basis: 12 AWG Cu in PVC, 2.0 Ω per 1000 ft (NEC Chapter 9 Table 9). */
const job = (loads: object[], run: object = {}) => {
  const outcome = parseJob({
    format: 'farlug-job/1',
    name: 'x',
    basis: 'resistance',
    lengthUnit: 'ft',
    sources: [{ id: 's', bus: 'P', system: '1ph-3w', volts: 240 }],
    buses: [{ id: 'P', kind: 'panel' }],
    runs: [
      {
        id: 'B',
        kind: 'branch',
        from: 'P',
        to: 'E',
        length: 100,
        conductors: ['L1', 'L2', 'N'],
        size: '12',
        ...run,
      },
    ],
    loads,
  });
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.problems));
  return outcome.job;
};
const one = (...args: Parameters<typeof job>) => {
  const outcome = handChecks(job(...args));
  if (!outcome.ok || !outcome.checks[0]?.ok) throw new Error(JSON.stringify(outcome));
  return outcome.checks[0];
};
const leg = (line: string, amps: number) => ({
  id: line,
  bus: 'E',
  terminals: `${line}-N`,
  amps,
  powerFactor: 1,
  demand: 0.25,
});

describe('hand checks of a whole job', () => {
  it('take a branch run with its own circuit full: 2·16·2.0·0.1 = 6.4 V, as the nodes have it', () => {
    const check = one([leg('L1', 16)], { conductors: ['L1', 'N'] });
    expect(check.hand).toMatchObject({ filled: '2 · 16 · 2 · 0.1', nominalVolts: 120 });
    expect(check.hand.volts).toBeCloseTo(6.4, 12);
    expect(check.nodal.volts).toBeCloseTo(6.4, 9);
    expect(check.reasons).toEqual([]);
  });
  it('take a shared neutral in the turn of one leg alone, where it is worst', () => {
    const check = one([leg('L1', 16), leg('L2', 10)]);
    expect(check.nodal).toMatchObject({ pair: 'L1-N' });
    expect(check.nodal.volts).toBeCloseTo(6.4, 9);
    expect(check.current).toMatchObject({ from: 'entered', amps: 16 });
  });
  it('see the run from its far end too', () => {
    const check = one([leg('L1', 16)], { from: 'E', to: 'P', conductors: ['L1', 'N'] });
    expect(check.nodal.volts).toBeCloseTo(6.4, 9);
  });
  it('are made for the runs that are named', () => {
    const outcome = handChecks(job([leg('L1', 16)]), new Set(['other']));
    expect(outcome).toEqual({ ok: true, checks: [] });
  });
  it('are refused at operating temperatures, naming the run', () => {
    expect(handChecks(job([leg('L1', 16)], { temperature: 'operating' }))).toMatchObject({
      ok: false,
      at: 'run B',
    });
  });
});
