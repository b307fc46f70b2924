import { CONDUCTORS, type Conductor } from '../job/index.ts';
import { insulationC, runAmpacity, runSize } from '../job/run-ratings.ts';
import { conductorOhms, type Element, element, type Refusal, refusal, stamp } from '../network/index.ts';
import type { Core } from './core.ts';
import type { Credits } from './credits.ts';
import type { Demand } from './demand.ts';
import { admittanceIn, type State, solveState, stampAndSolve } from './solve-state.ts';
import type { Volts } from './volts.ts';

/** What the operating temperature of one conductor of a run follows from; `at` is its element. */
export interface Thermal {
  at: number;
  run: number;
  conductor: Conductor;
  ambientC: number;
  /** Rated temperature less the reference ambient of the table, °C. */
  riseC: number;
  /** Ampacity times the bundling factor, amperes of all sets. */
  fullAmps: number;
}

/** Rounds end when no temperature moves by more than this, °C: currents then stand far below 1e-8 relative. */
const SETTLED_C = 1e-9;
const ROUNDS = 200;
/** Above this nothing conducts as its table says (copper boils at some 2560 °C): such a state is not served. */
const HOTTEST_C = 2000;

/** Conductors whose resistance follows their current (model: operating temperature). */
export function thermalsOf(core: Core): Thermal[] | Refusal {
  const { job, network } = core;
  const wanted = new Set(core.operating);
  const list: Thermal[] = [];
  for (const [at, e] of network.elements.entries()) {
    if (e.kind !== 'run' || !wanted.has(e.owner)) continue;
    const run = job.runs[e.owner]!;
    const conductor = CONDUCTORS[e.conductor]!;
    const size = runSize(run, job.conductorRows, (conductor === 'N' ? run.neutralSize : null) ?? run.size);
    const ampacity = size
      ? runAmpacity(run, size, null)
      : ({ ok: false, message: 'it has no size' } as const);
    if (!size || !ampacity.ok) {
      const why = ampacity.ok ? '' : ampacity.message;
      return refusal(`run ${run.id}`, `has no ampacity to follow an operating temperature by: ${why}`);
    }
    const rated = size.kind === 'row' ? ampacity.ratedC : insulationC(run, size.family);
    list.push({
      at,
      run: e.owner,
      conductor,
      ambientC: run.ambient ?? ampacity.referenceC,
      riseC: rated - ampacity.referenceC,
      fullAmps: ampacity.tableAmps * ampacity.bundlingFactor * run.sets,
    });
  }
  return list;
}

function atTemperatures(core: Core, thermals: readonly Thermal[], celsius: Float64Array): Element[] {
  const elements = [...core.network.elements];
  for (const [k, { at, run, conductor }] of thermals.entries()) {
    const e = elements[at]!;
    const found = conductorOhms(core.job, core.job.runs[run]!, conductor, celsius[k]!);
    if (found.ok) elements[at] = element('run', run, e.conductor, e.nodes, e.u, found.ohms[0], found.ohms[1]);
  }
  return elements;
}

const ampsThrough = (core: Core, { nodes, yRe, yIm }: Element, volts: Volts): number => {
  const { referenceRe, referenceIm } = core.network.nodes;
  const [a, b] = nodes as [number, number];
  const re = referenceRe[a]! - referenceRe[b]! + (volts.re[a]! - volts.re[b]!);
  const im = referenceIm[a]! - referenceIm[b]! + (volts.im[a]! - volts.im[b]!);
  return Math.sqrt((re * re + im * im) * (yRe * yRe + yIm * yIm));
};

/** Solves a demand and the temperatures that it brings about, in turns. Refused where they do not settle. */
function solveOperating(core: Core, demand: Demand, credits: Credits | null): State | Refusal {
  const thermals = thermalsOf(core);
  if ('kind' in thermals) return thermals;
  let celsius = Float64Array.from(thermals, (t) => t.ambientC);
  let volts: Volts | null = null;
  let iterations = 0;
  let hottest = [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
  for (let round = 0; round < ROUNDS; round++) {
    const elements = atTemperatures(core, thermals, celsius);
    const stamped = stamp(core.layout, elements, admittanceIn(core, demand));
    if ('kind' in stamped) return stamped;
    const state = solveState(core, stamped, demand, credits, volts);
    if ('kind' in state) return state;
    iterations += state.iterations;
    volts = state.volts;
    const next = Float64Array.from(thermals, (t) => {
      const share = ampsThrough(core, elements[t.at]!, state.volts) / t.fullAmps;
      return t.ambientC + t.riseC * share * share;
    });
    const moved = next.reduce((most, t, k) => Math.max(most, Math.abs(t - celsius[k]!)), 0);
    const top = next.reduce((most, t) => Math.max(most, t), 0);
    if (moved <= SETTLED_C && top <= HOTTEST_C) return { ...state, iterations };
    // Rounds on ohms too cold, and every other one after them, are hotter than what they lead to.
    if (!(top <= HOTTEST_C || top < Math.max(...hottest))) break;
    hottest = [hottest[1]!, top];
    celsius = next;
  }
  return refusal(
    `run ${core.job.runs[thermals[0]!.run]!.id}`,
    'conductor temperatures do not settle: some conductor carries far more than its ampacity',
  );
}

/** Solves a demand on a matrix of its own. */
export const solveDemand = (
  core: Core,
  demand: Demand,
  credits: Credits | null,
  from: Volts | null = null,
): State | Refusal =>
  core.operating.length > 0
    ? solveOperating(core, demand, credits)
    : stampAndSolve(core, demand, credits, from);

/** The same, on the factor of another state where only currents differ from it. */
export const solveFrom = (
  core: Core,
  state: State,
  demand: Demand,
  credits: Credits | null,
): State | Refusal =>
  core.operating.length === 0 && core.layout.impedanceSinks.length === 0
    ? solveState(core, state.stamped, demand, credits, state.volts)
    : solveDemand(core, demand, credits, state.volts);
