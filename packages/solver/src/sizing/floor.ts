import type { ConductorRow, Run } from '../job/index.ts';
import type { RunSize } from '../job/run-ratings.ts';
import { insulationC, runAmpacity, runSize, terminalC } from '../job/run-ratings.ts';
import { ampacityAwg } from '../tables/ampacity.ts';
import { largestBreaker } from '../tables/breakers.ts';
import { formatNumber } from '../units/format.ts';

/** Amperes on the most loaded line conductor of a run, all sets together, and how much of them is continuous. */
export interface FloorLoad {
  amps: number;
  continuousAmps: number;
}

export type Floor =
  | {
      status: 'meets' | 'below';
      /** Amperes that the run may carry by these rules, all sets together: the least of the checks. */
      ampacityAmps: number;
      /** Each check that fails, in words; empty where all hold. */
      reasons: string[];
      /** What the figure stands on: `75 °C terminals, 75 °C insulation, 30 °C ambient, three conductors`. */
      basis: string;
    }
  /** A rule that is not implemented, or facts that are missing: never a pass. */
  | { status: 'not-checked'; ampacityAmps: null; reasons: string[]; basis: string };

const CONTINUOUS = 1.25;
const SMALLEST_PARALLEL_CMIL = 105_600;
const SLACK = 1 + 1e-9;
const amps = (value: number): string => `${formatNumber(value, 1)} A`;

const notChecked = (why: string): Floor => ({
  status: 'not-checked',
  ampacityAmps: null,
  reasons: [`not checked here: ${why}`],
  basis: '',
});

const OTHER_RULES: Record<Exclude<Run['protection'], 'general'>, string> = {
  motor: 'a motor circuit is sized by NEC 430.22 and 430.52',
  transformer: 'transformer conductors are protected by NEC 450.3 and 240.21(C)',
  tap: 'a tap is sized by NEC 240.21(B)',
  'dwelling-83': 'a dwelling service at 83 % is sized by NEC 310.12',
};

/**
 * The ampacity floor of a run in one size. AWG and kcmil, two checks that must both hold (NEC 2023):
 * (a) at the terminals, in the column of 110.14(C), without factors: non-continuous plus 125 % of continuous load;
 * (b) in the raceway, in the column of the insulation times ambient and bundling factors: the load, and a breaker
 * that the conductor's ampacity (no higher than its terminals') lets stand: 240.4(B), 240.4(D).
 * mm²: IEC 60364-4-43 433.1, load ≤ breaker ≤ ampacity, by installation method.
 * Other kinds of protection, missing methods and missing table cells come back as not checked.
 */
export function ampacityFloor(run: Run, load: FloorLoad, conductorRows: readonly ConductorRow[] = []): Floor {
  if (run.protection !== 'general') return notChecked(OTHER_RULES[run.protection]);
  const size = runSize(run, conductorRows);
  if (!size) return notChecked('the run states its own ohms and no size');
  return size.kind === 'table' && size.family === 'awg'
    ? awgFloor(run, size, load)
    : plainFloor(run, size, load);
}

const awgFloor = (run: Run, size: RunSize & { kind: 'table' }, load: FloorLoad): Floor => {
  if (run.sets > 1 && size.cmil < SMALLEST_PARALLEL_CMIL)
    return {
      status: 'below',
      ampacityAmps: 0,
      reasons: ['parallel sets start at 1/0 AWG, 310.10(G)'],
      basis: '',
    };
  const terminalsC = terminalC(run, load.amps);
  const terminals = ampacityAwg({ material: run.material, size: size.size, columnC: terminalsC });
  const raceway = runAmpacity(run, size, run.ambient);
  if (!terminals.ok) return notChecked(terminals.message);
  if (!raceway.ok) return notChecked(raceway.message);
  const atTerminals = terminals.amps * run.sets;
  const inRaceway = raceway.amps * run.sets;
  const reasons: string[] = [];
  const wanted = load.amps + (CONTINUOUS - 1) * load.continuousAmps;
  if (atTerminals * SLACK < wanted)
    reasons.push(
      load.continuousAmps > 0
        ? `terminals: ${amps(atTerminals)} at ${terminalsC} °C < ${amps(wanted)}, the load with 125 % of its ${amps(load.continuousAmps)} continuous`
        : `terminals: ${amps(atTerminals)} at ${terminalsC} °C < ${amps(wanted)} of load`,
    );
  if (inRaceway * SLACK < load.amps)
    reasons.push(`in the raceway: ${amps(inRaceway)} after factors < ${amps(load.amps)} of load`);
  const rated = Math.min(atTerminals, inRaceway);
  if (run.breaker) {
    const most = largestBreaker(rated, run.material, size.size);
    if (most * SLACK < run.breaker.amps)
      reasons.push(
        `breaker: ${amps(rated)} of ampacity is protected up to ${amps(most)}, 240.4, not by ${amps(run.breaker.amps)}`,
      );
  }
  return {
    status: reasons.length > 0 ? 'below' : 'meets',
    ampacityAmps: rated,
    reasons,
    basis: `${terminalsC} °C terminals, ${insulationC(run, 'awg')} °C insulation, ${conditions(run, 3, 'conductors')}`,
  };
};

const plainFloor = (run: Run, size: RunSize, load: FloorLoad): Floor => {
  const ampacity = runAmpacity(run, size, run.ambient);
  if (!ampacity.ok) return notChecked(ampacity.message);
  const carries = ampacity.amps * run.sets;
  const rule = size.kind === 'row' ? '' : ', IEC 60364-4-43 433.1';
  const reasons: string[] = [];
  if (carries * SLACK < load.amps)
    reasons.push(`${amps(carries)} after factors < ${amps(load.amps)} of load`);
  if (run.breaker && carries * SLACK < run.breaker.amps)
    reasons.push(`${amps(carries)} after factors < the ${amps(run.breaker.amps)} breaker${rule}`);
  return {
    status: reasons.length > 0 ? 'below' : 'meets',
    ampacityAmps: carries,
    reasons,
    basis:
      size.kind === 'row'
        ? `ampacity of the firm’s row "${size.row.name}" as stated`
        : `method ${run.method}, ${insulationC(run, 'mm2')} °C insulation, ${conditions(run, 1, 'circuit')}`,
  };
};

const conditions = (run: Run, bundled: number, what: string): string =>
  `${run.ambient === null ? 'the table’s ambient' : `${run.ambient} °C ambient`}, ${run.bundled ?? bundled} ${what}`;
