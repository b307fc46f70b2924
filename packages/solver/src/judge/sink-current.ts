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

/** Admittance of a sink as a constant impedance: conj(S)/V². */
export const sinkAdmittance = (sink: Sink, drawn: Drawn): readonly [number, number] => {
  const size = (drawn.amps * sink.share) / sink.nominal;
  return [size * drawn.cos, -size * drawn.sin];
};
