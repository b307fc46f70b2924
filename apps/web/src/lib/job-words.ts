import type { LimitKind } from '@farlug/contract/rows';
import type { Basis, Force, LoadClass, Scenario, System } from '@farlug/solver/job';

/** Supply systems in the words of the trade; volts are between lines unless said. */
export const SYSTEM_WORDS: Record<System, string> = {
  '3ph-4w': 'Three-phase four-wire wye',
  '1ph-3w': 'Single-phase three-wire, mid-point neutral',
  '1ph-3w-wye': 'Two lines and neutral of a wye',
  '1ph-2w': 'Single-phase two-wire',
  '3ph-3w': 'Three-phase three-wire',
  '3ph-4w-delta': 'Three-phase four-wire delta, high leg',
  'dc-2w': 'Direct current, two-wire',
};
export const SYSTEM_ORDER = Object.keys(SYSTEM_WORDS) as System[];

/** What the nominal volts of a system are measured between, and an example. */
export const SYSTEM_VOLTS: Record<System, { between: string; example: string }> = {
  '3ph-4w': { between: 'line to line', example: '480 for 480Y/277, 208 for 208Y/120, 400 for 400/230' },
  '1ph-3w': { between: 'line to line', example: '240 for 120/240' },
  '1ph-3w-wye': { between: 'line to line', example: '208 for 120/208' },
  '1ph-2w': { between: 'line to neutral', example: '230' },
  '3ph-3w': { between: 'line to line', example: '480' },
  '3ph-4w-delta': { between: 'line to line', example: '240 for 120/240 with a 208 V high leg' },
  'dc-2w': { between: 'positive to return', example: '48' },
};

/** The fault current that a system's source is stated by. */
export const SYSTEM_FAULT: Record<System, string> = {
  '3ph-4w': 'Three-phase fault current',
  '3ph-3w': 'Three-phase fault current',
  '3ph-4w-delta': 'Three-phase fault current',
  '1ph-3w-wye': 'Three-phase fault current of the wye',
  '1ph-3w': 'Line-to-line fault current',
  '1ph-2w': 'Line-to-neutral fault current',
  'dc-2w': 'Fault current',
};

export const BASIS_WORDS: Record<Basis, string> = {
  impedance: 'Impedance, R and X',
  resistance: 'Resistance only',
};

export const FORCE_WORDS: Record<Force, string> = {
  recommendation: 'Recommendation: a miss is not a violation',
  mandatory: 'Mandatory: the adopted code demands it',
};

export const CLASS_WORDS: Record<LoadClass, string> = {
  lighting: 'Lighting',
  receptacle: 'Receptacles',
  motor: 'Motors',
  heat: 'Heat',
  cooling: 'Cooling',
  kitchen: 'Kitchen',
  sensitive: 'Sensitive equipment',
  emergency: 'Emergency',
  'fire-pump': 'Fire pump',
  ev: 'Vehicle charging',
  generation: 'Generation',
  equipment: 'Other equipment',
};

export const LIMIT_WORDS: Record<LimitKind, { label: string; unit: '%' | 'V'; hint?: string }> = {
  feeder: { label: 'Feeder', unit: '%' },
  branch: { label: 'Branch circuit', unit: '%' },
  total: { label: 'Feeder and branch together', unit: '%' },
  starting: { label: 'Starting, at the terminals', unit: '%', hint: 'Below nominal while a motor starts.' },
  rise: { label: 'Rise from generation', unit: '%' },
  'lowest-volts': { label: 'Lowest volts at a load', unit: 'V' },
  'highest-volts': { label: 'Highest volts at a load', unit: 'V' },
  'rating-low': {
    label: 'Lowest share of the rating',
    unit: '%',
    hint: 'Of the volts that the equipment is rated for.',
  },
  'rating-high': { label: 'Highest share of the rating', unit: '%' },
};

/** Scenarios as they are chosen, and what stands under the choice. */
export const SCENARIO_WORDS: Record<Scenario, { label: string; others: string }> = {
  'each-circuit': { label: 'Each circuit full', others: 'others at design demand' },
  design: { label: 'Design demand', others: 'every load at its demand' },
  'everything-on': { label: 'Everything on', others: 'no diversity' },
  light: { label: 'Light load', others: 'generation full, loads at their least' },
  starting: { label: 'Starting', others: 'each motor in turn, others at demand' },
};
/** In the order in which they are offered. */
export const SCENARIO_ORDER: readonly Scenario[] = [
  'each-circuit',
  'design',
  'everything-on',
  'light',
  'starting',
];
