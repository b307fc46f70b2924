import { beyondFinder } from '../job/beyond.ts';
import { solve } from '../linear/index.ts';
import { type Refusal, refusal, SLOT, stamp } from '../network/index.ts';
import type { Core } from './core.ts';
import { ampsOf, sinkCurrent } from './sink-current.ts';

/** Fixed current sources that diversity gives back, by node, amperes into it. */
export interface Credits {
  re: Float64Array;
  im: Float64Array;
}

/**
 * Credits of every run with demand < 1 (model: diversity grows upstream): with every load beyond as a current sink
 * at its design demand, f·I flows in the run and (1 − f)·I is given back at its far end; runs nearest the loads
 * first. What flows is the sum of what leaves the far node on its far side, windings included.
 * Refused: a run that is not the only way to its far side.
 */
export function diversityCredits(core: Core): Credits | null | Refusal {
  const { job, network, layout } = core;
  const wanted = job.runs.flatMap((run, i) => (run.demand < 1 && network.feeding.runLive[i] ? [i] : []));
  if (wanted.length === 0) return null;
  const beyondOf = beyondFinder(job);
  const { nodes, buses } = network;
  const runs: { index: number; beyond: NonNullable<ReturnType<typeof beyondOf>>; depth: number }[] = [];
  for (const index of wanted) {
    const beyond = beyondOf(index);
    if (!beyond)
      return refusal(
        `run ${job.runs[index]!.id}`,
        'has a demand below 1 and must be the only way to its far side',
      );
    runs.push({ index, beyond, depth: core.pathTo(buses.index.get(beyond.farBus)!)?.length ?? 0 });
  }
  runs.sort((a, b) => b.depth - a.depth || a.index - b.index);

  const stamped = stamp(layout, network.elements, () => [0, 0]);
  if ('kind' in stamped) return stamped;
  const n = layout.nodeOf.length;
  const sinksRe = new Float64Array(nodes.count);
  const sinksIm = new Float64Array(nodes.count);
  const current = new Float64Array(2);
  const creditRe = new Float64Array(nodes.count);
  const creditIm = new Float64Array(nodes.count);
  const volts = { re: new Float64Array(nodes.count), im: new Float64Array(nodes.count) };
  const given: { bus: string; node: number; re: number; im: number }[] = [];
  const work = { re: new Float64Array(n), im: new Float64Array(n) };

  for (const load of core.loads)
    for (const sink of load.sinks) {
      sinkCurrent(sink, ampsOf(load, load.design), 'nominal', network, null, current);
      sinksRe[sink.a]! += current[0]!;
      sinksIm[sink.a]! += current[1]!;
      sinksRe[sink.b]! -= current[0]!;
      sinksIm[sink.b]! -= current[1]!;
    }
  const solveAgain = () => {
    for (let u = 0; u < n; u++) {
      const node = layout.nodeOf[u]!;
      work.re[u] = creditRe[node]! - sinksRe[node]!;
      work.im[u] = creditIm[node]! - sinksIm[node]!;
    }
    solve(stamped.factor, work.re, work.im);
    for (let u = 0; u < n; u++) {
      volts.re[layout.nodeOf[u]!] = work.re[u]!;
      volts.im[layout.nodeOf[u]!] = work.im[u]!;
    }
  };

  for (const { index, beyond } of runs) {
    solveAgain();
    const far = 4 * buses.index.get(beyond.farBus)!;
    const beyondRuns = new Set(beyond.runs);
    const beyondLoads = new Set(beyond.loads);
    for (const c of job.runs[index]!.conductors) {
      const node = nodes.at[far + SLOT[c]]!;
      if (node < 0) continue;
      let re = 0;
      let im = 0;
      // Other credits may sit at this node without lying beyond: runs of no impedance merge it with others.
      for (const credit of given)
        if (credit.node === node && beyond.buses.has(credit.bus)) {
          re -= credit.re;
          im -= credit.im;
        }
      for (const e of network.elements) {
        const isBeyond =
          e.kind === 'run'
            ? beyondRuns.has(e.owner)
            : e.kind === 'winding' && beyond.buses.has(job.transformers[e.owner]!.from);
        if (!isBeyond || !e.nodes.includes(node)) continue;
        let dRe = 0;
        let dIm = 0;
        let weight = 0;
        for (let k = 0; k < e.nodes.length; k++) {
          dRe += e.u[k]! * volts.re[e.nodes[k]!]!;
          dIm += e.u[k]! * volts.im[e.nodes[k]!]!;
          if (e.nodes[k] === node) weight += e.u[k]!;
        }
        re += weight * (e.yRe * dRe - e.yIm * dIm);
        im += weight * (e.yRe * dIm + e.yIm * dRe);
      }
      for (const i of beyondLoads) {
        const load = core.loads[i]!;
        for (const sink of load.sinks) {
          const weight = (sink.a === node ? 1 : 0) - (sink.b === node ? 1 : 0);
          if (weight === 0) continue;
          sinkCurrent(sink, ampsOf(load, load.design), 'nominal', network, null, current);
          re += weight * current[0]!;
          im += weight * current[1]!;
        }
      }
      const share = 1 - job.runs[index]!.demand;
      given.push({ bus: beyond.farBus, node, re: share * re, im: share * im });
      creditRe[node]! += share * re;
      creditIm[node]! += share * im;
    }
  }
  return { re: creditRe, im: creditIm };
}
