import { pathSolver, solve } from '../linear/index.ts';
import { type Refusal, refusal, type Sink, type Stamped, stamp } from '../network/index.ts';
import type { Core } from './core.ts';
import type { Credits } from './credits.ts';
import type { Demand } from './demand.ts';
import { ampsOf, type Drawn, type SinkRule, sinkAdmittance, sinkCurrent } from './sink-current.ts';
import { type Volts, zeroVolts } from './volts.ts';

/** A solved state of the whole network. */
export interface State {
  demand: Demand;
  volts: Volts;
  stamped: Stamped;
  iterations: number;
}

/** Rounds stop at this share of the largest voltage; after `ROUNDS` the state counts as not solvable. */
const SETTLED = 1e-10;
const ROUNDS = 100;
/** Further rounds sharpen a settled state until rounding stops them. */
const SHARPENING = 8;
const SHARP = 1e-15;

/** A sink that flows as a current in this demand, with its rule. */
interface Flow {
  sink: Sink;
  drawn: Drawn;
  rule: SinkRule;
}

/** The current sinks of a demand; impedance loads are stamped instead. */
export function flowsOf(core: Core, demand: Demand): Flow[] {
  const angle: SinkRule = core.job.angle === 'local' ? 'local' : 'nominal';
  const flows: Flow[] = [];
  for (const [i, load] of core.loads.entries()) {
    const { behaviour } = core.job.loads[i]!;
    if (i === demand.starting) {
      for (const sink of load.sinks) flows.push({ sink, drawn: load.starting!, rule: angle });
    } else if (behaviour !== 'impedance' && demand.amps[i] !== 0) {
      const drawn = ampsOf(load, demand.amps[i]!);
      for (const sink of load.sinks)
        flows.push({ sink, drawn, rule: behaviour === 'power' ? 'power' : angle });
    }
  }
  if (demand.extra)
    for (const sink of demand.extra.sinks) flows.push({ sink, drawn: demand.extra.drawn, rule: 'nominal' });
  return flows;
}

/** Admittance of each impedance load in a demand; none while it starts. */
export const admittanceIn = (core: Core, demand: Demand) => (sink: Sink) =>
  sink.load === demand.starting
    ? ([0, 0] as const)
    : sinkAdmittance(sink, ampsOf(core.loads[sink.load]!, demand.amps[sink.load]!));

/**
 * Solves the network for a demand on a matrix that is stamped for it. One solve where every current is fixed; else
 * current injection with the factor kept, to max|ΔV| ≤ 1e-10·max|V|. Refused after 100 rounds, naming the load
 * that is worst off: never a last iterate.
 */
