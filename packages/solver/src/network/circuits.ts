import type { Job } from '../job/index.ts';
import type { Buses } from './bus-systems.ts';
import { disjointSets } from './groups.ts';
import type { LoadModel } from './sinks.ts';

/** A connected piece of branch runs, cut where anything else touches a bus; or a load at such a bus by itself. */
export interface Circuit {
  loads: number[];
  runs: number[];
  /** Every bus of it, those where it begins included. */
  buses: number[];
  /** Where it hangs on the rest: the buses at which it was cut. */
  begins: number[];
}

export interface Circuits {
  list: Circuit[];
  ofLoad: Int32Array;
  /** −1 for runs that are in none: feeders and services. */
  ofRun: Int32Array;
}

/** Buses that a run of another kind, a source or a transformer touches. */
export function cutBuses(job: Job, buses: Buses): Uint8Array {
  const cut = new Uint8Array(buses.ids.length);
  const at = (id: string): void => {
    cut[buses.index.get(id)!] = 1;
  };
  for (const source of job.sources) at(source.bus);
  for (const t of job.transformers) {
    at(t.from);
    at(t.to);
  }
  for (const run of job.runs)
    if (run.kind !== 'branch') {
      at(run.from);
      at(run.to);
    }
  return cut;
}

/** Circuits in the order of their first run or load in the file: those with runs first. */
export function findCircuits(job: Job, buses: Buses, loads: readonly LoadModel[]): Circuits {
  const cut = cutBuses(job, buses);
  const { find, join } = disjointSets(job.runs.length);
  const firstAt = new Int32Array(buses.ids.length).fill(-1);
  // An open run still shapes its circuit: closing it makes no new one.
  const inCircuit = (run: Job['runs'][number]) => run.kind === 'branch';
  for (const [i, run] of job.runs.entries()) {
    if (!inCircuit(run)) continue;
    for (const id of [run.from, run.to]) {
      const bus = buses.index.get(id)!;
      if (cut[bus]) continue;
      if (firstAt[bus] === -1) firstAt[bus] = i;
      else join(firstAt[bus]!, i);
    }
  }
  const list: Circuit[] = [];
  const ofRun = new Int32Array(job.runs.length).fill(-1);
  const ofRoot = new Map<number, number>();
  const members: Set<number>[] = [];
  for (const [i, run] of job.runs.entries()) {
    if (!inCircuit(run)) continue;
    const root = find(i);
    let c = ofRoot.get(root);
    if (c === undefined) {
      c = list.push({ loads: [], runs: [], buses: [], begins: [] }) - 1;
      members.push(new Set());
      ofRoot.set(root, c);
    }
    ofRun[i] = c;
    list[c]!.runs.push(i);
    members[c]!.add(buses.index.get(run.from)!).add(buses.index.get(run.to)!);
  }
  for (const [c, circuit] of list.entries()) {
    circuit.buses = [...members[c]!].sort((a, b) => a - b);
    circuit.begins = circuit.buses.filter((bus) => cut[bus]);
  }
  const ofLoad = new Int32Array(loads.length).fill(-1);
  for (const [i, load] of loads.entries()) {
    const run = load.along >= 0 ? load.along : load.bus >= 0 && !cut[load.bus] ? firstAt[load.bus]! : -1;
    let c = run >= 0 ? ofRun[run]! : -1;
    if (c < 0) {
      const own = load.bus >= 0 ? [load.bus] : [];
      c = list.push({ loads: [], runs: [], buses: own, begins: own }) - 1;
    }
    ofLoad[i] = c;
    list[c]!.loads.push(i);
  }
  return { list, ofLoad, ofRun };
}
