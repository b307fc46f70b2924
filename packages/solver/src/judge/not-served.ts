import { magnitude } from '../job/systems.ts';
import { pathSolver } from '../linear/index.ts';
import type { Refusal, Stamped } from '../network/index.ts';
import type { Core } from './core.ts';
import type { Flow } from './sink-current.ts';
import type { Volts } from './volts.ts';

/** So many loads are looked at: those with the largest product of size and lost volts where the equations stopped. */
const LOOKED_AT = 200;
/** Below this share of the volts the equations hold: what was found was refused for where it lies. */
const BALANCED = 1e-10;

/** A path of a load, with the share of its volts that the load's nominal current drops in the impedance it sees. */
interface Asked {
  flow: Flow;
  drop: number;
  /** Its power over the largest that can reach it alone: V²/(2·(|Z| + R·cos φ + X·sin φ)), the two-bus closed form. */
  ofLargest: number;
}

/**
 * The refusal of a demand that has no solution, by the load that asks for the most by itself: the one whose voltage is
 * lowest may be only its victim. `mismatch`, a share of the largest voltage, is where the equations stopped closing in; `null` where
 * they hold, but no network comes to such voltages.
 * What it says is worked out when it is read: headroom asks for many and reads none.
 */
export function notServed(
  core: Core,
  stamped: Stamped,
  flows: readonly Flow[],
  volts: Volts,
  mismatch: number | null,
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

function say(core: Core, stamped: Stamped, flows: readonly Flow[], volts: Volts, mismatch: number | null) {
  const { flow, ofLargest } = mostAsked(core, stamped, flows, volts);
  const load = core.job.loads[flow.sink.load]!;
  const where = load.bus === null ? `run ${load.along}` : `bus ${load.bus}`;
  const why =
    ofLargest > 1
      ? `even alone it asks for ${times(ofLargest)} the largest power that its conductors can bring it; they are too long or too thin for it, or its size is wrong`
      : `with all that draws beside it, ${together(mismatch)}; the conductors on its way are too long or too thin for all of it, or a size is wrong`;
  return { at: `load ${load.id}`, reason: `the load cannot be served: no solution at ${where}: ${why}` };
}

const together = (mismatch: number | null): string => {
  if (mismatch === null) return 'the equations hold only where voltages point away from their source';
  if (mismatch < BALANCED) return 'the equations hold only where more load would come with more volts';
  return `the voltages come no closer to the equations than ${percent(mismatch)}`;
};
const times = (share: number): string =>
  share < 1.01 ? 'just over' : `${Number(share.toPrecision(3)).toLocaleString('en')} times`;
const percent = (share: number): string => {
  const value = 100 * share;
  return value < 100 ? `${Number(value.toPrecision(2))} %` : '100 %';
};

function mostAsked(core: Core, stamped: Stamped, flows: readonly Flow[], volts: Volts): Asked {
  const { referenceRe, referenceIm } = core.network.nodes;
  const { unknownOf } = stamped.layout;
  const path = pathSolver(stamped.factor);
  const at = (node: number): readonly [number, number] => {
    const unknown = unknownOf[node]!;
    return unknown < 0 ? [0, 0] : [path.re(unknown), path.im(unknown)];
  };
  let most: Asked = { flow: flows[0]!, drop: -1, ofLargest: 0 };
  for (const paths of likeliest(flows, volts)) {
    path.reach(paths.flatMap(({ sink: { a, b } }) => [unknownOf[a]!, unknownOf[b]!]).filter((u) => u >= 0));
    path.clear();
    for (const { sink } of paths)
      for (const [node, sign] of [
        [sink.a, sink.share],
        [sink.b, -sink.share],
      ] as const)
        if (unknownOf[node]! >= 0) path.add(unknownOf[node]!, sign * sink.unitRe, sign * sink.unitIm);
    path.solve();
    for (const flow of paths) {
      const { a, b, unitRe, unitIm, nominal } = flow.sink;
      const [aRe, aIm] = at(a);
      const [bRe, bIm] = at(b);
      const re = (aRe - bRe) * unitRe + (aIm - bIm) * unitIm;
      const im = (aIm - bIm) * unitRe - (aRe - bRe) * unitIm;
      const size = magnitude([re, im]);
      const drop = (Math.abs(flow.drawn.amps) * size) / nominal;
      if (drop <= most.drop) continue;
      const along = Math.sign(flow.drawn.amps) * (re * flow.drawn.cos + im * flow.drawn.sin);
      const open = magnitude([referenceRe[a]! - referenceRe[b]!, referenceIm[a]! - referenceIm[b]!]);
      const power = Math.abs(flow.drawn.amps) * nominal;
      const ofLargest = flow.rule === 'power' ? (2 * power * (size + along)) / (open * open) : 0;
      most = { flow, drop, ofLargest };
    }
  }
  return most;
}

/** Paths of each of some loads. */
function likeliest(flows: readonly Flow[], volts: Volts): Flow[][] {
  const byLoad = new Map<number, { paths: Flow[]; of: number }>();
  for (const flow of flows) {
    const { load, a, b, nominal } = flow.sink;
    const lost = magnitude([volts.re[a]! - volts.re[b]!, volts.im[a]! - volts.im[b]!]);
    const of = (Math.abs(flow.drawn.amps) * lost) / nominal;
    const known = byLoad.get(load);
    if (!known) byLoad.set(load, { paths: [flow], of });
    else {
      known.paths.push(flow);
      known.of = Math.max(known.of, of);
    }
  }
  const list = [...byLoad.values()].sort((a, b) => b.of - a.of);
  return list.slice(0, LOOKED_AT).map(({ paths }) => paths);
}
