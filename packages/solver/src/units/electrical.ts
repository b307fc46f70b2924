import { Decimal } from 'decimal.js';
import type { NumberBounds } from './number.ts';
import { plainDecimal } from './number.ts';
import type { QuantityOutcome, UnitSet } from './quantity.ts';
import { made, parseQuantity } from './quantity.ts';

const PERCENT: UnitSet<'%'> = {
  what: 'a percentage',
  examples: '3 % or 1.5',
  spellings: { '%': '%', percent: '%', pct: '%' },
};
const VOLTS: UnitSet<'V'> = {
  what: 'a voltage',
  examples: '120 V or 480',
  spellings: { v: 'V', volt: 'V', volts: 'V', vac: 'V', vdc: 'V' },
};
const AMPS: UnitSet<'A'> = {
  what: 'a current',
  examples: '16 A or 22 kA',
  spellings: { a: 'A', amp: 'A', amps: 'A' },
};
const TEMPERATURE: UnitSet<'C' | 'F'> = {
  what: 'a temperature',
  examples: '30 °C or 86 °F',
  spellings: { c: 'C', '°c': 'C', 'deg c': 'C', degc: 'C', f: 'F', '°f': 'F', 'deg f': 'F', degf: 'F' },
};

/** Reads `3 %`, `3`, `1.5 percent`: percent. */
export const parsePercent = (
  text: string,
  bounds: NumberBounds = { min: 0, max: 100 },
): QuantityOutcome<'%'> => parseQuantity(text, PERCENT, '%', bounds);

/** Reads `480 V`, `480`, `0.48 kV`: volts. */
export const parseVolts = (
  text: string,
  bounds: NumberBounds = { min: 0, above: true, max: 1e9 },
): QuantityOutcome<'V'> => kilo(text, VOLTS, 'kv', bounds);

/** Reads `16 A`, `22 kA`, `22000`: amperes. */
export const parseAmps = (
  text: string,
  bounds: NumberBounds = { min: 0, above: true, max: 1e9 },
): QuantityOutcome<'A'> => kilo(text, AMPS, 'ka', bounds);

const kilo = <U extends 'V' | 'A'>(
  text: string,
  units: UnitSet<U>,
  spelling: string,
  bounds: NumberBounds,
): QuantityOutcome<U> => {
  const base = units.spellings[spelling.slice(1)]!;
  if (!text.trim().toLowerCase().endsWith(spelling)) return parseQuantity(text, units, base, bounds);
  const outcome = parseQuantity(`${text.trim().slice(0, -2)}`, units, base, bounds);
  return outcome.ok ? made(new Decimal(outcome.value).times(1000), base) : outcome;
};

/** Reads `30`, `30 °C`, `86 °F`: degrees Celsius. */
export function parseTemperature(
  text: string,
  bounds: NumberBounds = { min: -60, max: 250 },
): QuantityOutcome<'°C'> {
  const outcome = parseQuantity(text, TEMPERATURE, 'C', { min: -500, max: 1000 });
  if (!outcome.ok) return outcome;
  const celsius =
    outcome.unit === 'C' ? new Decimal(outcome.value) : new Decimal(outcome.value).minus(32).times(5).div(9);
  if (bounds.min !== undefined && celsius.lt(bounds.min))
    return { ok: false, message: `must be ≥ ${bounds.min} °C` };
  if (bounds.max !== undefined && celsius.gt(bounds.max))
    return { ok: false, message: `must be ≤ ${bounds.max} °C` };
  return made(plainDecimal(celsius), '°C');
}
