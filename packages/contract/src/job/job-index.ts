import type { JobTable } from '../rows/index.ts';

/** Which rows the entries of the job came from: by place in each array of the file, and by code. */
export interface JobIndex {
  sources: readonly string[];
  buses: readonly string[];
  runs: readonly string[];
  transformers: readonly string[];
  loads: readonly string[];
  panels: readonly string[];
  /** Circuit row of each entry of `panels[i].circuits`. */
  panelCircuits: readonly (readonly string[])[];
  conductorRows: readonly string[];
  readings: readonly string[];
  runByCode: ReadonlyMap<string, Placed>;
  loadByCode: ReadonlyMap<string, Placed>;
  busByCode: ReadonlyMap<string, string>;
  transformerByCode: ReadonlyMap<string, string>;
  sourceByCode: ReadonlyMap<string, string>;
}
export interface Placed {
  row: string;
  circuitId: string | null;
  panelId: string | null;
}

const TABLES = {
  sources: 'source',
  buses: 'bus',
  runs: 'run',
  transformers: 'transformer',
  loads: 'load',
  panels: 'panel',
  conductorRows: 'conductor',
  readings: 'reading',
} as const satisfies Partial<Record<keyof JobIndex, JobTable>>;

/** The field of a row that a key of the job file comes from, where the two differ. */
const FIELDS: Record<string, string> = {
  id: 'code',
  bus: 'busId',
  from: 'fromBusId',
  to: 'toBusId',
  amps: 'size',
  va: 'size',
  watts: 'size',
  kw: 'size',
  hp: 'size',
  along: 'alongRunId',
  starting: 'startingAmps',
  impedance: 'impedanceR',
  fault: 'faultAmps',
  ohms: 'ohmsR',
  breaker: 'breakerAmps',
  circuit: 'circuitId',
};

/** The row and field that a path into the job is about, as `runs[3].length`; null for the job as a whole. */
export function rowAtPath(
  index: JobIndex,
  path: string,
): { table: JobTable; row: string; field: string | null } | null {
  const ofCircuit = /^panels\[(\d+)\]\.circuits\[(\d+)\]/.exec(path);
  if (ofCircuit) {
    const row = index.panelCircuits[Number(ofCircuit[1])]?.[Number(ofCircuit[2])];
    return row === undefined ? null : { table: 'circuit', row, field: 'spaces' };
  }
  const at = /^(\w+)\[(\d+)\](?:\.(\w+))?/.exec(path);
  const list = at?.[1] as keyof typeof TABLES | undefined;
  if (!at || !list || !(list in TABLES)) return null;
  const row = index[list][Number(at[2])];
  if (row === undefined) return null;
  return { table: TABLES[list], row, field: at[3] === undefined ? null : (FIELDS[at[3]] ?? at[3]) };
}
