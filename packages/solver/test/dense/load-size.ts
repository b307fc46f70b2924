import type { Job, Load } from '@farlug/solver/job';
import { reference } from '../support/reference.ts';
import { type Complex, complex } from './complex.ts';
import { D, type Decimal, ROOT3, UNITY } from './decimal.ts';

type MotorRow = { hp_value: number } & Record<string, number | string | null>;
const motors = reference<{ rows: Record<string, MotorRow[]> }>('motors').rows;

/** Columns of NEC 430.248 and 430.250 with the nominal volts that each serves, read to whole volts. */
const COLUMNS: [low: number, high: number, pair: string | null, three: string][] = [
  [110, 120, 'v115', 'ind_115'],
  [200, 200, 'v200', 'ind_200'],
  [208, 208, 'v208', 'ind_208'],
  [220, 240, 'v230', 'ind_230'],
  [440, 480, null, 'ind_460'],
  [550, 600, null, 'ind_575'],
];

/** cos φ − j·sin φ: a current that lags by φ, for a power factor of cos φ. */
export const lagOf = (powerFactor: number, leading = false): Complex => {
  const cos = D(powerFactor);
  const sin = UNITY.minus(cos.times(cos)).sqrt();
  return complex(cos, leading ? sin : sin.neg());
};

/** The load's signed line amps at factor 1, all quantity, from nominal volts. */
export interface LoadSize {
  amps: Decimal;
  /** What turns its current behind its voltage. */
  lag: Complex;
  /** Volt-amperes per ampere: V for a pair, √3·V for three-phase. */
  vaPerAmp: Decimal;
}

export const loadSize = (job: Job, load: Load, nominalVolts: Decimal): LoadSize => {
  const direct = job.frequency === 0;
  const three = load.terminals === 'three-phase';
  const vaPerAmp = three ? ROOT3.times(nominalVolts) : nominalVolts;
  const pf = direct ? 1 : (load.powerFactor ?? (load.hp !== null ? 0.85 : 1));
  const fromWatts = (watts: Decimal) => watts.div(pf).div(vaPerAmp);
  const each = (): Decimal => {
    if (load.amps !== null) return D(load.amps);
    if (load.va !== null) return D(load.va).div(vaPerAmp);
    if (load.watts !== null) return fromWatts(D(load.watts));
    if (load.kw !== null) return fromWatts(D(load.kw).times(1000));
    return D(motorAmps(load.hp!, nominalVolts, three));
  };
  return { amps: each().times(load.quantity), lag: lagOf(pf, load.leading), vaPerAmp };
};

const motorAmps = (hp: number, volts: Decimal, three: boolean): number => {
  const whole = Math.round(volts.toNumber());
  const column = COLUMNS.find(([low, high]) => whole >= low && whole <= high)!;
  const name = three ? column[3] : column[2]!;
  const table = motors[three ? 'table_430_250_three_phase_flc' : 'table_430_248_single_phase_flc']!;
  return table.find((row) => Math.abs(row.hp_value - hp) < 1e-3)![name] as number;
};
