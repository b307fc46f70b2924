import type { Conductor, Job, Phasor } from '../job/index.ts';
import type { Core } from '../judge/core.ts';
import { buildCore } from '../judge/core.ts';
import type { Credits } from '../judge/credits.ts';
import { diversityCredits } from '../judge/credits.ts';
import type { Demand } from '../judge/demand.ts';
import { designDemand, turnDemand, turnsOf } from '../judge/demand.ts';
import type { State } from '../judge/solve-state.ts';
import { solveState, stampAndSolve } from '../judge/solve-state.ts';
import type { Element } from '../network/index.ts';
import { SLOT } from '../network/index.ts';
import type { HandCheck } from './hand-check.ts';
import { handCheckRun, prepareHandChecks } from './hand-check.ts';
import type { Phasors, RunState } from './run-state.ts';

export type HandChecksOutcome = { ok: true; checks: HandCheck[] } | { ok: false; at: string; reason: string };

/**
 * The hand check of every service, feeder and branch run of a job, or of those named, in file order: a branch run in
 * the turn of its own circuit that drops it most (each circuit full), any other run at design demand.
 * Refused: a network that cannot be solved, at operating temperatures too, which no table formula follows.
 */
export function handChecks(job: Job, runIds?: ReadonlySet<string>): HandChecksOutcome {
  const operating = job.runs.find((run) => run.temperature === 'operating' && !run.ohms);
  if (operating)
    return {
      ok: false,
      at: `run ${operating.id}`,
      reason: 'is at its operating temperature, which no table formula follows',
    };
  const core = buildCore(job);
  if ('kind' in core) return { ok: false, at: core.at, reason: core.reason };
  const credits = diversityCredits(core);
  if (credits && 'kind' in credits) return { ok: false, at: credits.at, reason: credits.reason };
  const design = stampAndSolve(core, designDemand(core), credits);
  if ('kind' in design) return { ok: false, at: design.at, reason: design.reason };

  const prepared = prepareHandChecks(job);
  const elements = runElements(core);
  const turns = turnStates(core, design, credits);
  const checks = job.runs.flatMap((run, i): HandCheck[] => {
    if (runIds && !runIds.has(run.id)) return [];
    const circuit = core.circuits.ofRun[i]!;
    const states = circuit < 0 ? [design] : turns(circuit);
    return [
      worst(states.map((state) => handCheckRun(prepared, i, runState(core, state, elements[i] ?? [], i)))),
    ];
  });
  return { ok: true, checks };
}

/** One conductor's elements of every run, by run. */
const runElements = (core: Core): Element[][] => {
  const byRun: Element[][] = [];
  for (const e of core.network.elements) {
    if (e.kind !== 'run') continue;
    byRun[e.owner] ??= [];
    byRun[e.owner]!.push(e);
  }
  return byRun;
};

/** States of a circuit's turns, solved once; impedance loads change the matrix and are stamped anew. */
const turnStates = (core: Core, design: State, credits: Credits | null): ((circuit: number) => State[]) => {
  const known = new Map<number, State[]>();
  const stampedAnew = core.layout.impedanceSinks.length > 0;
  const solved = (demand: Demand) =>
    stampedAnew ? stampAndSolve(core, demand, credits) : solveState(core, design.stamped, demand, credits);
  return (circuit) => {
    const found = known.get(circuit);
    if (found) return found;
    const states = turnsOf(core, circuit).flatMap((turn) => {
      const state = solved(turnDemand(core, circuit, turn));
      return 'kind' in state ? [] : [state];
    });
    known.set(circuit, states);
    return states;
  };
};

const CONDUCTOR_OF = Object.fromEntries(Object.entries(SLOT).map(([c, slot]) => [slot, c])) as Record<
  number,
  Conductor
>;

const runState = (core: Core, state: State, elements: readonly Element[], index: number): RunState => {
  const { nodes, buses } = core.network;
  const run = core.job.runs[index]!;
  const to = buses.index.get(run.to)!;
  const last = core.treeOf(to)?.[to];
  const leadsToIt = last === undefined || (last && last.kind !== 'transformer' && last.index === index);
  const [nearBus, otherBus] = leadsToIt ? [run.from, run.to] : [run.to, run.from];
  const volts = (bus: string, c: Conductor): Phasor | null => {
    const node = nodes.at[4 * buses.index.get(bus)! + SLOT[c]]!;
    if (node < 0) return null;
    return [
      nodes.referenceRe[node]! + state.volts.re[node]!,
      nodes.referenceIm[node]! + state.volts.im[node]!,
    ];
  };
  const at = (bus: string): Phasors =>
    Object.fromEntries(
      run.conductors.flatMap((c) => [[c, volts(bus, c)] as const].filter(([, v]) => v !== null)),
    );
  const sign = nearBus === run.from ? 1 : -1;
  const currents: Phasors = {};
  for (const e of elements) {
    const [a, b] = e.nodes as [number, number];
    const dRe = nodes.referenceRe[a]! - nodes.referenceRe[b]! + state.volts.re[a]! - state.volts.re[b]!;
    const dIm = nodes.referenceIm[a]! - nodes.referenceIm[b]! + state.volts.im[a]! - state.volts.im[b]!;
    currents[CONDUCTOR_OF[e.conductor]!] = [
      sign * (e.yRe * dRe - e.yIm * dIm),
      sign * (e.yRe * dIm + e.yIm * dRe),
    ];
  }
  return { near: at(nearBus), far: at(otherBus), currents, factor: (load) => factorOf(core, state, load) };
};

const factorOf = (core: Core, { demand }: State, load: number): number => {
  const { full } = core.loads[load]!;
  return full === 0 ? 0 : demand.amps[load]! / full;
};

const worst = (checks: HandCheck[]): HandCheck =>
  checks.reduce((most, next) =>
    next.ok && (!most.ok || next.nodal.percent > most.nodal.percent) ? next : most,
  );
