import { MOTOR_POWER_FACTOR, motorAmps } from '../tables/motors.ts';
import type { Load } from './schema.ts';

export interface LoadRating {
  /** Line amperes of all quantity at nominal volts; negative for generation. */
  amps: number;
  powerFactor: number;
  /** True where the current leads its voltage. */
  leading: boolean;
}

const SQRT3 = Math.sqrt(3);

/**
 * What a load draws at nominal volts (model: amps come from the nominal voltage between the terminals; VA/V, or
 * VA/(√3·V) three-phase; quantity multiplies). `volts`: nominal, of its pair, or between lines. Horsepower is
 * read in NEC 430.248 or 430.250. `null` for horsepower that the tables lack, which a parsed job does not have.
 */
export function loadRating(load: Load, volts: number, frequencyHz: number): LoadRating | null {
  const direct = frequencyHz === 0;
  const powerFactor = direct ? 1 : (load.powerFactor ?? (load.hp === null ? 1 : MOTOR_POWER_FACTOR));
  const amps = unitAmps(load, volts, powerFactor);
  return amps === null ? null : { amps: amps * load.quantity, powerFactor, leading: load.leading && !direct };
}

const unitAmps = (load: Load, volts: number, powerFactor: number): number | null => {
  const three = load.terminals === 'three-phase';
  if (load.amps !== null) return load.amps;
  if (load.hp !== null) {
    const motor = motorAmps({ hp: load.hp, phases: three ? 3 : 1, volts });
    return motor.ok ? motor.amps : null;
  }
  const va = load.va ?? (load.watts ?? (load.kw ?? 0) * 1000) / powerFactor;
  return va / (three ? SQRT3 * volts : volts);
};
