import type { Job } from '../job/index.ts';
import { buildLoads, buildNetwork, findCircuits, type Refusal } from '../network/index.ts';

/** A circuit by ids: its branch runs, its loads, and the buses at which it hangs on the rest. */
export interface CircuitIds {
  runs: string[];
  loads: string[];
  begins: string[];
}

/** Circuits of a job as they are judged (model: a connected piece of branch runs). Refused with the network. */
export function circuitsOf(job: Job): CircuitIds[] | Refusal {
  const network = buildNetwork(job);
  if ('kind' in network) return network;
  return findCircuits(job, network.buses, buildLoads(network)).list.map(({ runs, loads, begins }) => ({
    runs: runs.map((i) => job.runs[i]!.id),
    loads: loads.map((i) => job.loads[i]!.id),
    begins: begins.map((bus) => network.buses.ids[bus]!),
  }));
}
