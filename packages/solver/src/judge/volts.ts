import type { Network } from '../network/index.ts';

/** Difference of every node's volts to its reference (`Nodes.referenceRe`), by node; fixed nodes have 0. */
export interface Volts {
  re: Float64Array;
  im: Float64Array;
}

export const zeroVolts = (network: Network): Volts => ({
  re: new Float64Array(network.nodes.count),
  im: new Float64Array(network.nodes.count),
});
