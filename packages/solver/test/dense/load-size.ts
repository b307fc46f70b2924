import type { Job, Load } from '@farlug/solver/job';
import { reference } from '../support/reference.ts';

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

/** The load's power factor and signed line amps at factor 1, all quantity, from nominal volts. */
export interface LoadSize {
  amps: number;
  /** Degrees by which the current lags. */
  lag: number;
  /** Volt-amperes per ampere: V for a pair, √3·V for three-phase. */
  vaPerAmp: number;
}

export const loadSize = (job: Job, load: Load, nominalVolts: number): LoadSize => {
  const direct = job.frequency === 0;
  const three = load.terminals === 'three-phase';
  const vaPerAmp = three ? Math.sqrt(3) * nominalVolts : nominalVolts;
  const pf = direct ? 1 : (load.powerFactor ?? (load.hp !== null ? 0.85 : 1));
  const lag = (Math.acos(pf) * (load.leading ? -1 : 1) * 180) / Math.PI;
  const each =
    load.amps ??
    (load.va !== null ? load.va / vaPerAmp : null) ??
    (load.watts !== null ? load.watts / pf / vaPerAmp : null) ??
    (load.kw !== null ? (load.kw * 1000) / pf / vaPerAmp : null) ??
    motorAmps(load.hp!, nominalVolts, three);
  return { amps: each * load.quantity, lag, vaPerAmp };
};

const motorAmps = (hp: number, volts: number, three: boolean): number => {
  const whole = Math.round(volts);
  const column = COLUMNS.find(([low, high]) => whole >= low && whole <= high)!;
  const name = three ? column[3] : column[2]!;
  const table = motors[three ? 'table_430_250_three_phase_flc' : 'table_430_248_single_phase_flc']!;
  return table.find((row) => Math.abs(row.hp_value - hp) < 1e-3)![name] as number;
};
