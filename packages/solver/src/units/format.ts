import type { Quantity } from './quantity.ts';

/** Comparison of a result with a limit: unrounded, at 1e-9 relative (the verdict's own rule). */
export const exceeds = (value: number, limit: number): boolean => value - limit > 1e-9 * Math.abs(limit);

const MAX_DIGITS = 12;
const MINUS = '−';

/** Fixed decimals with a true minus sign and no negative zero. */
export function formatFixed(value: number, digits: number): string {
  const text = Math.abs(value).toFixed(digits);
  return value < 0 && Number(text) !== 0 ? MINUS + text : text;
}

/** A number with no more decimals than it needs, at most `digits`, thousands grouped. */
export const formatNumber = (value: number, digits = 3): string =>
  value.toLocaleString('en-US', { maximumFractionDigits: digits }).replace(/^-0$/, '0').replace('-', MINUS);

/**
 * Decimals that a value needs so that its shown digits never contradict the verdict against `limit`:
 * 3.004 against 3 needs three. At least `digits`.
 */
export function digitsAgainst(value: number, limit: number | null, digits = 2): number {
  if (limit === null) return digits;
  const over = exceeds(value, limit);
  for (let n = digits; n < MAX_DIGITS; n++) {
    const shown = Number(value.toFixed(n));
    if (over ? shown > limit : shown <= limit) return n;
  }
  return MAX_DIGITS;
}

/** `4.70 %`. */
export const formatPercent = (value: number, digits = 2): string => `${formatFixed(value, digits)} %`;

/** A percentage beside its limit, with as many digits as the verdict needs: 3.004 against 3 is `3.004 %`. */
export const formatPercentAgainst = (value: number, limit: number | null, digits = 2): string =>
  formatPercent(value, digits === 0 && limit === null ? 0 : digitsAgainst(value, limit, digits));

/** A limit as it was set: `3 %`, `1.5 %`. */
export const formatLimit = (limit: number): string => `${formatNumber(limit, 6)} %`;

export const formatVolts = (value: number, digits = 1): string => `${formatFixed(value, digits)} V`;
export const formatAmps = (value: number, digits = 1): string => `${formatFixed(value, digits)} A`;
export const formatWatts = (value: number): string =>
  Math.abs(value) >= 10_000
    ? `${formatFixed(value / 1000, 2)} kW`
    : `${formatNumber(value, value < 10 ? 1 : 0)} W`;

/** A typed quantity as shown: digits grouped, unit as typed. */
export function formatQuantity({ value, unit }: Quantity<string>): string {
  const [whole, decimals] = value.replace('-', '').split('.') as [string, string | undefined];
  const grouped = whole.replace(/\B(?=(\d{3})+$)/g, ',');
  return `${value.startsWith('-') ? MINUS : ''}${grouped}${decimals ? `.${decimals}` : ''} ${unit}`;
}

const AREA = / mm2$/;
/** A conductor size as shown: `12 AWG`, `250 kcmil`, `16 mm²`. */
export const formatSize = (size: string): string => size.replace(AREA, ' mm²');
