import type { InstallationMethod, Material } from '../job/vocabulary.ts';
import { AWG_AMPACITY } from './data/awg-ampacity.ts';
import { AWG_AMBIENT, AWG_BUNDLING } from './data/awg-factors.ts';
import { MM2_AMPACITY, MM2_METHODS } from './data/mm2-ampacity.ts';
import type { AmbientRow } from './data/mm2-factors.ts';
import { MM2_AMBIENT_AIR, MM2_AMBIENT_GROUND, MM2_GROUPING } from './data/mm2-factors.ts';
import { sizeNamed } from './size.ts';

export const AWG_COLUMNS = [60, 75, 90] as const;
export type AwgColumn = (typeof AWG_COLUMNS)[number];

export type AmpacityOutcome =
  | {
      ok: true;
      /** Table value times both factors, amperes of one conductor. */
      amps: number;
      /** Table value at its reference ambient. */
      tableAmps: number;
      ambientFactor: number;
      bundlingFactor: number;
      /** Rated temperature of the column, and the ambient that the table holds for, °C. */
      ratedC: number;
      referenceC: number;
    }
  | { ok: false; message: string };

export interface AwgAmpacityQuery {
  material: Material;
  size: string;
  /** Column of Table 310.16: the rated temperature of terminals or insulation. */
  columnC: AwgColumn;
  /** °C; absent: 30, the table's own. */
  ambientC?: number | null;
  /** Current-carrying conductors together in the raceway; absent: three, the table's own. */
  bundled?: number | null;
}

const awgRows = new Map(AWG_AMPACITY.map((row) => [row.size, row]));
const REFERENCE_AIR_C = 30;
const REFERENCE_GROUND_C = 20;

/**
 * Ampacity of one AWG or kcmil conductor: NEC Table 310.16 × 310.15(B)(1)(1) × 310.15(C)(1).
 * Refused: a size or column that the table leaves empty, an ambient beyond the column.
 */
export function ampacityAwg(q: AwgAmpacityQuery): AmpacityOutcome {
  const column = AWG_COLUMNS.indexOf(q.columnC);
  const tableAmps = awgRows.get(q.size)?.[q.material][column];
  if (tableAmps === null || tableAmps === undefined)
    return { ok: false, message: `Table 310.16 has no ${q.material} ${q.size} at ${q.columnC} °C` };
  const ambientC = q.ambientC ?? REFERENCE_AIR_C;
  const ambientFactor = AWG_AMBIENT.find((row) => ambientC <= row.maxC)?.factors[column] ?? null;
  if (ambientFactor === null)
    return { ok: false, message: `an ambient of ${ambientC} °C is beyond the ${q.columnC} °C column` };
  const bundled = q.bundled ?? 3;
  const bundlingFactor = AWG_BUNDLING.find((row) => row.max === null || bundled <= row.max)!.factor;
  return {
    ok: true,
    amps: tableAmps * ambientFactor * bundlingFactor,
    tableAmps,
    ambientFactor,
    bundlingFactor,
    ratedC: q.columnC,
    referenceC: REFERENCE_AIR_C,
  };
}

export interface Mm2AmpacityQuery {
  material: Material;
  size: string;
  method: InstallationMethod;
  insulationC: 70 | 90;
  /** Conductors that carry current: two, or three of a three-phase circuit. */
  loaded: 2 | 3;
  /** °C of the air, or of the ground for D1 and D2; absent: the table's own, 30 or 20. */
  ambientC?: number | null;
  /** Circuits bunched together; absent: one. */
  circuits?: number | null;
}

/**
 * Ampacity of one mm² conductor: IEC 60364-5-52 Tables B.52.2 to B.52.5 × B.52.14 or B.52.15 × B.52.17 item 1.
 * Between listed ambients and numbers of circuits the next less favourable one serves.
 * Refused: methods E, F and G and sizes that the tables do not hold.
 */
export function ampacityMm2(q: Mm2AmpacityQuery): AmpacityOutcome {
  const method = (MM2_METHODS as readonly string[]).indexOf(q.method);
  if (method < 0) return { ok: false, message: `no ampacities are held for installation method ${q.method}` };
  const table = MM2_AMPACITY.find(
    (t) => t.material === q.material && t.insulationC === q.insulationC && t.loaded === q.loaded,
  )!;
  const areaMm2 = sizeNamed(q.size)?.areaMm2;
  const tableAmps = table.rows.find((row) => row[0] === areaMm2)?.[method + 1];
  if (tableAmps === null || tableAmps === undefined)
    return { ok: false, message: `Table ${table.table} has no ${q.material} ${q.size}, method ${q.method}` };
  const inGround = q.method === 'D1' || q.method === 'D2';
  const referenceC = inGround ? REFERENCE_GROUND_C : REFERENCE_AIR_C;
  const ambientC = q.ambientC ?? referenceC;
  const ambientFactor = ambientOf(inGround ? MM2_AMBIENT_GROUND : MM2_AMBIENT_AIR, ambientC, q.insulationC);
  if (ambientFactor === null)
    return { ok: false, message: `an ambient of ${ambientC} °C is beyond ${q.insulationC} °C insulation` };
  const circuits = q.circuits ?? 1;
  const grouping = MM2_GROUPING.find(([listed]) => circuits <= listed);
  if (!grouping) return { ok: false, message: `Table B.52.17 ends at 20 circuits; ${circuits} are stated` };
  return {
    ok: true,
    amps: tableAmps * ambientFactor * grouping[1],
    tableAmps,
    ambientFactor,
    bundlingFactor: grouping[1],
    ratedC: q.insulationC,
    referenceC,
  };
}

const ambientOf = (rows: readonly AmbientRow[], ambientC: number, insulationC: 70 | 90): number | null => {
  const row = rows.find(([listed]) => ambientC <= listed);
  return row ? row[insulationC === 70 ? 1 : 2] : null;
};
