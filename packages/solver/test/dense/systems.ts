import type { Conductor, Job, System, Transformer } from '@farlug/solver/job';
import { add, type Complex, complex, div, mul, polar, scale, sub, unit, ZERO } from './complex.ts';

export type Phasors = Partial<Record<Conductor, Complex>>;

/** The table of nominal EMF phasors (model.md 2). */
export const nominalPhasors = (system: System, volts: number): Phasors => {
  const v = volts;
  const star = v / Math.sqrt(3);
  switch (system) {
    case 'dc-2w':
    case '1ph-2w':
      return { L1: complex(v), N: ZERO };
    case '1ph-3w':
      return { L1: complex(v / 2), L2: complex(-v / 2), N: ZERO };
    case '1ph-3w-wye':
      return { L1: complex(star), L2: polar(star, -120), N: ZERO };
    case '3ph-3w':
      return { L1: complex(star), L2: polar(star, -120), L3: polar(star, 120) };
    case '3ph-4w':
      return { L1: complex(star), L2: polar(star, -120), L3: polar(star, 120), N: ZERO };
    case '3ph-4w-delta':
      return { L1: complex(v / 2), L3: complex(-v / 2), L2: complex(0, (-Math.sqrt(3) / 2) * v), N: ZERO };
  }
};

/** Where a winding end lands: a conductor of the bus, a star point of its own, or earth. */
export type Terminal = Conductor | 'star' | 'earth';

/** One pair of coupled windings: `a` the voltage ratio, `z` the leakage ohms seen from the secondary. */
export interface WindingPair {
  primary: readonly [plus: Terminal, minus: Terminal];
  secondary: readonly [plus: Terminal, minus: Terminal];
  a: number;
  z: Complex;
}

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
  const tap = 1 + t.tapPercent / 100;
  const leakage = (windingVolts: number, windingVa: number): Complex => {
    const size = ((t.percentZ / 100) * windingVolts * windingVolts) / windingVa;
    const r = size / Math.sqrt(1 + t.xOverR * t.xOverR);
    return basis === 'resistance' ? complex(r) : complex(r, r * t.xOverR);
  };
  const pairOf = (primary: Ends, secondary: Ends, vp: number, vs: number, va: number): WindingPair => ({
    primary,
    secondary,
    a: vp / (vs * tap),
    z: leakage(vs, va),
  });
  const va = t.kva * 1000;
  if (t.connection === 'single-phase') {
    const primary = t.primary.split('-') as [Conductor, Conductor];
    if (t.system === '1ph-2w') return [pairOf(primary, ['L1', 'N'], t.primaryVolts, t.secondaryVolts, va)];
    const half = t.secondaryVolts / 2;
    return [
      pairOf(primary, ['L1', 'N'], t.primaryVolts, half, va / 2),
      pairOf(primary, ['N', 'L2'], t.primaryVolts, half, va / 2),
    ];
  }
  const lags = t.primaryVolts >= t.secondaryVolts;
  const root = Math.sqrt(3);
  const secondaryStar: Terminal = t.system === '3ph-4w' ? 'N' : 'earth';
  let primaries: Ends[];
  let secondaries: Ends[];
  let vp = t.primaryVolts;
  let vs = t.secondaryVolts;
  switch (t.connection) {
    case 'delta-wye':
      primaries = lags ? COUNTER : CYCLE;
      secondaries = star(secondaryStar);
      vs /= root;
      break;
    case 'wye-delta':
      primaries = star('star');
      secondaries = lags ? CYCLE : COUNTER;
      vp /= root;
      break;
    case 'wye-wye':
      primaries = star('N');
      secondaries = star('N');
      vp /= root;
      vs /= root;
      break;
    case 'delta-delta':
      primaries = CYCLE;
      secondaries = CYCLE;
      break;
  }
  return primaries.flatMap((primary, k) => {
    const [plus, minus] = secondaries[k]!;
    const splits = t.system === '3ph-4w-delta' && plus !== 'L2' && minus !== 'L2';
    if (!splits) return [pairOf(primary, [plus, minus], vp, vs, va / 3)];
    return [
      pairOf(primary, [plus, 'N'], vp, vs / 2, va / 6),
      pairOf(primary, ['N', minus], vp, vs / 2, va / 6),
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
      1 / 3,
    );
  return phasors[terminal]!;
};
