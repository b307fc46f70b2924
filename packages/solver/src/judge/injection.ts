import { solve } from '../linear/index.ts';
import type { Network, Sink, Stamped } from '../network/index.ts';
import type { FixedPoint } from './newton.ts';
import { type Flow, sinkCurrent, sinkSlope } from './sink-current.ts';
import type { Volts } from './volts.ts';

/** Current injection: the volts that follow from the currents that loads draw at given volts, on one factor. */
export interface Injection {
  /** By node; every round moves them, from where they were given. */
  volts: Volts;
  /** Puts volts in place of themselves as they follow from the currents drawn at them. */
  round: () => void;
  /** The same rounds as a fixed point of volts by unknown, real parts before imaginary ones. */
  fixedPoint: FixedPoint;
  read: (x: Float64Array) => void;
  write: (x: Float64Array) => void;
  solves: () => number;
}

/** `fixed`: the right side of all that flows at any volts, by unknown. */
export function injectionOf(
  network: Network,
  { layout, factor }: Stamped,
  following: readonly Flow[],
  fixed: Volts,
  volts: Volts,
): Injection {
  const { nodeOf, unknownOf } = layout;
  const { referenceRe, referenceIm } = network.nodes;
  const n = nodeOf.length;
  const re = new Float64Array(n);
  const im = new Float64Array(n);
  const current = new Float64Array(2);
  let solves = 0;

  const takeCurrent = ({ a, b }: Sink): void => {
    const from = unknownOf[a]!;
    const to = unknownOf[b]!;
    if (from >= 0) {
      re[from]! -= current[0]!;
      im[from]! -= current[1]!;
    }
    if (to >= 0) {
      re[to]! += current[0]!;
      im[to]! += current[1]!;
    }
  };
  /** What follows from the currents at `volts`, into `re` and `im`. */
  const follow = (): void => {
    re.set(fixed.re);
    im.set(fixed.im);
    for (const { sink, drawn, rule } of following) {
      sinkCurrent(sink, drawn, rule, network, volts, current);
      takeCurrent(sink);
    }
    solve(factor, re, im);
    solves++;
  };
  const read = (x: Float64Array): void => {
    for (let u = 0; u < n; u++) {
      volts.re[nodeOf[u]!] = x[u]!;
      volts.im[nodeOf[u]!] = x[n + u]!;
    }
  };
  let slopes: ReturnType<typeof sinkSlope>[] = [];
  /** Part of a vector by unknown between the nodes of a sink; a fixed node does not move. */
  const across = (x: Float64Array, { a, b }: Sink, offset: number): number => {
    const from = unknownOf[a]!;
    const to = unknownOf[b]!;
    return (from < 0 ? 0 : x[offset + from]!) - (to < 0 ? 0 : x[offset + to]!);
  };

  return {
    volts,
    round: () => {
      follow();
      for (let u = 0; u < n; u++) {
        volts.re[nodeOf[u]!] = re[u]!;
        volts.im[nodeOf[u]!] = im[u]!;
      }
    },
    fixedPoint: {
      mismatch: (x, out) => {
        read(x);
        follow();
        let largest = 0;
        let moved = 0;
        for (let u = 0; u < n; u++) {
          const node = nodeOf[u]!;
          const dRe = re[u]! - x[u]!;
          const dIm = im[u]! - x[n + u]!;
          const vRe = referenceRe[node]! + re[u]!;
          const vIm = referenceIm[node]! + im[u]!;
          const change = dRe * dRe + dIm * dIm;
          const square = vRe * vRe + vIm * vIm;
          if (!(change <= moved)) moved = change;
          if (!(square <= largest)) largest = square;
          out[u] = dRe;
          out[n + u] = dIm;
        }
        return n === 0 ? 0 : Math.sqrt(moved) / Math.sqrt(largest);
      },
      linearise: (x) => {
        read(x);
        slopes = following.map((flow) => sinkSlope(flow, network, volts));
      },
      slope: (d, out) => {
        re.fill(0);
        im.fill(0);
        for (const [k, { sink }] of following.entries()) {
          slopes[k]!(across(d, sink, 0), across(d, sink, n), current);
          takeCurrent(sink);
        }
        solve(factor, re, im);
        solves++;
        out.set(re);
        out.set(im, n);
      },
    },
    read,
    write: (x) => {
      for (let u = 0; u < n; u++) {
        x[u] = volts.re[nodeOf[u]!]!;
        x[n + u] = volts.im[nodeOf[u]!]!;
      }
    },
    solves: () => solves,
  };
}
