import { pathSolver } from '../linear/index.ts';
import type { Refusal, Sink, Stamped } from '../network/index.ts';
import type { Core } from './core.ts';
import type { Flow } from './sink-current.ts';
import type { Volts } from './volts.ts';

/** So many flows are looked at: those with the largest product of size and lost volts where the equations stopped. */
const LOOKED_AT = 200;

/** A flow with the share of its volts that its nominal current drops in the impedance that it sees. */
interface Asked {
  flow: Flow;
  drop: number;
  /** Its power over the largest that can reach it alone: V²/(2·(|Z| + R·cos φ + X·sin φ)), the two-bus closed form. */
  ofLargest: number;
}

/**
 * The refusal of a demand that has no solution, by the load that asks for the most by itself: the one whose voltage is
 * lowest may be only its victim. `mismatch`, a share of the largest voltage, is where the equations stopped closing in.
 * What it says is worked out when it is read: headroom asks for many and reads none.
 */
export function notServed(
  core: Core,
  stamped: Stamped,
  flows: readonly Flow[],
  volts: Volts,
  mismatch: number,
): Refusal {
  let known: { at: string; reason: string } | null = null;
  const said = () => {
    known ??= say(core, stamped, flows, volts, mismatch);
    return known;
  };
  return {
    kind: 'unsolvable',
    get at() {
      return said().at;
    },
    get reason() {
      return said().reason;
    },
  };
}

function say(core: Core, stamped: Stamped, flows: readonly Flow[], volts: Volts, mismatch: number) {
  const { flow, ofLargest } = mostAsked(core, stamped, flows, volts);
  const load = core.job.loads[flow.sink.load]!;
  const where = load.bus === null ? `run ${load.along}` : `bus ${load.bus}`;
  const why =
    ofLargest > 1
      ? `even alone it asks for ${times(ofLargest)} the largest power that its conductors can bring it`
      : `with all that draws beside it, the voltages come no closer to the equations than ${percent(mismatch)}`;
  return {
    at: `load ${load.id}`,
    reason: `the load cannot be served: no solution at ${where}: ${why}; its conductors are too long or too thin for it, or its size is wrong`,
  };
}

const times = (share: number): string =>
  share < 1.01 ? 'just over' : `${Number(share.toPrecision(3)).toLocaleString('en')} times`;
const percent = (share: number): string => {
  const value = 100 * share;
  if (!(value < 100)) return '100 %';
  return value < 1e-4 ? 'a ten-thousandth of a percent' : `${Number(value.toPrecision(2))} %`;
};

function mostAsked(core: Core, stamped: Stamped, flows: readonly Flow[], volts: Volts): Asked {
  const { referenceRe, referenceIm } = core.network.nodes;
  const { unknownOf } = stamped.layout;
  const lost = ({ a, b }: Sink) => Math.hypot(volts.re[a]! - volts.re[b]!, volts.im[a]! - volts.im[b]!);
  const path = pathSolver(stamped.factor);
  const weight = ({ drawn, sink }: Flow) => Math.abs(drawn.amps * sink.share) / sink.nominal;
  let most: Asked = { flow: flows[0]!, drop: -1, ofLargest: 0 };
  const likely = flows.map((flow) => ({ flow, of: weight(flow) * lost(flow.sink) }));
  likely.sort((a, b) => b.of - a.of);
  for (const { flow } of likely.slice(0, LOOKED_AT)) {
    const { a, b } = flow.sink;
    const from = unknownOf[a]!;
    const to = unknownOf[b]!;
    path.reach([from, to].filter((unknown) => unknown >= 0));
    path.clear();
    if (from >= 0) path.add(from, 1, 0);
    if (to >= 0) path.add(to, -1, 0);
    path.solve();
    const re = (from < 0 ? 0 : path.re(from)) - (to < 0 ? 0 : path.re(to));
    const im = (from < 0 ? 0 : path.im(from)) - (to < 0 ? 0 : path.im(to));
    const size = Math.sqrt(re * re + im * im);
    const drop = weight(flow) * size;
    if (drop <= most.drop) continue;
    const along = re * flow.drawn.cos + im * flow.drawn.sin;
    const open = Math.hypot(referenceRe[a]! - referenceRe[b]!, referenceIm[a]! - referenceIm[b]!);
    const power = weight(flow) * flow.sink.nominal ** 2;
    const ofLargest = flow.rule === 'power' ? (2 * power * (size + along)) / open ** 2 : 0;
    most = { flow, drop, ofLargest };
  }
  return most;
}
