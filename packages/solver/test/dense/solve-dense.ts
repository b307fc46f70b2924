import { type JobFile, jobSchema, type Scenario, type Solution } from '@farlug/solver/job';
import { loadResult, unserved } from './load-results.ts';
import { busResult, runResults } from './place-results.ts';
import { scenariosOf } from './scenario.ts';
import { servedLoads } from './sinks.ts';
import { topologyOf } from './topology.ts';
import { totalsOf } from './totals.ts';

export interface DenseSolution extends Solution {
  /** By id, loads whose headroom ends where the network can be served no more: the least extra amps seen unserved. */
  collapses: ReadonlyMap<string, number>;
}

/**
 * Solves a job file densely, in decimals of fifty digits, and prints `farlug-solution/1`, written from the model's
 * definitions alone. `headroom` says for which loads: it costs most of the time, and is `null` for the others.
 */
export const solveDense = (
  file: JobFile,
  scenario: Scenario,
  headroom: boolean | ReadonlySet<string> = true,
): DenseSolution => {
  const job = jobSchema.parse(file);
  const topology = topologyOf(job);
  const loads = servedLoads(job, topology);
  const scenarios = scenariosOf(job, topology, loads);
  const asked = (id: string) => (typeof headroom === 'boolean' ? headroom : headroom.has(id));
  const collapses = new Map<string, number>();
  const results = job.loads.map((load) => {
    const item = loads.find((each) => each.load.id === load.id);
    if (!item) return unserved(load.id, load.terminals);
    const { result, collapseAmps } = loadResult(job, topology, scenarios, scenario, item, asked(load.id));
    if (collapseAmps !== null) collapses.set(load.id, collapseAmps);
    return result;
  });
  const shown = scenarios.shown(scenario);
  const credits = scenario === 'everything-on' || scenario === 'light' ? [] : scenarios.credits;
  return {
    format: 'farlug-solution/1',
    scenario,
    buses: topology.buses.map((bus) => busResult(job, topology, shown, scenarios.design, bus)),
    runs: runResults(job, topology, loads, shown, results),
    loads: results,
    totals: totalsOf(loads, credits, shown),
    warnings: [],
    collapses,
  };
};
