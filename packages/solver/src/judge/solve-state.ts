import { type Refusal, refusal, type Sink, type Stamped, stamp } from '../network/index.ts';
import type { Core } from './core.ts';
import type { Credits } from './credits.ts';
import type { Demand } from './demand.ts';
import { type Injection, injectionOf } from './injection.ts';
import { Mixer } from './mixer.ts';
import { newton } from './newton.ts';
import { notServed } from './not-served.ts';
import { ampsOf, type Flow, type SinkRule, sinkAdmittance, sinkCurrent } from './sink-current.ts';
import { addScaled } from './vectors.ts';
import { type Volts, zeroVolts } from './volts.ts';

/** A solved state of the whole network. */
export interface State {
  demand: Demand;
  volts: Volts;
  stamped: Stamped;
  iterations: number;
}

/** Rounds stop at this share of the largest voltage. */
const SETTLED = 1e-10;
/** Rounds that move by a share of the last between these two are mixed with those before. */
const QUICK = 0.03;
const WILD = 0.5;
/** After so many rounds the rest is reckoned; more than `MANY` to come are left to Newton's method. */
const RECKONED = 6;
const MANY = 12;
/** Further rounds sharpen a settled state until rounding stops them. */
const SHARPENING = 8;
const SHARP = 1e-15;

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
 * current injection with the factor kept, to max|ΔV| ≤ 1e-10·max|V|: rounds while they close in, Newton's method where
 * they are slow. Refused where the mismatch stops falling, naming the load that asks for the most: never a last
 * iterate.
 */
export function solveState(
  core: Core,
  stamped: Stamped,
  demand: Demand,
  credits: Credits | null,
  from: Volts | null = null,
): State | Refusal {
  const { network } = core;
  const { nodeOf, unknownOf } = stamped.layout;
  const n = nodeOf.length;
  const flows = flowsOf(core, demand);
  const fixed: Volts = { re: stamped.baseRe.slice(), im: stamped.baseIm.slice() };
  if (demand.credits && credits)
    for (let u = 0; u < n; u++) {
      fixed.re[u]! += credits.re[nodeOf[u]!]!;
      fixed.im[u]! += credits.im[nodeOf[u]!]!;
    }
  const current = new Float64Array(2);
  for (const { sink, drawn, rule } of flows) {
    if (rule !== 'nominal') continue;
    sinkCurrent(sink, drawn, rule, network, null, current);
    const a = unknownOf[sink.a]!;
    const b = unknownOf[sink.b]!;
    if (a >= 0) {
      fixed.re[a]! -= current[0]!;
      fixed.im[a]! -= current[1]!;
    }
    if (b >= 0) {
      fixed.re[b]! += current[0]!;
      fixed.im[b]! += current[1]!;
    }
  }
  const following = flows.filter((flow) => flow.rule !== 'nominal');
  const volts = from ? { re: from.re.slice(), im: from.im.slice() } : zeroVolts(network);
  const injection = injectionOf(network, stamped, following, fixed, volts);

  if (following.length === 0) {
    injection.round();
    if (n > 0 && Number.isNaN(volts.re[nodeOf[0]!]!))
      return refusal(
        'network',
        'its voltages are not finite: an impedance or a load is out of all proportion',
      );
    return { demand, volts, stamped, iterations: 1 };
  }
  const settled = settle(injection, 2 * n);
  if (!settled.ok) return notServed(core, stamped, following, volts, settled.mismatch);
  const { referenceRe, referenceIm } = network.nodes;
  const pointsAway = ({ sink: { a, b, unitRe, unitIm } }: Flow): boolean =>
    (referenceRe[a]! - referenceRe[b]! + volts.re[a]! - volts.re[b]!) * unitRe +
      (referenceIm[a]! - referenceIm[b]! + volts.im[a]! - volts.im[b]!) * unitIm <=
    0;
  if (following.some(pointsAway)) return notServed(core, stamped, following, volts, null);
  return { demand, volts, stamped, iterations: settled.iterations };
}

/** Brings the volts of an injection to rest, or to where their mismatch stops falling. */
function settle(
  injection: Injection,
  length: number,
): { ok: true; iterations: number } | { ok: false; mismatch: number } {
  const { fixedPoint } = injection;
  const x = new Float64Array(length);
  const f = new Float64Array(length);
  const mixer = new Mixer();
  injection.write(x);
  let before = Number.POSITIVE_INFINITY;
  let moved = fixedPoint.mismatch(x, f);
  while (!(moved <= SETTLED)) {
    const closing = moved < before;
    if (injection.solves() >= RECKONED && !(closing && settlesWithin(MANY, moved, moved / before))) {
      if (!closing) x.fill(0);
      const { ok, mismatch } = newton(fixedPoint, x, SETTLED);
      injection.read(x);
      return ok ? { ok, iterations: injection.solves() } : { ok, mismatch };
    }
    if (moved < QUICK * before) addScaled(x, 1, f);
    else mixer.advance(x, f, !(moved < WILD * before));
    before = moved;
    moved = fixedPoint.mismatch(x, f);
  }
  const iterations = injection.solves();
  const best = x.slice();
  addScaled(best, 1, f);
  for (let k = 0; k < SHARPENING && moved > SHARP; k++) {
    if (moved < QUICK * before) addScaled(x, 1, f);
    else mixer.advance(x, f, false);
    const next = fixedPoint.mismatch(x, f);
    if (!(next < moved)) break;
    before = moved;
    moved = next;
    best.set(x);
    addScaled(best, 1, f);
  }
  injection.read(best);
  return { ok: true, iterations };
}

/** Whether a mismatch that each round multiplies by `share` comes to rest in some rounds. */
function settlesWithin(rounds: number, mismatch: number, share: number): boolean {
  let left = mismatch;
  for (let k = 0; k < rounds && left > SETTLED; k++) left *= share;
  return left <= SETTLED;
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