export function solveState(
  core: Core,
  stamped: Stamped,
  demand: Demand,
  credits: Credits | null,
  from: Volts | null = null,
): State | Refusal {
  const { layout, network } = { layout: stamped.layout, network: core.network };
  const n = layout.nodeOf.length;
  const flows = flowsOf(core, demand);
  const fixedRe = stamped.baseRe.slice();
  const fixedIm = stamped.baseIm.slice();
  if (demand.credits && credits)
    for (let u = 0; u < n; u++) {
      fixedRe[u]! += credits.re[layout.nodeOf[u]!]!;
      fixedIm[u]! += credits.im[layout.nodeOf[u]!]!;
    }
  const current = new Float64Array(2);
  const draw = (flow: Flow, volts: Volts, re: Float64Array, im: Float64Array) => {
    sinkCurrent(flow.sink, flow.drawn, flow.rule, network, volts, current);
    const a = layout.unknownOf[flow.sink.a]!;
    const b = layout.unknownOf[flow.sink.b]!;
    if (a >= 0) {
      re[a]! -= current[0]!;
      im[a]! -= current[1]!;
    }
    if (b >= 0) {
      re[b]! += current[0]!;
      im[b]! += current[1]!;
    }
  };
  const volts = from ? { re: from.re.slice(), im: from.im.slice() } : zeroVolts(network);
  const following = flows.filter((flow) => flow.rule !== 'nominal');
  for (const flow of flows) if (flow.rule === 'nominal') draw(flow, volts, fixedRe, fixedIm);

  const re = new Float64Array(n);
  const im = new Float64Array(n);
  /** One round; returns max|ΔV| ÷ max|V|. */
  const round = (): number => {
    re.set(fixedRe);
    im.set(fixedIm);
    for (const flow of following) draw(flow, volts, re, im);
    solve(stamped.factor, re, im);
    let largest = 0;
    let moved = 0;
    for (let u = 0; u < n; u++) {
      const node = layout.nodeOf[u]!;
      const dRe = re[u]! - volts.re[node]!;
      const dIm = im[u]! - volts.im[node]!;
      const vRe = network.nodes.referenceRe[node]! + re[u]!;
      const vIm = network.nodes.referenceIm[node]! + im[u]!;
      const change = dRe * dRe + dIm * dIm;
      const square = vRe * vRe + vIm * vIm;
      if (!(change <= moved)) moved = change;
      if (!(square <= largest)) largest = square;
      volts.re[node] = re[u]!;
      volts.im[node] = im[u]!;
    }
    return n === 0 ? 0 : Math.sqrt(moved) / Math.sqrt(largest);
  };

  let moved = round();
  if (following.length === 0) {
    if (!Number.isFinite(moved) && n > 0 && Number.isNaN(volts.re[layout.nodeOf[0]!]!))
      return refusal(
        'network',
        'its voltages are not finite: an impedance or a load is out of all proportion',
      );
    return { demand, volts, stamped, iterations: 1 };
  }
  let iterations = 1;
  while (!(moved <= SETTLED)) {
    if (iterations === ROUNDS || Number.isNaN(moved)) return notServed(core, stamped, following);
    moved = round();
    iterations++;
  }
  for (let k = 0; k < SHARPENING && moved > SHARP; k++) {
    const next = round();
    if (!(next < moved)) break;
    moved = next;
  }
  return { demand, volts, stamped, iterations };
}

/**
 * The load that asks for the most by itself: its nominal current times the impedance that it sees, as a share of its
 * volts. The one whose voltage is lowest may be only its victim.
 */
function notServed(core: Core, stamped: Stamped, flows: readonly Flow[]): Refusal {
  const { unknownOf } = stamped.layout;
  const path = pathSolver(stamped.factor);
  let worst = flows[0]!;
  let largest = -1;
  for (const flow of flows) {
    const { a, b, nominal, share } = flow.sink;
    const from = unknownOf[a]!;
    const to = unknownOf[b]!;
    path.reach([from, to].filter((unknown) => unknown >= 0));
    path.clear();
    if (from >= 0) path.add(from, 1, 0);
    if (to >= 0) path.add(to, -1, 0);
    path.solve();
    const re = (from < 0 ? 0 : path.re(from)) - (to < 0 ? 0 : path.re(to));
    const im = (from < 0 ? 0 : path.im(from)) - (to < 0 ? 0 : path.im(to));
    const asked = (Math.abs(flow.drawn.amps * share) * Math.sqrt(re * re + im * im)) / nominal;
    if (asked > largest) {
      largest = asked;
      worst = flow;
    }
  }
  const load = core.job.loads[worst.sink.load]!;
  const where = load.bus === null ? `run ${load.along}` : `bus ${load.bus}`;
  return refusal(
    `load ${load.id}`,
    `the load cannot be served: no solution at ${where} was found in ${ROUNDS} rounds; its conductors are too long or too thin for it, or its size is wrong`,
  );
}

/** Stamps for a demand and solves it. */
export function stampAndSolve(
  core: Core,
  demand: Demand,
  credits: Credits | null,
  from: Volts | null = null,
): State | Refusal {
  const stamped = stamp(core.layout, core.network.elements, admittanceIn(core, demand));
  return 'kind' in stamped ? stamped : solveState(core, stamped, demand, credits, from);
}
