import { formatNumber } from '../units/format.ts';

/**
 * Textbook voltage drop, each as a formula, the same with its numbers filled in, and its result in volts. The
 * numbers are rounded before they are used, so that a pencil arrives at the same result from what is printed.
 */
export interface HandLine {
  formula: string;
  filled: string;
  volts: number;
}

export interface HandCurrent {
  amps: number;
  powerFactor: number;
  leading: boolean;
}
/** Ohm per unit length of one conductor, the units that `length` is counted in, and parallel sets. */
export interface HandConductor {
  r: number;
  x: number;
  /** Of the return conductor of a two-wire circuit, where it differs. */
  returns: { r: number; x: number } | null;
  length: number;
  sets: number;
}

const significant = (value: number, digits: number): number => Number(value.toPrecision(digits));
const show = (value: number): string => formatNumber(value, 6).replace(/,/g, '');

/** cosφ and sinφ to three decimals. */
export function handAngle({ powerFactor, leading }: HandCurrent): { cos: number; sin: number; sign: 1 | -1 } {
  const cos = Number(powerFactor.toFixed(3));
  const sin = Number(Math.sqrt(Math.max(0, 1 - powerFactor * powerFactor)).toFixed(3));
  return { cos, sin, sign: leading ? -1 : 1 };
}

const overSets = (sets: number) =>
  sets > 1 ? { formula: '/n', filled: ` / ${sets}` } : { formula: '', filled: '' };

/**
 * Two-wire, line to line or line to neutral: 2·I·(R cosφ + X sinφ)·L (NEC Chapter 9 Table 9 note 2; IEEE Std 141
 * 3.11); three-phase, between lines: √3·I·(R cosφ + X sinφ)·L. `X` drops out at unity power factor and where it is 0.
 */
export function impedanceForm(kind: 'two-wire' | 'three-phase', i: HandCurrent, z: HandConductor): HandLine {
  const amps = significant(i.amps, 4);
  const { cos, sin, sign } = handAngle(i);
  const [r, x] = [significant(z.r, 4), significant(z.x, 4)];
  const length = significant(z.length, 6);
  const sets = overSets(z.sets);
  const back = kind === 'two-wire' ? z.returns : null;
  const [front, factor] = kind === 'three-phase' ? ['1.732', 1.732] : ['2', 2];
  const lead = kind === 'three-phase' ? '√3' : '2';
  const [rBack, xBack] = back ? [significant(back.r, 4), significant(back.x, 4)] : [0, 0];
  const rText = back ? `(${show(r)} + ${show(rBack)})` : show(r);
  const xText = back ? `(${show(x)} + ${show(xBack)})` : show(x);
  const [rSum, xSum] = back ? [r + rBack, x + xBack] : [r * factor, x * factor];
  const head = back ? show(amps) : `${front} · ${show(amps)}`;
  const headFormula = back ? 'I' : `${lead}·I`;
  const rFormula = back ? '(R + Rn)' : 'R';
  if (sin === 0 || (x === 0 && xBack === 0)) {
    const cosText = cos === 1 ? '' : '·cosφ';
    const cosFilled = cos === 1 ? '' : ` · ${show(cos)}`;
    return {
      formula: `${headFormula}·${rFormula}${cosText}·L${sets.formula}`,
      filled: `${head} · ${rText}${cosFilled} · ${show(length)}${sets.filled}`,
      volts: (amps * rSum * cos * length) / z.sets,
    };
  }
  const operator = sign < 0 ? '−' : '+';
  return {
    formula: `${headFormula}·(${rFormula} cosφ ${operator} ${back ? '(X + Xn)' : 'X'} sinφ)·L${sets.formula}`,
    filled: `${head} · (${rText}·${show(cos)} ${operator} ${xText}·${show(sin)}) · ${show(length)}${sets.filled}`,
    volts: (amps * (rSum * cos + sign * xSum * sin) * length) / z.sets,
  };
}

/** Ohm·cmil per foot at 75 °C, 12.9 copper and 21.2 aluminum (common practice, from NEC Chapter 9 Table 8). */
export const K_OHM_CMIL_PER_FT = { copper: 12.9, aluminum: 21.2 } as const;

/** By circular mils, without power factor: 2·K·I·D/cmil and √3·K·I·D/cmil, D in feet. */
export function circularMilForm(
  kind: 'two-wire' | 'three-phase',
  amps: number,
  material: 'copper' | 'aluminum',
  lengthFt: number,
  cmil: number,
  sets: number,
): HandLine {
  const i = significant(amps, 4);
  const feet = significant(lengthFt, 6);
  const k = K_OHM_CMIL_PER_FT[material];
  const [formula, front, factor] = kind === 'three-phase' ? ['√3', '1.732', 1.732] : (['2', '2', 2] as const);
  const mils = sets > 1 ? `(${sets}·${show(cmil)})` : show(cmil);
  return {
    formula: `${formula}·K·I·D/${sets > 1 ? '(n·cmil)' : 'cmil'}`,
    filled: `${front} · ${k} · ${show(i)} · ${show(feet)} / ${mils}`,
    volts: (factor * k * i * feet) / (cmil * sets),
  };
}

/** IEC 60364-5-52 Annex G: ρ1 in Ω·mm²/m at service temperature, λ in Ω/m. */
export const RHO_1 = { copper: 0.0225, aluminum: 0.036 } as const;
export const LAMBDA = 0.00008;

/**
 * IEC 60364-5-52 Annex G: b·(ρ1·L/S·cosφ + λ·L·sinφ)·I, L in metres, S in mm²; b = 2 for two conductors, 1 for
 * three-phase, where the result is line to neutral.
 */
export function iecForm(
  kind: 'two-wire' | 'three-phase',
  i: HandCurrent,
  material: 'copper' | 'aluminum',
  lengthM: number,
  areaMm2: number,
  sets: number,
  reactive: boolean,
): HandLine {
  const amps = significant(i.amps, 4);
  const metres = significant(lengthM, 6);
  const { cos, sin, sign } = handAngle(i);
  const b = kind === 'two-wire' ? 2 : 1;
  const rho = RHO_1[material];
  const by = overSets(sets);
  const operator = sign < 0 ? '−' : '+';
  const withX = reactive && sin > 0;
  const tail = withX ? ` ${operator} λ·L·sinφ` : '';
  const tailFilled = withX ? ` ${operator} ${LAMBDA}·${show(metres)}·${show(sin)}` : '';
  const inner = (rho * metres * cos) / areaMm2 + (withX ? sign * LAMBDA * metres * sin : 0);
  return {
    formula: `b·(ρ1·L/S·cosφ${tail})·I${by.formula}`,
    filled: `${b} · (${rho}·${show(metres)}/${show(areaMm2)}·${show(cos)}${tailFilled}) · ${show(amps)}${by.filled}`,
    volts: (b * inner * amps) / sets,
  };
}
