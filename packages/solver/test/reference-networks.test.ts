import { describe, expect, it } from 'vitest';
import './support/ledger.ts';
import { reference } from './support/reference.ts';
import { SOLVERS } from './support/solvers.ts';
import { type SpiceReference, spiceCases } from './support/spice-networks.ts';

/**
 * Networks solved by ngspice 39 and by a dense complex solve in another language, which agree to 1e-12
 * (fixtures/reference/networks). Their answers are printed to 1e-9; ours must meet them to 1e-9 of the
 * largest value of the network.
 */
describe.each(SOLVERS)('networks solved by ngspice, by the %s solver', (_, solve) => {
  it.each(spiceCases)('%s', (_title, { name, job, nodes, wires }) => {
    const { results } = reference<SpiceReference>(`networks/${name}`);
    const solution = solve(job, 'design');
    const top = Math.max(...results.node_voltages_ngspice.map((v) => Math.hypot(v.re, v.im)));
    let compared = 0;
    for (const { node, re, im } of results.node_voltages_ngspice) {
      const place = nodes[node];
      if (!place) continue;
      const [ours, imaginary] = solution.buses.find((b) => b.id === place[0])!.phasors![place[1]]!;
      expect(Math.hypot(ours - re, imaginary - im) / top, node).toBeWithin(1e-9, 'voltage, of the largest');
      compared++;
    }
    expect(compared).toBe(Object.keys(nodes).length);

    const most = Math.max(...results.run_currents.map((i) => i.i_mag));
    for (const [wire, [run, conductor]] of Object.entries(wires)) {
      const amps = solution.runs.find((r) => r.id === run)!.amps![conductor]!;
      const theirs = results.run_currents.find((i) => i.id === wire)!.i_mag;
      expect((amps - theirs) / most, wire).toBeWithin(2e-9, 'current, of the largest');
    }
    for (const run of solution.runs) {
      const parts = Object.entries(wires).filter(([, [id]]) => id === run.id);
      const theirs = parts.reduce(
        (sum, [wire]) => sum + results.run_currents.find((i) => i.id === wire)!.loss_w,
        0,
      );
      expect((run.lossWatts! - theirs) / results.total_run_loss_w).toBeWithin(1e-9, 'loss, of the sum');
    }
  });
});
