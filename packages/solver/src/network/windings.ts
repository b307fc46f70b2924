import type { Conductor, Job, Phasor, Transformer } from '../job/index.ts';
import { pairConductors, secondaryLags } from '../job/systems.ts';
import { splitByRatio } from './source-impedance.ts';

/** The star point that a wye has to itself where it faces a delta. */
export const STAR = 'star';
export type PrimaryTerminal = Conductor | typeof STAR;

/** One winding pair: primary + and −, secondary + and −. */
export interface Winding {
  primary: readonly [PrimaryTerminal, PrimaryTerminal];
  secondary: readonly [Conductor, Conductor];
  /** Primary winding volts ÷ secondary winding volts, tap included. */
  ratio: number;
  /** Leakage impedance seen from the secondary winding, ohm, on the job's basis. */
  ohms: Phasor;
}

const SQRT3 = Math.sqrt(3);
const WYE: readonly Conductor[] = ['L1', 'L2', 'L3'];
/** The delta winding that shares a core leg with the wye winding of the same place. */
const DELTA_AHEAD = [
  ['L1', 'L2'],
  ['L2', 'L3'],
  ['L3', 'L1'],
] as const satisfies readonly (readonly [Conductor, Conductor])[];
const DELTA_BEHIND = [
  ['L1', 'L3'],
  ['L2', 'L1'],
  ['L3', 'L2'],
] as const satisfies readonly (readonly [Conductor, Conductor])[];

/**
 * The winding pairs of a transformer: %Z/100 · V²/VA of the winding, with X/R (its resistive part alone on the
 * resistance basis). Delta–wye and wye–delta: the high side leads by 30° (IEEE C57.12.00); a mid-point secondary
 * has two half windings of half the VA in place of the winding between its outer lines.
 */
export function windingsOf(job: Pick<Job, 'basis'>, t: Transformer): Winding[] {
  const tap = 1 + t.tapPercent / 100;
  const winding = (
    primary: Winding['primary'],
    secondary: Winding['secondary'],
    primaryVolts: number,
    secondaryVolts: number,
    va: number,
  ): Winding => {
    const [r, x] = splitByRatio(((t.percentZ / 100) * secondaryVolts * secondaryVolts) / va, t.xOverR);
    return {
      primary,
      secondary,
      ratio: primaryVolts / secondaryVolts / tap,
      ohms: [r, job.basis === 'impedance' ? x : 0],
    };
  };
  const halved = (
    primary: Winding['primary'],
    [plus, minus]: readonly [Conductor, Conductor],
    primaryVolts: number,
    va: number,
  ): Winding[] => [
    winding(primary, [plus, 'N'], primaryVolts, t.secondaryVolts / 2, va / 2),
    winding(primary, ['N', minus], primaryVolts, t.secondaryVolts / 2, va / 2),
  ];
  const va = t.kva * 1000;

  if (t.connection === 'single-phase') {
    const primary = pairConductors(t.primary);
    return t.system === '1ph-3w'
      ? halved(primary, ['L1', 'L2'], t.primaryVolts, va)
      : [winding(primary, ['L1', 'N'], t.primaryVolts, t.secondaryVolts, va)];
  }
  const lags = secondaryLags(t);
  const primaryDelta = t.connection === 'delta-wye' || t.connection === 'delta-delta';
  const secondaryDelta = t.connection === 'wye-delta' || t.connection === 'delta-delta';
  const primaryVolts = primaryDelta ? t.primaryVolts : t.primaryVolts / SQRT3;
  const secondaryVolts = secondaryDelta ? t.secondaryVolts : t.secondaryVolts / SQRT3;
  const star: PrimaryTerminal = secondaryDelta ? STAR : 'N';
  const deltaFacingWye = lags === primaryDelta ? DELTA_BEHIND : DELTA_AHEAD;

  return [0, 1, 2].flatMap((leg): Winding[] => {
    const primary: Winding['primary'] = !primaryDelta
      ? [WYE[leg]!, star]
      : secondaryDelta
        ? DELTA_AHEAD[leg]!
        : deltaFacingWye[leg]!;
    const secondary: Winding['secondary'] = !secondaryDelta
      ? [WYE[leg]!, 'N']
      : primaryDelta
        ? DELTA_AHEAD[leg]!
        : deltaFacingWye[leg]!;
    const outer = t.system === '3ph-4w-delta' && secondary.includes('L1') && secondary.includes('L3');
    return outer
      ? halved(primary, secondary, primaryVolts, va / 3)
      : [winding(primary, secondary, primaryVolts, secondaryVolts, va / 3)];
  });
}
