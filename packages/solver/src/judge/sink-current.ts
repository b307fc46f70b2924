import type { LoadModel, Network, Sink } from '../network/index.ts';
import type { Volts } from './volts.ts';

/** How a sink's current depends on its voltage. */
export type SinkRule = 'nominal' | 'local' | 'power';

/** Amperes of one path, cos φ and sin φ of a load in some state. */
export interface Drawn {
  amps: number;
  cos: number;
  sin: number;
}

/** A sink that flows as a current in some demand, with its rule. */
export interface Flow {
  sink: Sink;
  drawn: Drawn;
  rule: SinkRule;
}

export const ampsOf = (load: LoadModel, amps: number): Drawn => ({ amps, cos: load.cos, sin: load.sin });

/**
 * Current phasor from a to b, into `out`: amps·e^{j(θ − φ)} with θ of the nominal EMF (`nominal`) or of the solved
 * voltage (`local`), or conj(S/V) (`power`). Not finite where the voltage is gone.
 */
export function sinkCurrent(
  sink: Sink,
  drawn: Drawn,
  rule: SinkRule,
  network: Network,
  volts: Volts | null,
  out: Float64Array,
): void {
  let re = sink.unitRe;
  let im = sink.unitIm;
  if (rule !== 'nominal' && volts) {
    const { referenceRe, referenceIm } = network.nodes;
    const { a, b } = sink;
    const vRe = referenceRe[a]! - referenceRe[b]! + (volts.re[a]! - volts.re[b]!);
    const vIm = referenceIm[a]! - referenceIm[b]! + (volts.im[a]! - volts.im[b]!);
    const square = vRe * vRe + vIm * vIm;
    const scale = rule === 'power' ? sink.nominal / square : 1 / Math.sqrt(square);
    re = vRe * scale;
    im = vIm * scale;
  }
  const amps = drawn.amps * sink.share;
  out[0] = amps * (re * drawn.cos + im * drawn.sin);
  out[1] = amps * (im * drawn.cos - re * drawn.sin);
}

/**
 * How the current of a flow follows a change w·(a + jb) of its voltage |v|·w: constant power, I = c·w/|v|, changes by
 * c·w·(−a + jb)/|v|², a current at local angle, I = c·w, by c·w·jb/|v|.
 */
export function sinkSlope(
  { sink, drawn, rule }: Flow,
  network: Network,
  volts: Volts,
): (dRe: number, dIm: number, out: Float64Array) => void {
  const { referenceRe, referenceIm } = network.nodes;
  const { a, b, nominal, share } = sink;
  const vRe = referenceRe[a]! - referenceRe[b]! + (volts.re[a]! - volts.re[b]!);
  const vIm = referenceIm[a]! - referenceIm[b]! + (volts.im[a]! - volts.im[b]!);
  const size = Math.sqrt(vRe * vRe + vIm * vIm);
  const wRe = vRe / size;
  const wIm = vIm / size;
  const amps = drawn.amps * share;
  const scale = rule === 'power' ? (amps * nominal) / (size * size) : amps / size;
  // c·w, scaled.
  const cRe = scale * (wRe * drawn.cos + wIm * drawn.sin);
  const cIm = scale * (wIm * drawn.cos - wRe * drawn.sin);
  const along = rule === 'power' ? -1 : 0;
  return (dRe, dIm, out) => {
    const outward = along * (dRe * wRe + dIm * wIm);
    const turning = dIm * wRe - dRe * wIm;
    out[0] = cRe * outward - cIm * turning;
    out[1] = cIm * outward + cRe * turning;
  };
}

/** Admittance of a sink as a constant impedance: conj(S)/V². */
export const sinkAdmittance = (sink: Sink, drawn: Drawn): readonly [number, number] => {
  const size = (drawn.amps * sink.share) / sink.nominal;
  return [size * drawn.cos, -size * drawn.sin];
};
