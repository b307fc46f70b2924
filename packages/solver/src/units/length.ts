import { Decimal } from 'decimal.js';
import type { LengthUnit } from '../job/vocabulary.ts';
import { decimalOf, NUMBER_PATTERN, outOfBounds, plainDecimal, tidy } from './number.ts';
import type { Quantity, QuantityOutcome, UnitSet } from './quantity.ts';
import { made, parseQuantity } from './quantity.ts';

export const TYPED_LENGTH_UNITS = ['ft', 'in', 'yd', 'mi', 'm', 'cm', 'mm', 'km'] as const;
export type TypedLengthUnit = (typeof TYPED_LENGTH_UNITS)[number];

/** Metres in one of each: exact (international foot, 1959: 0.3048 m). */
const METRES: Record<TypedLengthUnit, string> = {
  ft: '0.3048',
  in: '0.0254',
  yd: '0.9144',
  mi: '1609.344',
  m: '1',
  cm: '0.01',
  mm: '0.001',
  km: '1000',
};

const LENGTHS: UnitSet<TypedLengthUnit> = {
  what: 'a length',
  examples: `120 ft, 120' 6" or 36 m`,
  spellings: {
    ft: 'ft',
    feet: 'ft',
    foot: 'ft',
    "'": 'ft',
    in: 'in',
    inch: 'in',
    inches: 'in',
    '"': 'in',
    yd: 'yd',
    yard: 'yd',
    yards: 'yd',
    mi: 'mi',
    mile: 'mi',
    miles: 'mi',
    m: 'm',
    metre: 'm',
    metres: 'm',
    meter: 'm',
    meters: 'm',
    cm: 'cm',
    mm: 'mm',
    km: 'km',
  },
};
const MAX_METRES = 300_000;

const FEET_AND_INCHES = new RegExp(
  `^(\\d+) ?(?:'|ft|feet) ?(${NUMBER_PATTERN}) ?(?:"|''|in|inch|inches)?$`,
  'i',
);

/**
 * Reads a length as typed: `120 ft`, `120'`, `120' 6"`, `36m`, `0.1 mi`, `118`; a bare number takes `defaultUnit`.
 * Feet and inches come back in feet. Zero is a length; negative and beyond 300 km are refused.
 */
export function parseLength(text: string, defaultUnit: LengthUnit): QuantityOutcome<TypedLengthUnit> {
  const both = FEET_AND_INCHES.exec(tidy(text));
  const outcome = both ? feetAndInches(both[1]!, both[2]!) : parseQuantity(text, LENGTHS, defaultUnit);
  if (!outcome.ok) return outcome;
  const metres = new Decimal(outcome.value).times(METRES[outcome.unit]);
  return metres.gt(MAX_METRES) ? { ok: false, message: 'must be ≤ 300 km' } : outcome;
}

const feetAndInches = (feet: string, inches: string): QuantityOutcome<TypedLengthUnit> => {
  const extra = decimalOf(inches);
  const problem = extra ? outOfBounds(extra, { min: 0, max: 12 }, ' in') : 'must be inches after the feet';
  return problem ? { ok: false, message: problem } : made(new Decimal(feet).plus(extra!.div(12)), 'ft');
};

/** A length in another unit, exact until the last step. */
export const lengthIn = ({ value, unit }: Quantity<TypedLengthUnit>, to: TypedLengthUnit): string =>
  unit === to ? value : plainDecimal(new Decimal(value).times(METRES[unit]).div(METRES[to]));

/** Metres as the double nearest to the exact product. */
export const metresOf = ({ value, unit }: Quantity<TypedLengthUnit>): number =>
  new Decimal(value).times(METRES[unit]).toNumber();

/** Metres in one `ft` or `m`. */
export const METRES_PER: Record<LengthUnit, number> = { ft: 0.3048, m: 1 };
