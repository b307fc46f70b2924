import { Decimal } from 'decimal.js';
import type { Problem } from '../job/index.ts';

/** How losses at the peak become a year of energy and money. */
export interface YearOptions {
  /** Average load over peak load, 0 … 1. */
  loadFactor?: number | null;
  /** Average losses over peak losses, 0 … 1, in place of the one that follows from the load factor. */
  lossFactor?: number | null;
  hoursPerYear?: number;
  /** Money per kWh, in the currency that it is stated in; a text such as `0.1275` keeps its digits. */
  pricePerKwh?: number | string | null;
}

/** The same, checked. Without a factor there is no year, without a price no money. */
export interface Year {
  lossFactor: number | null;
  lossFactorFrom: string | null;
  hoursPerYear: number;
  pricePerKwh: Decimal | null;
}

const HOURS = 8760;
/** Hours of a leap year. */
const MOST_HOURS = 8784;
const MOST_PRICE = 1e6;

/**
 * Loss factor of a load factor, both 0 … 1: 0.3·LF + 0.7·LF² (Buller and Woodrow 1928, with the usual 0.7 of
 * distribution handbooks). It lies between LF², a level load with one
 * brief peak, and LF, a load that is either fully on or off.
 */
export const lossFactorOf = (loadFactor: number): number => 0.3 * loadFactor + 0.7 * loadFactor * loadFactor;

const isShare = (value: number): boolean => value >= 0 && value <= 1;
/** Rounding that a stated factor may have against its bounds. */
const ROUNDED = 1e-9;

/** Checks what a year is made of; problems by the name of the option. */
export function yearOf(options: YearOptions): { ok: true; year: Year } | { ok: false; problems: Problem[] } {
  const { loadFactor = null, lossFactor = null, hoursPerYear = HOURS, pricePerKwh = null } = options;
  const problems: Problem[] = [];
  const report = (path: string, message: string) => problems.push({ path, message });
  if (loadFactor !== null && !isShare(loadFactor))
    report('loadFactor', `must be 0 to 1, average load over peak load; is ${loadFactor}`);
  if (lossFactor !== null && !isShare(lossFactor))
    report('lossFactor', `must be 0 to 1, average losses over peak losses; is ${lossFactor}`);
  else if (lossFactor !== null && loadFactor !== null && isShare(loadFactor)) {
    const lowest = loadFactor * loadFactor;
    if (lossFactor < lowest - ROUNDED || lossFactor > loadFactor + ROUNDED)
      report(
        'lossFactor',
        `must lie between the square of the load factor and itself, ${lowest} to ${loadFactor}; is ${lossFactor}`,
      );
  }
  if (!(hoursPerYear >= 0 && hoursPerYear <= MOST_HOURS))
    report('hoursPerYear', `must be 0 to ${MOST_HOURS} hours; is ${hoursPerYear}`);
  const price = pricePerKwh === null ? null : priceOf(pricePerKwh);
  if (pricePerKwh !== null && price === null)
    report('pricePerKwh', `must be 0 to ${MOST_PRICE} per kWh, such as 0.12; is ${pricePerKwh}`);
  if (price !== null && loadFactor === null && lossFactor === null)
    report(
      'pricePerKwh',
      'must stand beside a load factor or a loss factor: a price is of energy, not of watts',
    );
  if (problems.length > 0) return { ok: false, problems };
  const follows = loadFactor === null ? null : lossFactorOf(loadFactor);
  return {
    ok: true,
    year: {
      lossFactor: lossFactor ?? follows,
      lossFactorFrom:
        lossFactor !== null
          ? 'as given'
          : follows === null
            ? null
            : `0.3·LF + 0.7·LF² with LF ${loadFactor} (Buller and Woodrow 1928)`,
      hoursPerYear,
      pricePerKwh: price,
    },
  };
}

function priceOf(price: number | string): Decimal | null {
  if (typeof price === 'string' && !/^\d+(\.\d+)?$/.test(price)) return null;
  if (typeof price === 'number' && !Number.isFinite(price)) return null;
  const value = new Decimal(price);
  return value.gte(0) && value.lte(MOST_PRICE) ? value : null;
}
