import type { Job } from '../job/index.ts';
import {
  buildLoads,
  buildNetwork,
  type Circuits,
  disjointSets,
  element,
  findCircuits,
  isZero,
  type Layout,
  type LoadModel,
  layOut,
  type Network,
  type PathTree,
  pathIn,
  pathTrees,
  type Refusal,
  runOhms,
  SLOT,
  type Step,
} from '../network/index.ts';

/** Everything about a job that no scenario changes. */
export interface Core {
  job: Job;
  network: Network;
  loads: LoadModel[];
  circuits: Circuits;
  layout: Layout;
  /** Buses with one label are joined by closed runs: they are in the same system. */
  systemLabel: Int32Array;
  /** Paths from the source bus of a bus's system; `null` where it has none. */
  treeOf: (bus: number) => PathTree | null;
  /** From that source bus to it; `null` where it is not reached. */
  pathTo: (bus: number) => Step[] | null;
  /** Runs whose resistance follows their current. */
  operating: number[];
  /** Some current or admittance depends on the solution: a turn must be solved anew. */
  iterates: boolean;
}

const known = new WeakMap<Job, Core | Refusal>();

/** The core of a job, built once for each job object: jobs are never changed after they are made. */
export function buildCore(job: Job): Core | Refusal {
  const found = known.get(job);
  if (found) return found;
  const core = newCore(job);
  known.set(job, core);
  return core;
}

/**
 * The core of a job that differs from another in the size or the length of one run alone: everything but that run's
 * impedances is shared. Where the change joins or parts nodes, or cannot be followed, the core is built anew.
 */
export function coreLike(job: Job, { job: other, run }: { job: Job; run: number }): Core | Refusal {
  const base = buildCore(other);
  const ohms = runOhms(job, job.runs[run]!);
  if ('kind' in base || !ohms.ok || base.operating.includes(run)) return buildCore(job);
  const { network } = base;
  const slots = network.ohms.runs[run]!.map((was, slot) =>
    was === null ? null : (slot === SLOT.N ? ohms.neutral : ohms.line).ohms,
  );
  const merges = (z: readonly [number, number] | null) => z !== null && isZero(z);
  if (slots.some((z, slot) => merges(z) !== merges(network.ohms.runs[run]![slot]!))) return buildCore(job);
  const elements = network.elements.map((e) => {
    if (e.kind !== 'run' || e.owner !== run) return e;
    const [r, x] = slots[e.conductor]!;
    return element('run', run, e.conductor, e.nodes, e.u, r, x);
  });
  const runs = network.ohms.runs.map((was, i) => (i === run ? slots : was));
  const core = { ...base, job, network: { ...network, job, elements, ohms: { ...network.ohms, runs } } };
  known.set(job, core);
  return core;
}

function newCore(job: Job): Core | Refusal {
  const network = buildNetwork(job);
  if ('kind' in network) return network;
  const loads = buildLoads(network);
  const impedanceSinks = loads.flatMap((load, i) =>
    job.loads[i]!.behaviour === 'impedance' ? load.sinks : [],
  );
  const { buses, feeding } = network;
  const { find, join } = disjointSets(buses.ids.length);
  for (const [i, run] of job.runs.entries())
    if (feeding.runLive[i]) join(buses.index.get(run.from)!, buses.index.get(run.to)!);
  const trees = pathTrees(network);
  const treeOf = (bus: number) => {
    const system = buses.system[bus];
    return system ? trees(buses.index.get(system.origin.sourceBus)!) : null;
  };
  const operating = job.runs.flatMap((run, i) =>
    run.temperature === 'operating' && !run.ohms && run.length > 0 && feeding.runLive[i] ? [i] : [],
  );
  const follows = job.loads.some(
    (load, i) =>
      loads[i]!.served &&
      (load.behaviour === 'power' || (load.behaviour === 'current' && job.angle === 'local')),
  );
  return {
    job,
    network,
    loads,
    circuits: findCircuits(job, buses, loads),
    layout: layOut(network, impedanceSinks),
    systemLabel: Int32Array.from(buses.ids, (_, i) => find(i)),
    treeOf,
    pathTo: (bus) => {
      const tree = treeOf(bus);
      return tree && pathIn(tree, bus);
    },
    operating,
    iterates: follows || operating.length > 0,
  };
}
