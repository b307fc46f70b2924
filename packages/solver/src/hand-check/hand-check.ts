import type { Beyond, Job, Pair, Phasor, Run } from '../job/index.ts';
import { beyondFinder, PAIRS } from '../job/index.ts';
import type { BusSystem } from '../job/systems.ts';
import { busSystems, emfBetween, pairConductors } from '../job/systems.ts';
import { METRES_PER } from '../units/length.ts';
import { conductorFigures, handSize, wireWords } from './conductor-figures.ts';
import type { HandLine } from './formulas.ts';
import { circularMilForm, iecForm, impedanceForm, RHO_1 } from './formulas.ts';
import type { PencilCurrent } from './hand-current.ts';
import { enteredCurrent, nominalAcross, solvedCurrent } from './hand-current.ts';
import type { Reason } from './reasons.ts';
import { differenceReasons } from './reasons.ts';
import type { RunState } from './run-state.ts';
import { pairDrop, runPairs, size } from './run-state.ts';

/** A formula with its numbers, and its result in percent of the volts that it goes with. */
export interface HandResult extends HandLine {
  nominalVolts: number;
  percent: number;
}

export type HandCheck =
  | {
      ok: true;
      runId: string;
      /** `10 AWG Cu in steel raceway, 132 ft`. */
      wire: string;
      current: PencilCurrent;
      /** `R 1.2 and X 0.063 Ω per 1000 ft, NEC Chapter 9 Table 9`. */
      constants: string;
      hand: HandResult;
      /** AWG only: the same by circular mils, which knows no power factor. */
      byCircularMils: HandResult | null;
      nodal: { pair: Pair; volts: number; percent: number };
      /** Node equations less formula; `volts` is `null` where the two are of different pairs. */
      difference: { volts: number | null; percent: number };
      /** Largest first; empty where both agree to the shown digits. */
      reasons: Reason[];
    }
  | { ok: false; runId: string; reason: string };

/** What every hand check of a job shares; made once. */
export interface HandCheckJob {
  job: Job;
  systems: ReadonlyMap<string, BusSystem>;
  beyond: (run: number) => Beyond | null;
}

export const prepareHandChecks = (job: Job): HandCheckJob => ({
  job,
  systems: busSystems(job),
  beyond: beyondFinder(job),
});

/**
 * The textbook formula for one radial run beside its nodal result, in the form that the job's units call for: R and X
 * per 1000 ft or km (with 2·K·I·D/cmil beside it for AWG), IEC 60364-5-52 Annex G for mm². Branch runs take the loads
 * as entered; other runs the mean of their lines out of the solution. Refused: runs in a loop, open runs, runs that
 * carry nothing, feed back or have no ohms.
 */
export function handCheckRun(prepared: HandCheckJob, index: number, state: RunState): HandCheck {
  const { job, systems } = prepared;
  const run = job.runs[index]!;
  const no = (reason: string): HandCheck => ({ ok: false, runId: run.id, reason });
  const beyond = prepared.beyond(index);
  if (!beyond) return no('not radial: no single formula follows a loop, a second source or an open run');
  const emfs = systems.get(beyond.nearBus)!.origin.emfs;
  const figures = conductorFigures(job, run);
  if (!figures || run.length === 0) return no('no impedance: nothing drops here');
  const current =
    (run.kind === 'branch' ? enteredCurrent(job, beyond, emfs, state) : null) ?? solvedCurrent(state);
  if (!current) return no('no load flows towards the far side');

  const kind = handKind(run, current);
  const base = handBase(run, current);
  const nodal = nodalResult(run, current, state, (pair) => emfBetween(emfs, ...pairConductors(pair)));
  if (!nodal) return no('no voltage is known at both ends');
  const handVolts = nominalAcross(emfs, base);
  const areas = handSize(job, run);
  const iec = areas !== null && 'areaMm2' in areas;
  const hand = iec
    ? iecResult(job, run, kind, current, areas.areaMm2, handVolts)
    : withPercent(impedanceForm(kind, current, returnsOf(figures.conductor, base)), handVolts);
  const mils =
    areas !== null && 'cmil' in areas
      ? circularMilForm(
          kind,
          current.amps,
          run.material,
          (run.length * METRES_PER[job.lengthUnit]) / METRES_PER.ft,
          areas.cmil,
          run.sets,
        )
      : null;
  const samePair = nodal.pair === base || (base === 'three-phase' && !nodal.pair.endsWith('N') && !iec);
  return {
    ok: true,
    runId: run.id,
    wire: wireWords(job, run),
    current,
    constants: iec
      ? `ρ1 ${RHO_1[run.material]} Ω·mm²/m and λ 0.08 mΩ/m, IEC 60364-5-52 Annex G`
      : figures.words,
    hand,
    byCircularMils: mils && withPercent(mils, handVolts),
    nodal: { pair: nodal.pair, volts: nodal.volts, percent: nodal.percent },
    difference: { volts: samePair ? nodal.volts - hand.volts : null, percent: nodal.percent - hand.percent },
    reasons: differenceReasons({
      kind,
      state,
      pair: nodal.pair,
      nominal: nodal.nominal,
      current,
      handPercent: hand.percent,
      nodalPercent: nodal.percent,
      constants: constantsWords(job, run, iec, figures.atC),
      nearBus: beyond.nearBus,
    }),
  };
}

