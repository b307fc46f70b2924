import type { LengthUnit, Load } from '@farlug/solver/job';
import { Decimal } from 'decimal.js';

/** Metres in each length unit; all exact by definition (NIST SP 811, international foot). */
const METRES: Record<string, string> = {
  ft: '0.3048',
  in: '0.0254',
  yd: '0.9144',
  mi: '1609.344',
  m: '1',
  cm: '0.01',
  km: '1000',
};
const Precise = Decimal.clone({ precision: 40 });

export function splitQuantity(quantity: string): { number: string; unit: string } {
  const [number = '', unit = ''] = quantity.split(' ');
  return { number, unit };
}

/** A typed length in the unit of a job, converted in decimals: `36 m` of a job in feet is 118.1102362… */
export function lengthIn(quantity: string, unit: LengthUnit): number {
  const typed = splitQuantity(quantity);
  if (typed.unit === unit) return Number(typed.number);
  return new Precise(typed.number).times(METRES[typed.unit]!).div(METRES[unit]!).toNumber();
}

type LoadSize = Pick<Load, 'amps' | 'va' | 'watts' | 'kw' | 'hp'>;
const NO_SIZE: LoadSize = { amps: null, va: null, watts: null, kw: null, hp: null };

/** The key of the job file under which a typed load stands; kVA goes as VA. */
export function loadSizeOf(quantity: string): LoadSize {
  const { number, unit } = splitQuantity(quantity);
  if (unit === 'kVA') return { ...NO_SIZE, va: new Precise(number).times(1000).toNumber() };
  const key = { A: 'amps', VA: 'va', W: 'watts', kW: 'kw', hp: 'hp' }[unit]!;
  return { ...NO_SIZE, [key]: Number(number) };
}

export function loadQuantityOf(load: LoadSize): string | null {
  const units = { amps: 'A', va: 'VA', watts: 'W', kw: 'kW', hp: 'hp' } as const;
  for (const [key, unit] of Object.entries(units)) {
    const value = load[key as keyof LoadSize];
    if (value !== null) return `${decimalOf(value)} ${unit}`;
  }
  return null;
}

/** A number as a decimal of at most twelve places, without an exponent. */
export function decimalOf(value: number): string {
  const rounded = new Precise(value).toDecimalPlaces(12);
  return rounded.isZero() ? '0' : rounded.toFixed();
}

export const decimalOrNull = (value: number | null): string | null =>
  value === null ? null : decimalOf(value);
export const numberOrNull = (value: string | null): number | null => (value === null ? null : Number(value));
