import { type Job, parseJob } from '../../src/job/index.ts';
import { buildCore } from '../../src/judge/core.ts';
import { diversityCredits } from '../../src/judge/credits.ts';
import { designDemand } from '../../src/judge/demand.ts';
import { solveDemand } from '../../src/judge/operating.ts';
import { sinkCurrent } from '../../src/judge/sink-current.ts';
import { admittanceIn, flowsOf } from '../../src/judge/solve-state.ts';

/** A complex number: real and imaginary part. */
export type Pair = readonly [re: number, im: number];

/**
 * A job at design demand as a plain circuit, and the volts that the product finds in it. Nothing of the product's
 * equations is in it: an element carries i = (Σ u·V − emf) ÷ z and draws u·i from each of its nodes.
 */
export interface Circuit {
  /** Hz; reactances are z's imaginary parts there. 0 is direct current. */
  frequency: number;
  fixed: { node: number; volts: Pair }[];
  elements: { nodes: number[]; u: number[]; z: Pair; emf: Pair }[];
  /** Currents from a to b; −1 is earth. Loads that follow the volts draw what they draw at the product's solution. */
  sinks: { a: number; b: number; amps: Pair }[];
  volts: Pair[];
}

/** `null` where the product refuses the job. */
export function circuitOf(file: unknown): Circuit | null {
  const parsed = parseJob(file);
  return parsed.ok ? solved(parsed.job) : null;
}

function solved(job: Job): Circuit | null {
  const core = buildCore(job);
  if ('kind' in core) return null;
  const credits = diversityCredits(core);
  if (credits && 'kind' in credits) return null;
  const demand = designDemand(core);
  const state = solveDemand(core, demand, credits);
  if ('kind' in state) return null;
  const { nodes } = core.network;
  const volts = Array.from(
    { length: nodes.count },
    (_, n): Pair => [nodes.referenceRe[n]! + state.volts.re[n]!, nodes.referenceIm[n]! + state.volts.im[n]!],
  );
  const elements: Circuit['elements'] = state.stamped.elements.map((e) => ({
    nodes: [...e.nodes],
    u: [...e.u],
    z: [e.zRe, e.zIm],
    emf: [e.emfRe, e.emfIm],
  }));
  const admittance = admittanceIn(core, demand);
  for (const sink of core.layout.impedanceSinks) {
    const [re, im] = admittance(sink);
    const square = re * re + im * im;
    if (square > 0)
      elements.push({ nodes: [sink.a, sink.b], u: [1, -1], z: [re / square, -im / square], emf: [0, 0] });
  }
  const amps = new Float64Array(2);
  const sinks: Circuit['sinks'] = flowsOf(core, demand).map(({ sink, drawn, rule }) => {
    sinkCurrent(sink, drawn, rule, core.network, state.volts, amps);
    return { a: sink.a, b: sink.b, amps: [amps[0]!, amps[1]!] };
  });
  if (credits)
    for (let n = 0; n < nodes.count; n++)
      if (credits.re[n] !== 0 || credits.im[n] !== 0)
        sinks.push({ a: -1, b: n, amps: [credits.re[n]!, credits.im[n]!] });
  const fixed = volts.flatMap((at, node) => (nodes.fixed[node] ? [{ node, volts: at }] : []));
  return { frequency: job.frequency, fixed, elements, sinks, volts };
}

/** Largest difference of two sets of volts against the largest volt. */
export function apart(ours: readonly Pair[], theirs: readonly Pair[]): number {
  let most = 0;
  let largest = 0;
  for (const [n, [re, im]] of ours.entries()) {
    const other = theirs[n] ?? [Number.NaN, Number.NaN];
    const difference = Math.hypot(re - other[0], im - other[1]);
    if (!(difference <= most)) most = difference;
    largest = Math.max(largest, Math.hypot(re, im));
  }
  return largest === 0 ? most : most / largest;
}
