import { Decimal } from 'decimal.js';

/** A typed number as its exact decimal, written plainly: `1500`, `0.75`, `-2`. */
export type NumberOutcome = { ok: true; value: string } | { ok: false; message: string };

export interface NumberBounds {
  min?: number;
  max?: number;
  /** Also refuse `min` itself. */
  above?: boolean;
}

/** Digits kept of a fraction that has no finite decimal, such as 1/3. */
const FRACTION_DIGITS = 12;
const VULGAR: Record<string, string> = {
  '½': '1/2',
  '⅓': '1/3',
  '⅔': '2/3',
  '¼': '1/4',
  '¾': '3/4',
  '⅕': '1/5',
  '⅙': '1/6',
  '⅛': '1/8',
  '⅜': '3/8',
  '⅝': '5/8',
  '⅞': '7/8',
};

/** Spaces, minus signs and fractions in the one form that the readers below expect. */
export const tidy = (text: string): string =>
  text
    .replace(/[½⅓⅔¼¾⅕⅙⅛⅜⅝⅞]/g, (glyph) => ` ${VULGAR[glyph]}`)
    .normalize('NFKC')
    .replace(/[−–—]/g, '-')
    .replace(/[’′ʹ]/g, "'")
    .replace(/[”″“]/g, '"')
    .replace(/⁄/g, '/')
    .replace(/\s+/g, ' ')
    .trim();

/** What a number may look like at the start of a typed quantity; `valueOf` reads the match. */
export const NUMBER_PATTERN =
  '[+-]?(?:\\d+ \\d+ ?/ ?\\d+|\\d+ ?/ ?\\d+|\\d{1,3}(?:[, ]\\d{3})+(?:\\.\\d+)?|\\d+(?:[.,]\\d+)?|\\.\\d+)';

const plain = (value: Decimal): string =>
  value.toDecimalPlaces(FRACTION_DIGITS, Decimal.ROUND_HALF_EVEN).toFixed();

const fraction = (top: string, bottom: string): Decimal | null =>
  Number(bottom) === 0 ? null : new Decimal(top).div(bottom);

/** Reads what `NUMBER_PATTERN` matched; `null` for a division by zero. `1,500` is 1500, `1,5` is 1.5. */
export function decimalOf(matched: string): Decimal | null {
  const negative = matched.startsWith('-');
  const text = matched.replace(/^[+-]/, '').trim();
  const signed = (value: Decimal | null) => value && (negative ? value.neg() : value);
  const mixed = /^(\d+) (\d+) ?\/ ?(\d+)$/.exec(text);
  if (mixed) return signed(fraction(mixed[2]!, mixed[3]!)?.plus(mixed[1]!) ?? null);
  const simple = /^(\d+) ?\/ ?(\d+)$/.exec(text);
  if (simple) return signed(fraction(simple[1]!, simple[2]!));
  if (/^[1-9]\d{0,2}(?:[, ]\d{3})+(?:\.\d+)?$/.test(text))
    return signed(new Decimal(text.replace(/[, ]/g, '')));
  if (/ /.test(text)) return null;
  return signed(new Decimal(text.replace(',', '.')));
}

export const plainDecimal = plain;

/** The message of a number outside its bounds, or `null`. */
export function outOfBounds(value: Decimal, { min, max, above }: NumberBounds, unit = ''): string | null {
  const shown = (n: number) => `${n.toLocaleString('en-US', { maximumFractionDigits: 6 })}${unit}`;
  if (min !== undefined && (above ? value.lte(min) : value.lt(min)))
    return `must be ${above ? '>' : '≥'} ${shown(min)}`;
  if (max !== undefined && value.gt(max)) return `must be ≤ ${shown(max)}`;
  return null;
}

/** Reads a plain number: `1,500`, `1.5`, `1,5`, `3/4`, `7 1/2`, `7½`, `-2`. */
export function parseNumber(text: string, bounds: NumberBounds = {}): NumberOutcome {
  const typed = tidy(text);
  const value = new RegExp(`^${NUMBER_PATTERN}$`).test(typed) ? decimalOf(typed) : null;
  if (!value) return { ok: false, message: `must be a number such as 12 or 1.5; is "${text.trim()}"` };
  const problem = outOfBounds(value, bounds);
  return problem ? { ok: false, message: problem } : { ok: true, value: plain(value) };
}
