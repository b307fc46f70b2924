import type { Conductor, Job, System, Transformer } from '@farlug/solver/job';
import { add, type Complex, complex, conj, div, mul, scale, sub, THIRD, unit, ZERO } from './complex.ts';
import { D, type Decimal, NIL, ROOT3, UNITY } from './decimal.ts';

export type Phasors = Partial<Record<Conductor, Complex>>;

/** The table of nominal EMF phasors (model.md 2). */
export const nominalPhasors = (system: System, volts: number): Phasors => {
  const v = D(volts);
  const half = complex(v.div(2));
  const otherHalf = complex(v.div(-2));
  const star = complex(v.div(ROOT3));
  const behind = mul(star, conj(THIRD));
  const ahead = mul(star, THIRD);
  switch (system) {
    case 'dc-2w':
    case '1ph-2w':
      return { L1: complex(v), N: ZERO };
    case '1ph-3w':
      return { L1: half, L2: otherHalf, N: ZERO };
    case '1ph-3w-wye':
      return { L1: star, L2: behind, N: ZERO };
    case '3ph-3w':
      return { L1: star, L2: behind, L3: ahead };
    case '3ph-4w':
      return { L1: star, L2: behind, L3: ahead, N: ZERO };
    case '3ph-4w-delta':
      return { L1: half, L3: otherHalf, L2: complex(NIL, v.times(ROOT3).div(-2)), N: ZERO };
  }
};

/** Where a winding end lands: a conductor of the bus, a star point of its own, or earth. */
export type Terminal = Conductor | 'star' | 'earth';

/** One pair of coupled windings: `a` the voltage ratio, `z` the leakage ohms seen from the secondary. */
export interface WindingPair {
  primary: readonly [plus: Terminal, minus: Terminal];
  secondary: readonly [plus: Terminal, minus: Terminal];
  a: Decimal;
  z: Complex;
}

/** Ohms of a given size with a given X/R; all of their resistive part alone on the resistance basis. */
export const splitOhms = (size: Decimal, xOverR: number, resistive: boolean): Complex => {
  const r = size.div(D(xOverR).pow(2).plus(1).sqrt());
  return complex(r, resistive ? NIL : r.times(xOverR));
};

type Ends = readonly [Terminal, Terminal];
const CYCLE: Ends[] = [
  ['L1', 'L2'],
  ['L2', 'L3'],
  ['L3', 'L1'],
];
const COUNTER: Ends[] = [
  ['L1', 'L3'],
  ['L2', 'L1'],
  ['L3', 'L2'],
];
const LINES: Conductor[] = ['L1', 'L2', 'L3'];
const star = (point: Terminal): Ends[] => LINES.map((line) => [line, point] as const);

/** The winding pairs of a transformer (model.md 8). */
export const windingPairs = (t: Transformer, basis: Job['basis']): WindingPair[] => {
  const tap = D(t.tapPercent).div(100).plus(1);
  const leakage = (windingVolts: Decimal, windingVa: Decimal): Complex => {
    const size = windingVolts.times(windingVolts).times(t.percentZ).div(100).div(windingVa);
    return splitOhms(size, t.xOverR, basis === 'resistance');
  };
  const pairOf = (primary: Ends, secondary: Ends, vp: Decimal, vs: Decimal, va: Decimal): WindingPair => ({
    primary,
    secondary,
    a: vp.div(vs.times(tap)),
    z: leakage(vs, va),
  });
  const va = D(t.kva).times(1000);
  let vp = D(t.primaryVolts);
  let vs = D(t.secondaryVolts);
  if (t.connection === 'single-phase') {
    const primary = t.primary.split('-') as [Conductor, Conductor];
    if (t.system === '1ph-2w') return [pairOf(primary, ['L1', 'N'], vp, vs, va)];
    return [
      pairOf(primary, ['L1', 'N'], vp, vs.div(2), va.div(2)),
      pairOf(primary, ['N', 'L2'], vp, vs.div(2), va.div(2)),
    ];
  }
  const lags = t.primaryVolts >= t.secondaryVolts;
  const secondaryStar: Terminal = t.system === '3ph-4w' ? 'N' : 'earth';
  let primaries: Ends[];
  let secondaries: Ends[];
  switch (t.connection) {
    case 'delta-wye':
      primaries = lags ? COUNTER : CYCLE;
      secondaries = star(secondaryStar);
      vs = vs.div(ROOT3);
      break;
    case 'wye-delta':
      primaries = star('star');
      secondaries = lags ? CYCLE : COUNTER;
      vp = vp.div(ROOT3);
      break;
    case 'wye-wye':
      primaries = star('N');
      secondaries = star('N');
      vp = vp.div(ROOT3);
      vs = vs.div(ROOT3);
      break;
    case 'delta-delta':
      primaries = CYCLE;
      secondaries = CYCLE;
      break;
  }
  return primaries.flatMap((primary, k) => {
    const [plus, minus] = secondaries[k]!;
    const splits = t.system === '3ph-4w-delta' && plus !== 'L2' && minus !== 'L2';
    if (!splits) return [pairOf(primary, [plus, minus], vp, vs, va.div(3))];
    return [
      pairOf(primary, [plus, 'N'], vp, vs.div(2), va.div(6)),
      pairOf(primary, ['N', minus], vp, vs.div(2), va.div(6)),
    ];
  });
};

/** Nominal EMFs of the secondary: its own volts, turned so that its windings face those of the primary. */
export const secondaryPhasors = (t: Transformer, primary: Phasors): Phasors => {
  const first = windingPairs(t, 'impedance')[0]!;
  const own = nominalPhasors(t.system, t.secondaryVolts);
  const turn = div(unit(across(primary, first.primary)), unit(across(own, first.secondary)));
  const turned: Phasors = {};
  for (const [conductor, v] of Object.entries(own)) turned[conductor as Conductor] = mul(v, turn);
  return turned;
};

const across = (phasors: Phasors, [plus, minus]: Ends): Complex => sub(at(phasors, plus), at(phasors, minus));

const at = (phasors: Phasors, terminal: Terminal): Complex => {
  if (terminal === 'earth') return ZERO;
  if (terminal === 'star')
    return scale(
      LINES.reduce((sum, line) => add(sum, phasors[line]!), ZERO),
      UNITY.div(3),
    );
  return phasors[terminal]!;
};
