import { describe, expect, it } from 'vitest';
import { solveDense } from './dense/solve-dense.ts';
import { jobFile, ohmLoad, ohmRun } from './support/job-file.ts';
import './support/ledger.ts';
import { solveProduct } from './support/solvers.ts';

/**
 * 100 V of direct current behind 0.2 Ω out and back, then a run of no length to two loads: 10 Ω, absent from design
 * demand, and 10 A. Both on and x amperes more: V = 100 − 0.2·(10 + V/10 + x), and V is 95 (5 %) at x = 5.5.
 */
const job = jobFile({
  frequency: 0,
  limits: { feeder: 5 },
  sources: [{ id: 's', bus: 'S', system: 'dc-2w', volts: 100 }],
  runs: [
    ohmRun('F', 'S', 'P', ['L1', 'N'], 0.1, 0, { kind: 'feeder' }),
    ohmRun('c', 'P', 'end', ['L1', 'N'], 0.1, 0, { length: 0 }),
  ],
  loads: [
    { id: 'ohms', bus: 'end', terminals: 'L1-N', demand: 0, ...ohmLoad(10, 0, 100) },
    { id: 'amps', bus: 'end', terminals: 'L1-N', amps: 10 },
  ],
});

describe.each([
  ['product’s', solveProduct],
  ['dense', solveDense],
] as const)('headroom worked by hand, by the %s solver', (_, solve) => {
  it('counts an impedance that changes with the turn, at a bus merged with its panel', () => {
    for (const load of solve(job, 'each-circuit').loads)
      expect(load.headroomAmps! - 5.5).toBeWithin(1e-12, 'headroom, A');
  });
});
