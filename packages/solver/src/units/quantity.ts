import { Decimal } from 'decimal.js';
import type { NumberBounds } from './number.ts';
import { decimalOf, NUMBER_PATTERN, outOfBounds, plainDecimal, tidy } from './number.ts';

/** A typed quantity: its exact decimal and its unit as typed; `text` is the form that rows keep, `120 ft`. */
export interface Quantity<U extends string> {
  value: string;
  unit: U;
}
export type QuantityOutcome<U extends string> =
  | ({ ok: true; text: string } & Quantity<U>)
  | { ok: false; message: string };

/** The units of one kind of quantity: every spelling that is understood, lower case. */
export interface UnitSet<U extends string> {
  /** What the field holds, for messages: `a length`. */
  what: string;
  examples: string;
  spellings: Record<string, U>;
}

export const quantityText = (value: string, unit: string): string => `${value} ${unit}`;

export const made = <U extends string>(value: Decimal | string, unit: U): QuantityOutcome<U> => {
  const text = typeof value === 'string' ? value : plainDecimal(value);
  return { ok: true, value: text, unit, text: quantityText(text, unit) };
};

const SPLIT = new RegExp(`^(${NUMBER_PATTERN}) ?(.*)$`);

/**
 * Reads a number and its unit; a number without unit takes `defaultUnit`, or is refused where there is none.
 * Bounds are in the unit as typed. Refused with a message that says what would be right.
 */
export function parseQuantity<U extends string>(
  text: string,
  units: UnitSet<U>,
  defaultUnit: U | null,
  bounds: NumberBounds = { min: 0 },
): QuantityOutcome<U> {
  const typed = tidy(text);
  const wrong = (detail: string): QuantityOutcome<U> => ({
    ok: false,
    message: `must be ${units.what} such as ${units.examples}; ${detail}`,
  });
  if (typed === '') return wrong('is empty');
  const [, number, rest] = SPLIT.exec(typed) ?? [];
  const value = number === undefined ? null : decimalOf(number);
  if (!value) return wrong(`"${text.trim()}" does not start with a number`);
  const spelled = rest!.toLowerCase().replace(/\.$/, '').trim();
  const unit = spelled === '' ? defaultUnit : units.spellings[spelled];
  if (spelled !== '' && !unit) return wrong(`"${rest}" is not a unit known here`);
  if (!unit) return wrong('the unit is missing');
  const problem = outOfBounds(value, bounds, ` ${unit}`);
  return problem ? { ok: false, message: problem } : made(value, unit);
}

/** Reads back the text that rows keep, `120 ft`; `null` where it is not one of `units`. */
export function readQuantity<U extends string>(text: string, units: readonly U[]): Quantity<U> | null {
  const [, value, unit] = /^(-?\d+(?:\.\d+)?) (\S+)$/.exec(text) ?? [];
  return value !== undefined && (units as readonly string[]).includes(unit!)
    ? { value, unit: unit as U }
    : null;
}

/** `value · factor` without rounding on the way, as a double. */
export const timesExactly = (value: string, factor: string): number =>
  new Decimal(value).times(factor).toNumber();
