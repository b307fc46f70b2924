import { AWG_AC } from './data/awg-ac.ts';
import { AWG_AMPACITY } from './data/awg-ampacity.ts';
import { AWG_DC } from './data/awg-dc.ts';
import { AWG_AMBIENT, AWG_BUNDLING } from './data/awg-factors.ts';
import { MM2_AMPACITY } from './data/mm2-ampacity.ts';
import { MM2_DC } from './data/mm2-dc.ts';
import { MM2_AMBIENT_AIR, MM2_AMBIENT_GROUND, MM2_GROUPING } from './data/mm2-factors.ts';
import { MOTOR_SINGLE_PHASE, MOTOR_THREE_PHASE } from './data/motor-running.ts';
import { CODE_LETTERS, LOCKED_SINGLE_PHASE, LOCKED_THREE_PHASE } from './data/motor-starting.ts';
import { GROUNDING, SMALL_CONDUCTOR_LIMITS, STANDARD_AMPS } from './data/overcurrent.ts';
import type { TableId } from './sources.ts';

/** The figures of every table as plain data: what a report pins by their hash. */
export const tableContents = (): Readonly<Record<TableId, unknown>> => ({
  'awg-dc': AWG_DC,
  'awg-ac': AWG_AC,
  'mm2-dc': MM2_DC,
  'awg-ampacity': AWG_AMPACITY,
  'awg-ambient': AWG_AMBIENT,
  'awg-bundling': AWG_BUNDLING,
  'mm2-ampacity': MM2_AMPACITY,
  'mm2-ambient': { air: MM2_AMBIENT_AIR, ground: MM2_AMBIENT_GROUND },
  'mm2-grouping': MM2_GROUPING,
  'small-conductors': SMALL_CONDUCTOR_LIMITS,
  breakers: STANDARD_AMPS,
  grounding: GROUNDING,
  'motors-1ph': MOTOR_SINGLE_PHASE,
  'motors-3ph': MOTOR_THREE_PHASE,
  'motors-locked': { singlePhase: LOCKED_SINGLE_PHASE, threePhase: LOCKED_THREE_PHASE },
  'code-letters': CODE_LETTERS,
});
