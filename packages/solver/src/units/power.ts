import type { Quantity, QuantityOutcome, UnitSet } from './quantity.ts';
import { parseQuantity, timesExactly } from './quantity.ts';

/** The units that the size of a load is typed in. */
export const LOAD_UNITS = ['A', 'VA', 'kVA', 'W', 'kW', 'hp'] as const;
export type LoadUnit = (typeof LOAD_UNITS)[number];

const LOADS: UnitSet<LoadUnit> = {
  what: 'a load',
  examples: '16 A, 180 VA, 1.5 kW or 3/4 hp',
  spellings: {
    a: 'A',
    amp: 'A',
    amps: 'A',
    ampere: 'A',
    amperes: 'A',
    va: 'VA',
    kva: 'kVA',
    w: 'W',
    watt: 'W',
    watts: 'W',
    kw: 'kW',
    hp: 'hp',
    horsepower: 'hp',
  },
};
const MAX = 1e9;

/**
 * Reads the size of a load: `16 A`, `180 VA`, `2.4kVA`, `1,500 W`, `1.5 kW`, `3/4 hp`, `7 1/2 hp`.
 * A bare number takes `defaultUnit`. Negative is generation, refused in hp.
 */
export function parsePower(text: string, defaultUnit: LoadUnit | null = null): QuantityOutcome<LoadUnit> {
  const outcome = parseQuantity(text, LOADS, defaultUnit, { min: -MAX, max: MAX });
  if (outcome.ok && outcome.unit === 'hp' && Number(outcome.value) <= 0)
    return { ok: false, message: 'must be > 0 hp; generation is typed in W, VA or A' };
  return outcome;
}

/** The key of a job file's load that a unit is written under. */
export type LoadSizeKey = 'amps' | 'va' | 'watts' | 'kw' | 'hp';
const KEYS: Record<LoadUnit, { key: LoadSizeKey; factor: string }> = {
  A: { key: 'amps', factor: '1' },
  VA: { key: 'va', factor: '1' },
  kVA: { key: 'va', factor: '1000' },
  W: { key: 'watts', factor: '1' },
  kW: { key: 'kw', factor: '1' },
  hp: { key: 'hp', factor: '1' },
};

/** A load's size as a job file states it: `2.4 kVA` is `{ key: 'va', value: 2400 }`. */
export const loadSizeOf = ({ value, unit }: Quantity<LoadUnit>): { key: LoadSizeKey; value: number } => ({
  key: KEYS[unit].key,
  value: timesExactly(value, KEYS[unit].factor),
});
