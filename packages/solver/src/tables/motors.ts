import { MOTOR_SINGLE_PHASE, MOTOR_THREE_PHASE } from './data/motor-running.ts';
import { CODE_LETTERS, LOCKED_SINGLE_PHASE, LOCKED_THREE_PHASE } from './data/motor-starting.ts';
import type { TableId } from './sources.ts';

export interface MotorQuery {
  /** Horsepower as printed in the tables, within 2.5 %: 0.33 is read as 1/3. */
  hp: number;
  phases: 1 | 3;
  /** Nominal volts across the motor: of its pair, or between lines. */
  volts: number;
}
export type MotorOutcome =
  | { ok: true; amps: number; hp: number; columnVolts: number; source: TableId }
  | { ok: false; message: string };

/** A motor's power factor where the load states none (common practice). */
export const MOTOR_POWER_FACTOR = 0.85;

/** System volts that each printed column serves (NEC 430.248 and 430.250). */
const COLUMN_RANGES: readonly { columnVolts: number; low: number; high: number }[] = [
  { columnVolts: 115, low: 110, high: 120 },
  { columnVolts: 200, low: 200, high: 200 },
  { columnVolts: 208, low: 208, high: 208 },
  { columnVolts: 230, low: 220, high: 240 },
  { columnVolts: 460, low: 440, high: 480 },
  { columnVolts: 575, low: 550, high: 600 },
];
/** 208Y gives 120.09 V to neutral: half a volt of slack. */
const SLACK_VOLTS = 0.5;
const HP_TOLERANCE = 0.025;

interface MotorTable {
  rows: readonly (readonly (number | null)[])[];
  columns: readonly number[];
  name: string;
  source: TableId;
}
const RUNNING: Record<1 | 3, MotorTable> = {
  1: {
    rows: MOTOR_SINGLE_PHASE,
    columns: [115, 200, 208, 230],
    name: 'NEC Table 430.248',
    source: 'motors-1ph',
  },
  3: {
    rows: MOTOR_THREE_PHASE,
    columns: [115, 200, 208, 230, 460, 575],
    name: 'NEC Table 430.250',
    source: 'motors-3ph',
  },
};
const LOCKED: Record<1 | 3, MotorTable> = {
  1: {
    rows: LOCKED_SINGLE_PHASE,
    columns: [115, 208, 230],
    name: 'NEC Table 430.251(A)',
    source: 'motors-locked',
  },
  3: {
    rows: LOCKED_THREE_PHASE,
    columns: [115, 200, 208, 230, 460, 575],
    name: 'NEC Table 430.251(B)',
    source: 'motors-locked',
  },
};

const lookUp = (table: MotorTable, { hp, volts }: MotorQuery): MotorOutcome => {
  const range = COLUMN_RANGES.find((r) => volts >= r.low - SLACK_VOLTS && volts <= r.high + SLACK_VOLTS);
  const column = range ? table.columns.indexOf(range.columnVolts) : -1;
  if (!range || column < 0) {
    const ranges = COLUMN_RANGES.filter((r) => table.columns.includes(r.columnVolts)).map((r) =>
      r.low === r.high ? `${r.low}` : `${r.low} to ${r.high}`,
    );
    return {
      ok: false,
      message: `${table.name} has no column for ${Number(volts.toFixed(1))} V; it has ${ranges.join(', ')} V: give amps instead`,
    };
  }
  const row = table.rows.find((r) => Math.abs(hp - r[0]!) <= HP_TOLERANCE * r[0]!);
  const amps = row?.[column + 1];
  if (!row || amps === null || amps === undefined) {
    const printed = table.rows.filter((r) => r[column + 1] !== null).map((r) => r[0]!);
    const near = [...printed].sort((a, b) => Math.abs(a - hp) - Math.abs(b - hp)).slice(0, 2);
    const sizes = near.sort((a, b) => a - b).map((n) => Number(n.toFixed(3)));
    return {
      ok: false,
      message: `${table.name} has no ${Number(hp.toFixed(3))} hp at ${range.columnVolts} V; the nearest are ${sizes.join(' and ')} hp: take one, or give amps instead`,
    };
  }
  return { ok: true, amps, hp: row[0]!, columnVolts: range.columnVolts, source: table.source };
};

/**
 * Full-load amperes of an alternating-current motor: NEC Table 430.248 (one phase, `volts` of its pair) or
 * 430.250 (three-phase induction, volts between lines). Refused outside the printed columns and sizes.
 */
export const motorAmps = (query: MotorQuery): MotorOutcome => lookUp(RUNNING[query.phases], query);

/** Locked-rotor amperes: NEC Table 430.251(A) or, for design B, C and D, 430.251(B). Same query, same refusals. */
export const lockedRotorAmps = (query: MotorQuery): MotorOutcome => lookUp(LOCKED[query.phases], query);

/**
 * Locked-rotor amperes from the nameplate's code letter: the largest kVA per horsepower of its band
 * (the smallest for V, which has no upper end), NEC Table 430.7(B). `null` for a letter that the table lacks.
 */
export function codeLetterAmps(letter: string, { hp, phases, volts }: MotorQuery): number | null {
  const row = CODE_LETTERS.find((r) => r.letter === letter.trim().toUpperCase());
  if (!row) return null;
  const va = 1000 * (row.max ?? row.min) * hp;
  return phases === 3 ? va / (Math.sqrt(3) * volts) : va / volts;
}
