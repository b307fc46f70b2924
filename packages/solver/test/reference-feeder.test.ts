import type { JobFile } from '@farlug/solver/job';
import { describe, expect, it } from 'vitest';
import { jobFile, ohmRun } from './support/job-file.ts';
import './support/ledger.ts';
import { reference } from './support/reference.ts';
import { SOLVERS } from './support/solvers.ts';

interface Feeder {
  rows: {
    branches: { from: number; to: number; r_ohm: number; x_ohm: number; i_a: number }[];
    buses: { bus: number; p_kw: number; q_kvar: number; v_pu: number; angle_deg: number }[];
  };
  recomputed: { real_loss_kw: number; source_p_kw: number };
}
const feeder = reference<Feeder>('feeders/ieee-33-bus-baran-wu');
const VOLTS = 12_660;

/** The 33-bus system: three-wire, constant power, impedances per phase. */
const job: JobFile = jobFile({
  sources: [{ id: 'grid', bus: '1', system: '3ph-3w', volts: VOLTS }],
  runs: feeder.rows.branches.map((b) =>
    ohmRun(`${b.from}-${b.to}`, `${b.from}`, `${b.to}`, ['L1', 'L2', 'L3'], b.r_ohm, b.x_ohm),
  ),
  loads: feeder.rows.buses
    .filter((b) => b.p_kw > 0)
    .map((b) => ({
      id: `load ${b.bus}`,
      bus: `${b.bus}`,
      terminals: 'three-phase',
      behaviour: 'power',
      va: 1000 * Math.hypot(b.p_kw, b.q_kvar),
      powerFactor: b.p_kw / Math.hypot(b.p_kw, b.q_kvar),
    })),
});

/**
 * M. E. Baran and F. F. Wu, IEEE Trans. Power Delivery 4(2), 1989; the voltages of the file are recomputed by two
 * methods that agree to 5e-15. The product may stop iterating at 1e-10 of the highest voltage and
 * goes on to rounding, so 1e-11 per unit; powers and currents to half a digit of what the file says, some 1e-9.
 */
describe.each(SOLVERS)('the 33-bus system of Baran and Wu, by the %s solver', (_, solve) => {
  const solution = solve(job, 'design');

  it('loses 202.677 kW', () => {
    const { lossWatts, sourceWatts } = solution.totals;
    expect(lossWatts / 1000).toBeCloseTo(202.677, 3);
    expect(lossWatts / 1000 - feeder.recomputed.real_loss_kw).toBeWithin(1e-9, 'loss, kW');
    expect(sourceWatts / 1000 - feeder.recomputed.source_p_kw).toBeWithin(1e-9, 'source power, kW');
  });

  it('is lowest at bus 18 with 0.91309 of nominal', () => {
    const perUnit = solution.buses.map((b) => ({ id: b.id, pu: b.volts!['L1-L2']! / VOLTS }));
    const lowest = perUnit.reduce((low, b) => (b.pu < low.pu ? b : low));
    expect(lowest.id).toBe('18');
    expect(lowest.pu).toBeCloseTo(0.91309, 5);
  });

  it.each(feeder.rows.buses)('has the voltage of bus $bus', ({ bus, v_pu, angle_deg }) => {
    const [re, im] = solution.buses.find((b) => b.id === `${bus}`)!.phasors!.L1!;
    const angle = (angle_deg * Math.PI) / 180;
    const base = VOLTS / Math.sqrt(3);
    const off = Math.hypot(re / base - v_pu * Math.cos(angle), im / base - v_pu * Math.sin(angle));
    expect(off).toBeWithin(1e-11, 'voltage, per unit');
  });

  it.each(feeder.rows.branches)('carries the current of branch $from-$to', ({ from, to, i_a }) => {
    const amps = solution.runs.find((r) => r.id === `${from}-${to}`)!.amps!.L2!;
    expect(amps - i_a).toBeWithin(5e-9, 'current, A');
  });
});
