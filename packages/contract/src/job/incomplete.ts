import type { JobRows, JobTable, Row } from '../rows/index.ts';

/** What a row still needs before it can stand in the job file: the first missing field, in words. */
export interface Missing {
  table: JobTable;
  row: string;
  field: string | null;
  reason: string;
  /** True of text that was not understood: in a circuit or its breaker it takes the whole circuit out. */
  draft?: boolean;
}

/** Rows that cannot be in the job file yet, by what they say themselves. */
export function incompleteRows(rows: JobRows): Missing[] {
  const missing: Missing[] = [];
  const add = (table: JobTable, row: string, found: readonly [string | null, string] | null) => {
    if (found) missing.push({ table, row, field: found[0], reason: found[1] });
  };
  for (const row of rows.source.values()) add('source', row.id, sourceGap(row));
  for (const row of rows.run.values()) add('run', row.id, runGap(row));
  for (const row of rows.transformer.values()) add('transformer', row.id, transformerGap(row));
  for (const row of rows.load.values()) add('load', row.id, loadGap(row));
  for (const [id, reason] of circuitGaps(rows)) add('circuit', id, ['load', reason]);
  for (const { table, rowId, field, text } of rows.draft.values())
    missing.push({
      table: table as JobTable,
      row: rowId,
      field,
      reason: `“${text}” is not understood.`,
      draft: true,
    });
  return missing.filter(({ table, row }) =>
    (rows[table] as ReadonlyMap<string, unknown> | undefined)?.has(row),
  );
}

function sourceGap(row: Row<'source'>): [string, string] | null {
  if (row.volts === null) return ['volts', 'The nominal volts of the supply are missing.'];
  const impedance = row.impedanceR !== null || row.impedanceX !== null;
  if (impedance && row.faultAmps !== null)
    return ['faultAmps', 'Both an impedance and a fault current are given: keep one.'];
  if (impedance && row.impedanceR === null) return ['impedanceR', 'The resistance of the supply is missing.'];
  if (row.faultAmps === null && row.faultXOverR !== null)
    return ['faultAmps', 'X/R is given without a fault current.'];
  return null;
}

function runGap(row: Row<'run'>): [string, string] | null {
  if (row.fromBusId === row.toBusId) return ['toBusId', 'The run ends at the point where it starts.'];
  if (row.ohmsR !== null && row.size !== null)
    return ['size', 'Both a size and ohms of its own are given: keep one.'];
  if (row.ohmsR === null && row.size === null && !isZero(row.length))
    return ['size', 'The size of the conductors is missing.'];
  if (row.ohmsR !== null && row.ohmsPer === null)
    return ['ohmsPer', 'Ohms are given without the length that they are for.'];
  if (row.length === null) return ['length', 'The length is missing.'];
  return null;
}

const isZero = (length: string | null): boolean => length !== null && Number.parseFloat(length) === 0;

function transformerGap(row: Row<'transformer'>): [string, string] | null {
  const needed = [
    ['kva', 'The kVA rating is missing.'],
    ['primaryVolts', 'The primary volts are missing.'],
    ['secondaryVolts', 'The secondary volts are missing.'],
    ['percentZ', 'The percent impedance is missing: read it off the nameplate.'],
    ['xOverR', 'X/R is missing.'],
  ] as const;
  for (const [field, reason] of needed) if (row[field] === null) return [field, reason];
  return null;
}

function loadGap(row: Row<'load'>): [string, string] | null {
  if (row.size === null) return ['size', 'The load is missing.'];
  if ((row.busId === null) === (row.alongRunId === null)) return ['busId', 'The load is at no point.'];
  if ((row.startingAmps === null) !== (row.startingPowerFactor === null))
    return row.startingAmps === null
      ? ['startingAmps', 'Starting amps are missing beside the starting power factor.']
      : ['startingPowerFactor', 'The starting power factor is missing.'];
  return null;
}

/** Branch circuits without any load, and circuits that should feed something and have no run. */
function circuitGaps(rows: JobRows): Map<string, string> {
  const loads = new Set([...rows.load.values()].map((load) => load.circuitId));
  const runs = new Set([...rows.run.values()].map((run) => run.circuitId));
  const gaps = new Map<string, string>();
  for (const circuit of rows.circuit.values()) {
    if (circuit.kind === 'branch' && !loads.has(circuit.id)) gaps.set(circuit.id, 'The load is missing.');
    if ((circuit.kind === 'feeder' || circuit.kind === 'feed-through') && !runs.has(circuit.id))
      gaps.set(circuit.id, 'What it feeds is missing.');
  }
  return gaps;
}
