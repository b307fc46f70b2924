import type { AmpacityOutcome, AwgColumn } from '../tables/ampacity.ts';
import { ampacityAwg, ampacityMm2 } from '../tables/ampacity.ts';
import type { SizeFamily } from '../tables/size.ts';
import { parseSize } from '../tables/size.ts';
import type { ConductorRow, Run } from './schema.ts';

/** The columns that hold where a run states none: 75 °C insulation for AWG (common practice), 70 °C for mm². */
export const DEFAULT_INSULATION_C = { awg: 75, mm2: 70 } as const;
const NEC_TERMINALS_60_UP_TO_AMPS = 100;

export type RunSize =
  | { kind: 'table'; size: string; family: SizeFamily; cmil: number; areaMm2: number }
  | { kind: 'row'; row: ConductorRow };

/** The size that a run is laid in: a row of the firm's own comes before the tables; `null` where it states ohms. */
export function runSize(
  run: Pick<Run, 'size' | 'material'>,
  conductorRows: readonly ConductorRow[],
  size: string | null = run.size,
): RunSize | null {
  if (size === null) return null;
  const row = conductorRows.find((r) => r.name === size && r.material === run.material);
  if (row) return { kind: 'row', row };
  const table = parseSize(size);
  return table.ok
    ? { kind: 'table', size: table.size, family: table.family, cmil: table.cmil, areaMm2: table.areaMm2 }
    : null;
}

/** Rated temperature of a run's insulation, °C: as stated, else 75 (AWG) or 70 (mm²). */
export const insulationC = (run: Pick<Run, 'insulation'>, family: SizeFamily): number =>
  run.insulation ?? DEFAULT_INSULATION_C[family];

/**
 * Column for the terminals, °C: as marked, else 60 °C for circuits of 100 A or less and 75 °C above
 * (NEC 110.14(C)(1)), by the breaker where the run names one.
 */
export const terminalC = (run: Pick<Run, 'terminals' | 'breaker'>, circuitAmps: number): AwgColumn =>
  run.terminals ?? ((run.breaker?.amps ?? circuitAmps) <= NEC_TERMINALS_60_UP_TO_AMPS ? 60 : 75);

/**
 * Ampacity of one conductor of a run in the column of its insulation, with ambient and bundling factors:
 * NEC Table 310.16 for AWG, IEC 60364-5-52 for mm², which must state its installation method; the firm's own row
 * as it stands. `ambientC: null` leaves the ambient at the table's own.
 */
export function runAmpacity(
  run: Pick<Run, 'material' | 'insulation' | 'bundled' | 'method' | 'conductors'>,
  size: RunSize,
  ambientC: number | null,
): AmpacityOutcome {
  if (size.kind === 'row') return rowAmpacity(run, size.row);
  const { material, bundled } = run;
  const rated = insulationC(run, size.family);
  if (size.family === 'awg') {
    if (rated !== 60 && rated !== 75 && rated !== 90)
      return { ok: false, message: `Table 310.16 has columns for 60, 75 and 90 °C, not for ${rated} °C` };
    return ampacityAwg({ material, size: size.size, columnC: rated, ambientC, bundled });
  }
  if (!run.method) return { ok: false, message: 'the installation method is not stated' };
  if (rated !== 70 && rated !== 90)
    return { ok: false, message: `IEC 60364-5-52 has ampacities for 70 and 90 °C, not for ${rated} °C` };
  const lines = run.conductors.filter((c) => c !== 'N').length;
  return ampacityMm2({
    material,
    size: size.size,
    method: run.method,
    insulationC: rated,
    loaded: lines === 3 ? 3 : 2,
    ambientC,
    circuits: bundled,
  });
}

const rowAmpacity = (run: Pick<Run, 'insulation'>, row: ConductorRow): AmpacityOutcome =>
  row.ampacity === null
    ? { ok: false, message: `the row "${row.name}" states no ampacity` }
    : {
        ok: true,
        amps: row.ampacity,
        tableAmps: row.ampacity,
        ambientFactor: 1,
        bundlingFactor: 1,
        ratedC: run.insulation ?? DEFAULT_INSULATION_C.awg,
        referenceC: 30,
      };
