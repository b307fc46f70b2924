import { magnitude } from '../job/systems.ts';
import type { Core } from '../judge/core.ts';
import type { Demand } from '../judge/demand.ts';
import { admittanceIn } from '../judge/solve-state.ts';
import { solve } from '../linear/index.ts';
import { element, type Refusal, stamp } from '../network/index.ts';

/** A leak to earth that no load is as small as (a milliampere at 120 V is 8 µS), and no rounding as large. */
const LEAK_OHM = 1e9;
/** Share of the leak's voltage beyond which a node goes where the leak goes. */
const FOLLOWS = 1e-6;

/** Which voltages nothing but a leak holds, and the network with that leak, whose other voltages are right. */
export interface Floating {
  core: Core;
  /** Whether the volts between two nodes are held by nothing. */
  between: (a: number, b: number) => boolean;
  at: (node: number) => boolean;
}

/**
 * Tells whether anything ties a node to a source, loads included, by the driving-point impedance against a leak of
 * 1 GΩ: a node that is tied has far less. `null` where it is tied. Refused: a network that is singular elsewhere.
 */
export function floatingFrom(core: Core, node: number, demand: Demand): Floating | null | Refusal {
  const { network, layout } = core;
  if (layout.unknownOf[node]! < 0) return null;
  const leak = element('centroid', -1, -1, [node], [1], LEAK_OHM, 0);
  const elements = [...network.elements, leak];
  const stamped = stamp(layout, elements, admittanceIn(core, demand));
  if ('kind' in stamped) return stamped;
  const re = new Float64Array(layout.nodeOf.length);
  const im = new Float64Array(layout.nodeOf.length);
  re[layout.unknownOf[node]!] = 1 / LEAK_OHM;
  solve(stamped.factor, re, im);
  const share = (k: number): readonly [number, number] => {
    const unknown = layout.unknownOf[k]!;
    return unknown < 0 ? [0, 0] : [re[unknown]!, im[unknown]!];
  };
  if (magnitude(share(node)) < 0.5) return null;
  return {
    core: { ...core, network: { ...network, elements } },
    at: (k) => magnitude(share(k)) > FOLLOWS,
    between: (a, b) => {
      const [one, other] = [share(a), share(b)];
      return magnitude([one[0] - other[0], one[1] - other[1]]) > FOLLOWS;
    },
  };
}
