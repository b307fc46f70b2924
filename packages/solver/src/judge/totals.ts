import type { Totals } from '../job/index.ts';
import { residual } from '../linear/index.ts';
import type { Core } from './core.ts';
import type { Credits } from './credits.ts';
import { ampsOf, sinkAdmittance, sinkCurrent } from './sink-current.ts';
import { flowsOf, type State } from './solve-state.ts';

/** Below this nothing flows but rounding, amperes. */
const NO_CURRENT_AMPS = 1e-12;

/**
 * Power of the whole network in watts: what the sources' EMFs deliver, what the loads take (less what diversity
 * gives back), what runs, transformers and source impedances lose; and the largest current that Kirchhoff's law is
 * out by at any node, relative to the largest current.
 */
export function totalsOf(core: Core, state: State, credits: Credits | null): Totals {
  const { nodes } = core.network;
  const { stamped, volts, demand } = state;
  const { layout } = stamped;
  const n = layout.nodeOf.length;
  const vRe = (node: number) => nodes.referenceRe[node]! + volts.re[node]!;
  const vIm = (node: number) => nodes.referenceIm[node]! + volts.im[node]!;
  const intoRe = new Float64Array(nodes.count);
  const intoIm = new Float64Array(nodes.count);
  let lossWatts = 0;
  let sourceWatts = 0;
  let largest = 0;
  for (const e of stamped.elements) {
    let dRe = -e.emfRe;
    let dIm = -e.emfIm;
    let referenceRe = 0;
    let referenceIm = 0;
    for (let k = 0; k < e.nodes.length; k++) {
      referenceRe += e.u[k]! * nodes.referenceRe[e.nodes[k]!]!;
      referenceIm += e.u[k]! * nodes.referenceIm[e.nodes[k]!]!;
    }
    dRe += referenceRe;
    dIm += referenceIm;
    for (let k = 0; k < e.nodes.length; k++) {
      dRe += e.u[k]! * volts.re[e.nodes[k]!]!;
      dIm += e.u[k]! * volts.im[e.nodes[k]!]!;
    }
    const iRe = e.yRe * dRe - e.yIm * dIm;
    const iIm = e.yRe * dIm + e.yIm * dRe;
    const square = iRe * iRe + iIm * iIm;
    if (e.kind === 'centroid') continue;
    lossWatts += square * e.zRe;
    largest = Math.max(largest, Math.sqrt(square));
    if (e.kind === 'source') sourceWatts -= e.emfRe * iRe + e.emfIm * iIm;
    for (let k = 0; k < e.nodes.length; k++) {
      intoRe[e.nodes[k]!]! += e.u[k]! * iRe;
      intoIm[e.nodes[k]!]! += e.u[k]! * iIm;
    }
  }

  let loadWatts = 0;
  const out = new Float64Array(2);
  const take = (sink: { a: number; b: number }, iRe: number, iIm: number, xRe: number, xIm: number) => {
    loadWatts += xRe * iRe + xIm * iIm;
    largest = Math.max(largest, Math.sqrt(iRe * iRe + iIm * iIm));
    intoRe[sink.a]! += iRe;
    intoIm[sink.a]! += iIm;
    intoRe[sink.b]! -= iRe;
    intoIm[sink.b]! -= iIm;
  };
  const rightRe = stamped.baseRe.slice();
  const rightIm = stamped.baseIm.slice();
  for (const { sink, drawn, rule } of flowsOf(core, demand)) {
    sinkCurrent(sink, drawn, rule, core.network, volts, out);
    take(sink, out[0]!, out[1]!, vRe(sink.a) - vRe(sink.b), vIm(sink.a) - vIm(sink.b));
    const a = layout.unknownOf[sink.a]!;
    const b = layout.unknownOf[sink.b]!;
    if (a >= 0) {
      rightRe[a]! -= out[0]!;
      rightIm[a]! -= out[1]!;
    }
    if (b >= 0) {
      rightRe[b]! += out[0]!;
      rightIm[b]! += out[1]!;
    }
  }
  for (const sink of layout.impedanceSinks) {
    if (sink.load === demand.starting) continue;
    const [re, im] = sinkAdmittance(sink, ampsOf(core.loads[sink.load]!, demand.amps[sink.load]!));
    const xRe = vRe(sink.a) - vRe(sink.b);
    const xIm = vIm(sink.a) - vIm(sink.b);
    take(sink, re * xRe - im * xIm, re * xIm + im * xRe, xRe, xIm);
  }
  if (demand.credits && credits)
    for (let node = 0; node < nodes.count; node++) {
      const re = credits.re[node]!;
      const im = credits.im[node]!;
      loadWatts -= vRe(node) * re + vIm(node) * im;
      intoRe[node]! -= re;
      intoIm[node]! -= im;
      const u = layout.unknownOf[node]!;
      if (u < 0) continue;
      rightRe[u]! += re;
      rightIm[u]! += im;
    }
  for (let node = 0; node < nodes.count; node++)
    if (nodes.fixed[node])
      sourceWatts += nodes.referenceRe[node]! * intoRe[node]! + nodes.referenceIm[node]! * intoIm[node]!;

  const xRe = new Float64Array(n);
  const xIm = new Float64Array(n);
  for (let u = 0; u < n; u++) {
    xRe[u] = volts.re[layout.nodeOf[u]!]!;
    xIm[u] = volts.im[layout.nodeOf[u]!]!;
  }
  residual(stamped.factor, xRe, xIm, rightRe, rightIm, rightRe, rightIm);
  let worst = 0;
  for (let u = 0; u < n; u++)
    worst = Math.max(worst, Math.sqrt(rightRe[u]! * rightRe[u]! + rightIm[u]! * rightIm[u]!));
  return {
    sourceWatts,
    loadWatts,
    lossWatts,
    kclResidual: worst / Math.max(largest, NO_CURRENT_AMPS),
    iterations: state.iterations,
  };
}
