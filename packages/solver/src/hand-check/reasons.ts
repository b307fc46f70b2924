import type { Conductor, Pair, Phasor } from '../job/index.ts';
import { pairConductors } from '../job/systems.ts';
import { formatAmps, formatNumber } from '../units/format.ts';
import type { HandCurrent } from './formulas.ts';
import type { RunState } from './run-state.ts';
import { across, along, difference, product, quotient, size } from './run-state.ts';

/** One reason why the node equations and the formula part, and how much of the difference it makes, in percent. */
export interface Reason {
  percent: number;
  words: string;
}

export interface ReasonQuery {
  kind: 'two-wire' | 'three-phase';
  state: RunState;
  pair: Pair;
  /** Nominal EMF phasor of the pair, volts. */
  nominal: Phasor;
  current: HandCurrent & { from: 'entered' | 'solved' };
  handPercent: number;
  nodalPercent: number;
  /** What sets the formula's constants apart from the solver's, in words. */
  constants: string;
  nearBus: string;
}

const SHOWN_PERCENT = 0.005;
const SHARE = 0.1;
const DEGREES = 180 / Math.PI;

/**
 * Goes from the formula to the node equations one step at a time: the solver's ohms in the formula, then the
 * conductors' own currents in place of one, then the true angle of the voltage. Each step that makes up a tenth
 * of the difference is a reason; none where both agree to the shown digits.
 */
export function differenceReasons(q: ReasonQuery): Reason[] {
  const total = q.nodalPercent - q.handPercent;
  if (Math.abs(total) < SHOWN_PERCENT) return [];
  const withOhms = formulaWithOhms(q);
  const projected = dropAlongNominal(q);
  const steps: Reason[] = [
    { percent: withOhms - q.handPercent, words: q.constants },
    { percent: projected - withOhms, words: currentWords(q) },
    { percent: q.nodalPercent - projected, words: angleWords(q) },
  ];
  return steps
    .filter((step) => Math.abs(step.percent) >= Math.max(SHARE * Math.abs(total), SHOWN_PERCENT / 2))
    .sort((a, b) => Math.abs(b.percent) - Math.abs(a.percent));
}

/** Ohms of a conductor as they were in the solution, out of its volts and current; `null` where none flows. */
const ohmsOf = ({ near, far, currents }: RunState, c: Conductor): Phasor | null => {
  const [from, to, current] = [near[c], far[c], currents[c]];
  if (!from || !to || !current || size(current) === 0) return null;
  return quotient(difference(from, to), current);
};

/** R cosφ ± X sinφ of one conductor with the formula's current, volts. */
const inPhase = (current: HandCurrent, [r, x]: Phasor): number => {
  const sin = Math.sqrt(Math.max(0, 1 - current.powerFactor ** 2)) * (current.leading ? -1 : 1);
  return current.amps * (r * current.powerFactor + x * sin);
};

const formulaWithOhms = (q: ReasonQuery): number => {
  const nominalVolts = size(q.nominal);
  if (q.kind === 'three-phase') {
    const lines = (['L1', 'L2', 'L3'] as const).flatMap((c) => ohmsOf(q.state, c) ?? []);
    const mean = lines.length === 0 ? null : meanOf(q.state);
    if (!mean) return q.handPercent;
    const lineToLine = q.pair.endsWith('N') ? 1 : Math.sqrt(3);
    return (100 * lineToLine * inPhase(q.current, mean)) / nominalVolts;
  }
  const [a, b] = pairConductors(q.pair);
  const first = ohmsOf(q.state, a);
  const second = ohmsOf(q.state, b) ?? first;
  if (!first || !second) return q.handPercent;
  return (100 * (inPhase(q.current, first) + inPhase(q.current, second))) / nominalVolts;
};

const meanOf = (state: RunState): Phasor | null => {
  const all = (['L1', 'L2', 'L3'] as const).map((c) => ohmsOf(state, c)).filter((z) => z !== null);
  if (all.length === 0) return null;
  return [
    all.reduce((sum, z) => sum + z[0], 0) / all.length,
    all.reduce((sum, z) => sum + z[1], 0) / all.length,
  ];
};

const dropAlongNominal = ({ state, pair, nominal }: ReasonQuery): number => {
  const drop = difference(across(state.near, pair)!, across(state.far, pair)!);
  const volts = size(nominal);
  return (100 * along(drop, [nominal[0] / volts, nominal[1] / volts])) / volts;
};

const currentWords = ({ kind, state, pair, current }: ReasonQuery): string => {
  const line = pairConductors(pair)[0];
  const own = state.currents[line];
  const neutral = state.currents.N;
  const carries = own ? size(own) : 0;
  const byNeutral = neutral ? size(neutral) : 0;
  if (kind === 'three-phase' || current.from === 'solved') {
    const withNeutral = byNeutral > 0 ? `, and the neutral ${formatAmps(byNeutral)}` : '';
    return `unbalance: ${line} carries ${formatAmps(carries)}${withNeutral}; the formula takes ${formatAmps(current.amps)} in every line`;
  }
  if (pair.endsWith('N') && neutral && Math.abs(byNeutral - carries) > 0.001 * carries)
    return `shared neutral: it carries ${formatAmps(byNeutral)} beside ${formatAmps(carries)} in ${line}; the formula sends the same current back`;
  return Math.abs(carries - current.amps) > 0.001 * current.amps
    ? `current: the node equations have ${formatAmps(carries, 2)} in ${line}, the formula ${formatAmps(current.amps, 2)}`
    : `angle of the current: it keeps its angle to the voltage at the load, which the formula does not follow`;
};

const angleWords = ({ state, pair, nominal, nearBus }: ReasonQuery): string => {
  const near = across(state.near, pair)!;
  const turned = product(near, [nominal[0], -nominal[1]]);
  const degrees = Math.atan2(turned[1], turned[0]) * DEGREES;
  if (Math.abs(degrees) < 0.05)
    return 'the magnitude of the voltage: the formula leaves out the part of the drop at right angles to it';
  return `${pair} at ${nearBus} ${degrees < 0 ? 'lags' : 'leads'} its nominal angle by ${formatNumber(Math.abs(degrees), 1)}°; the formula sets that angle to zero`;
};
