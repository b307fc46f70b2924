import type { JobTable } from '../rows/index.ts';

/** A row that is not in the job that is solved, why, and what to fill in next. */
export interface LeftOut {
  table: JobTable;
  row: string;
  /** Its code in the job file, where it has one. */
  code: string | null;
  circuitId: string | null;
  panelId: string | null;
  /** The field to open next; null where the fault is elsewhere. */
  field: string | null;
  reason: string;
  /** True where the row itself is complete and only what feeds it is missing. */
  follows: boolean;
}

/** A value that nobody stated and that the results stand on. */
export interface Assumed {
  table: 'run' | 'load';
  row: string;
  code: string;
  circuitId: string | null;
  field: 'length' | 'raceway' | 'size' | 'powerFactor';
  /** As shown: `120 ft`, `pvc`, `0.85`. */
  value: string;
  reason: string;
}

/** How many schedule rows are left out: a circuit counts once, however many of its rows are missing. */
export function countLeftOut(leftOut: readonly LeftOut[]): number {
  return new Set(leftOut.map((one) => one.circuitId ?? `${one.table} ${one.row}`)).size;
}
