import { z } from 'zod';

/**
 * Field kinds of rows. Nothing that a person typed as a number is turned into a double on its way to the
 * database: a decimal is a string of digits, a quantity is a decimal and its unit (`"120 ft"`, `"0.75 hp"`).
 */

export const TEXT_MAX = 400;
export const NOTE_MAX = 4000;
export const CODE_MAX = 80;

export const DECIMAL = /^-?\d{1,12}(\.\d{1,12})?$/;
export const LENGTH_UNITS_TYPED = ['ft', 'in', 'yd', 'mi', 'm', 'cm', 'km'] as const;
export const POWER_UNITS_TYPED = ['A', 'VA', 'kVA', 'W', 'kW', 'hp'] as const;
const quantity = (units: readonly string[]) =>
  new RegExp(`^-?\\d{1,12}(\\.\\d{1,12})? (${units.join('|')})$`);
export const LENGTH_QUANTITY = quantity(LENGTH_UNITS_TYPED);
export const LOAD_QUANTITY = quantity(POWER_UNITS_TYPED);

/** In lower case, as the database gives it back. */
export const rowId = z.uuid().lowercase('must be in lower case');

/** Whether a database can hold it: no NUL, no half of a surrogate pair. */
export const isStorable = (value: string) => !value.includes('\0') && !/\p{Surrogate}/u.test(value);
export const line = (max: number, min = 0) =>
  z.string().min(min).max(max).refine(isStorable, 'must not contain a character that is no text');
export const code = line(CODE_MAX, 1);
export const text = line(TEXT_MAX).nullable();
export const note = line(NOTE_MAX).nullable();
export const decimal = z.string().regex(DECIMAL, 'must be a decimal number, as 0.85');
export const lengthQuantity = z.string().regex(LENGTH_QUANTITY, 'must be a length with its unit, as 120 ft');
export const loadQuantity = z
  .string()
  .regex(LOAD_QUANTITY, 'must be a load with its unit, as 16 A, 1.5 kW or 0.75 hp');
/** Fractional order key: rows are shown in the order of its bytes. */
export const orderKey = line(64, 1);
