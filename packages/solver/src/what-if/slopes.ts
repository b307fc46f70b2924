import type { Core } from '../judge/core.ts';
import { type Thermal, thermalsOf } from '../judge/operating.ts';
import { sinkSlope } from '../judge/sink-current.ts';
import { flowsOf } from '../judge/solve-state.ts';
import { conductorOhms, type Element, type Refusal } from '../network/index.ts';
import type { LoadState } from './load-states.ts';

/** A real 2 × 2 matrix over (re, im): 1 becomes p + jq, and j becomes r + js. */
export type Slope = readonly [p: number, q: number, r: number, s: number];

/** A current from node a to node b that changes by slope·δV beyond what the admittance matrix has. */
export interface Follower {
  a: number;
  b: number;
  slope: Slope;
}

/** What of a state follows its own voltages. */
export interface Following {
  list: Follower[];
  /** Whole slope of the conductors whose resistance follows their current; the admittance for all others. */
  ofElement: (e: Element) => Slope;
}

/** Half of a step in °C over which resistance is all but a straight line. */
const STEP_C = 1;

/** Loads at local angle or of constant power, and conductors at operating temperature. Refused: as when they are solved. */
export function followingOf(core: Core, state: LoadState): Following | Refusal {
  const list: Follower[] = [];
  const fixed = (e: Element): Slope => [e.yRe, e.yIm, -e.yIm, e.yRe];
  if (!state.demand) return { list, ofElement: fixed };
  const out = new Float64Array(2);
  for (const flow of flowsOf(core, state.demand)) {
    if (flow.rule === 'nominal') continue;
    const slope = sinkSlope(flow, core.network, state.volts);
    slope(1, 0, out);
    const [p, q] = [out[0]!, out[1]!];
    slope(0, 1, out);
    list.push({ a: flow.sink.a, b: flow.sink.b, slope: [p, q, out[0]!, out[1]!] });
  }
  const warm = new Map<Element, Slope>();
  if (core.operating.length > 0) {
    const thermals = thermalsOf(core);
    if ('kind' in thermals) return thermals;
    for (const thermal of thermals) {
      const e = state.stamped.elements[thermal.at]!;
      const slope = warmSlope(core, state, thermal, e);
      warm.set(e, slope);
      const [p, q, r, s] = slope;
      list.push({
        a: e.nodes[0]!,
        b: e.nodes[1]!,
        slope: [p - e.yRe, q - e.yIm, r + e.yIm, s - e.yRe],
      });
    }
  }
  return { list, ofElement: (e) => warm.get(e) ?? fixed(e) };
}

/**
 * δi of δv for v = (R + jX)·i whose R grows by R′ per ampere squared: δv = z·δi + R′·2·Re(conj(i)·δi)·i, inverted.
 */
function warmSlope(core: Core, state: LoadState, thermal: Thermal, e: Element): Slope {
  const { ambientC, riseC, fullAmps, run, conductor } = thermal;
  const [vRe, vIm] = voltsThrough(core, state, e);
  const re = e.yRe * vRe - e.yIm * vIm;
  const im = e.yRe * vIm + e.yIm * vRe;
  const perSquare = riseC / (fullAmps * fullAmps);
  const celsius = ambientC + perSquare * (re * re + im * im);
  const ohms = [celsius - STEP_C, celsius + STEP_C].map((at) => {
    const found = conductorOhms(core.job, core.job.runs[run]!, conductor, at);
    return found.ok ? found.ohms[0] : e.zRe;
  });
  const growth = (2 * perSquare * (ohms[1]! - ohms[0]!)) / (2 * STEP_C);
  const a = e.zRe + growth * re * re;
  const b = -e.zIm + growth * re * im;
  const c = e.zIm + growth * re * im;
  const d = e.zRe + growth * im * im;
  const whole = a * d - b * c;
  return [d / whole, -c / whole, -b / whole, a / whole];
}

/** Volts from one end of a conductor to the other. */
export function voltsThrough(core: Core, { volts }: LoadState, { nodes }: Element): [number, number] {
  const { referenceRe, referenceIm } = core.network.nodes;
  const [a, b] = nodes as [number, number];
  return [
    referenceRe[a]! - referenceRe[b]! + (volts.re[a]! - volts.re[b]!),
    referenceIm[a]! - referenceIm[b]! + (volts.im[a]! - volts.im[b]!),
  ];
}
