import type { JobTable } from '../rows/index.ts';

/** Which fields hold the id of a row of another table. The database's foreign keys are the same list. */
export const REFERENCES: Partial<Record<JobTable, Readonly<Record<string, JobTable>>>> = {
  source: { busId: 'bus' },
  panel: { busId: 'bus' },
  circuit: { panelId: 'panel' },
  breaker: { circuitId: 'circuit' },
  run: { circuitId: 'circuit', fromBusId: 'bus', toBusId: 'bus' },
  transformer: { fromBusId: 'bus', toBusId: 'bus' },
  load: { circuitId: 'circuit', busId: 'bus', alongRunId: 'run' },
  reading: { busId: 'bus' },
};

/** The field that names a row in the job file, unique within its table. */
export const CODE_FIELD: Partial<Record<JobTable, string>> = {
  bus: 'code',
  source: 'code',
  run: 'code',
  transformer: 'code',
  load: 'code',
  conductor: 'name',
};