const lineCount = (run: Run): number => run.conductors.filter((c) => c !== 'N').length;

const handKind = (run: Run, current: PencilCurrent): 'two-wire' | 'three-phase' => {
  if (current.terminals !== null) return current.terminals === 'three-phase' ? 'three-phase' : 'two-wire';
  return lineCount(run) === 3 ? 'three-phase' : 'two-wire';
};

/** Where the formula's volts lie: the loads' own pair, else the run's lines, else its line and neutral. */
const handBase = (run: Run, current: PencilCurrent): Pair | 'three-phase' => {
  if (current.terminals !== null) return current.terminals;
  if (lineCount(run) === 3) return 'three-phase';
  const lineToLine = PAIRS.find((pair) => !pair.endsWith('N') && runHas(run, pair));
  return lineToLine ?? PAIRS.find((pair) => runHas(run, pair))!;
};

const runHas = (run: Run, pair: Pair): boolean =>
  pairConductors(pair).every((c) => run.conductors.includes(c));

/** The neutral's own figures count only where the current returns by it. */
const returnsOf = <C extends { returns: unknown }>(conductor: C, base: Pair | 'three-phase'): C =>
  base.endsWith('-N') ? conductor : { ...conductor, returns: null };

const withPercent = (line: HandLine, nominalVolts: number): HandResult => ({
  ...line,
  nominalVolts,
  percent: (100 * line.volts) / nominalVolts,
});

const iecResult = (
  job: Job,
  run: Run,
  kind: 'two-wire' | 'three-phase',
  current: PencilCurrent,
  areaMm2: number,
  volts: number,
): HandResult => {
  const reactive = job.basis === 'impedance' && job.frequency > 0;
  const metres = run.length * METRES_PER[job.lengthUnit];
  const line = iecForm(kind, current, run.material, metres, areaMm2, run.sets, reactive);
  return withPercent(line, kind === 'three-phase' ? volts / Math.sqrt(3) : volts);
};

interface Nodal {
  pair: Pair;
  nominal: Phasor;
  volts: number;
  percent: number;
}

const nodalResult = (
  run: Run,
  current: PencilCurrent,
  state: RunState,
  nominalOf: (pair: Pair) => Phasor | null,
): Nodal | null => {
  const pairs =
    current.terminals === null
      ? runPairs(run.conductors)
      : current.terminals === 'three-phase'
        ? (['L1-L2', 'L2-L3', 'L1-L3'] as const)
        : [current.terminals];
  let worst: Nodal | null = null;
  for (const pair of pairs) {
    const nominal = nominalOf(pair);
    const [a, b] = pairConductors(pair);
    if (!nominal || !state.near[a] || !state.near[b] || !state.far[a] || !state.far[b]) continue;
    const volts = pairDrop(state, pair);
    const percent = (100 * volts) / size(nominal);
    if (!worst || Math.abs(percent) > Math.abs(worst.percent)) worst = { pair, nominal, volts, percent };
  }
  return worst;
};

const constantsWords = (job: Job, run: Run, iec: boolean, atC: number | null): string => {
  if (iec)
    return 'other constants: the solver takes the resistance of IEC 60228 at the conductor’s temperature';
  if (run.temperature === 'operating')
    return 'temperature: the solver takes the conductor at its operating temperature';
  if (typeof run.temperature === 'number' && atC !== null && run.temperature !== atC)
    return `temperature: the conductor is at ${run.temperature} °C, the table at ${atC} °C`;
  return job.frequency === 60 || job.frequency === 0
    ? 'other constants: skin effect and the rounding of the figures'
    : `frequency: reactance at ${job.frequency} Hz, the table at 60 Hz`;
};
