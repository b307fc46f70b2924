import type { Job } from '../job/index.ts';
import { buildCore, type Core } from '../judge/core.ts';
import {
  disjointSets,
  isZero,
  type LoadModel,
  layOut,
  type Network,
  type Refusal,
  refusal,
  SLOT,
} from '../network/index.ts';

/** A job whose loads are impedances, with a neutral in place and with it opened. */
export interface OpenedNeutral {
  intact: Core;
  opened: Core;
  /** The end that is cut off from the source's neutral; the one more steps away where another path remains. */
  farBus: string;
  otherPath: boolean;
  /** Node of the neutral at `farBus`, in either network. */
  farIntact: number;
  farOpened: number;
}

/** Every load as the constant impedance that draws its amount at nominal volts. */
const asImpedances = (job: Job): Job => ({
  ...job,
  loads: job.loads.map((load) => ({ ...load, behaviour: 'impedance' })),
});

/** The same run by its ohms, with a neutral that has some: a neutral of none would be one node with both ends. */
function withNeutralOhms(job: Job, index: number, [r, x]: readonly [number, number]): Job {
  const perKm = job.lengthUnit === 'ft' ? 1000 / 0.3048 : 1000;
  const ohms = { r: r * perKm, x: x * perKm, per: 'km', neutral: { r: 1, x: 0 } } as const;
  return {
    ...job,
    runs: job.runs.map((run, i) =>
      i === index ? { ...run, length: 1, sets: 1, size: null, neutralSize: null, ohms } : run,
    ),
  };
}

/** Opens the neutral of one run at its end towards the source. Refused: a run without one, or out of use. */
export function openNeutral(job: Job, runId: string): OpenedNeutral | Refusal {
  const at = `run ${runId}`;
  const index = job.runs.findIndex((run) => run.id === runId);
  const run = job.runs[index];
  if (!run) return refusal(at, 'no run of the job has this id');
  if (!run.conductors.includes('N'))
    return refusal(at, `has no neutral to lose: its conductors are ${run.conductors.join(', ')}`);
  const intact = buildCore(asImpedances(job));
  if ('kind' in intact) return intact;
  const { buses, feeding, nodes, ohms } = intact.network;
  const slotAt = (id: string) => 4 * buses.index.get(id)! + SLOT.N;
  if (!feeding.runLive[index])
    return refusal(at, 'is open, or nothing feeds it: its neutral carries nothing');
  if (nodes.at[slotAt(run.from)]! < 0)
    return refusal(at, 'its neutral leads to no source: there is none to lose');

  const slots = ohms.runs[index]!;
  const line = slots.find((z, slot) => z !== null && slot !== SLOT.N) ?? [0, 0];
  const base = isZero(slots[SLOT.N]!) ? buildCore(asImpedances(withNeutralOhms(job, index, line))) : intact;
  if ('kind' in base) return base;
  const { network } = base;
  const elements = network.elements.filter(
    (e) => e.kind !== 'run' || e.owner !== index || e.conductor !== SLOT.N,
  );
  const cut: Network = { ...network, elements };
  const returns = neutralReturns(cut);
  const nodeAt = (id: string) => network.nodes.at[slotAt(id)]!;
  const otherPath = returns(nodeAt(run.from)) && returns(nodeAt(run.to));
  const steps = (id: string) => base.pathTo(buses.index.get(id)!)?.length ?? 0;
  const fromIsFar = otherPath ? steps(run.from) > steps(run.to) : !returns(nodeAt(run.from));
  const [farBus, nearBus] = fromIsFar ? [run.from, run.to] : [run.to, run.from];
  const loads = base.loads.map((load) =>
    load.along === index ? moved(load, nodeAt(nearBus), nodeAt(farBus)) : load,
  );
  const sinks = loads.flatMap((load) => load.sinks);
  return {
    intact,
    opened: { ...base, network: cut, loads, layout: layOut(cut, sinks) },
    farBus,
    otherPath,
    farIntact: nodes.at[slotAt(farBus)]!,
    farOpened: nodeAt(farBus),
  };
}

/** Whether metal still joins a node to a neutral that is held, at a source or a transformer. */
function neutralReturns({ nodes, elements }: Network): (node: number) => boolean {
  const { find, join } = disjointSets(nodes.count);
  for (const e of elements) if (e.kind === 'run' && e.conductor === SLOT.N) join(e.nodes[0]!, e.nodes[1]!);
  const held = new Set<number>();
  for (let node = 0; node < nodes.count; node++) if (nodes.fixed[node]) held.add(find(node));
  return (node) => held.has(find(node));
}

/** A load spread along the run lies beyond the break with all of it. */
const moved = (load: LoadModel, near: number, far: number): LoadModel => ({
  ...load,
  sinks: load.sinks.map((sink) => ({
    ...sink,
    a: sink.a === near ? far : sink.a,
    b: sink.b === near ? far : sink.b,
  })),
});
