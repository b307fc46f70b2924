import type { ImportField } from '@farlug/contract/import';

/** What a column of a sheet can hold, as it is chosen. */
export const IMPORT_WORDS: Record<ImportField, string> = {
  space: 'Space',
  breaker: 'Breaker',
  poles: 'Poles',
  line: 'Line',
  description: 'Serves',
  room: 'Room',
  loadType: 'Load type',
  load: 'Load',
  vaL1: 'Load on L1',
  vaL2: 'Load on L2',
  vaL3: 'Load on L3',
  powerFactor: 'Power factor',
  demand: 'Demand',
  continuous: 'Continuous',
  class: 'Class',
  material: 'Material',
  size: 'Wire size',
  neutral: 'Neutral',
  ground: 'Grounding conductor',
  sets: 'Parallel sets',
  raceway: 'Raceway',
  length: 'Length',
  notes: 'Notes',
};

const POWER_UNITS = ['VA', 'kVA', 'W', 'kW', 'A', 'hp'] as const;
/** Units that bare numbers of a column may be in; the empty one is the job's, or none. */
export const IMPORT_UNITS: Partial<Record<ImportField, readonly string[]>> = {
  load: POWER_UNITS,
  vaL1: POWER_UNITS,
  vaL2: POWER_UNITS,
  vaL3: POWER_UNITS,
  length: ['ft', 'm'],
  size: ['awg', 'mm2'],
  demand: ['', '%', 'VA', 'kVA'],
};
export const UNIT_WORDS: Record<string, string> = { '': 'a factor', awg: 'AWG, kcmil', mm2: 'mm²' };
