import type { Material } from '../job/vocabulary.ts';
import { GROUNDING } from './data/overcurrent.ts';
import { sizeNamed, sizesOf } from './size.ts';

export interface GroundingQuery {
  breakerAmps: number;
  /** Of the equipment grounding conductor. */
  material: Material;
  /** Circular mils of the line conductors that the ampacity floor requires, all sets together. */
  floorCmil: number;
  /** Circular mils of the line conductors installed, all sets together. */
  installedCmil: number;
  /** Circular mils of one line conductor: the grounding conductor is never larger. */
  lineCmil: number;
}
export type GroundingOutcome =
  | { ok: true; size: string; tableSize: string; ratio: number; upsized: boolean }
  | { ok: false; message: string };

/** Table 8 prints areas to four digits: a ratio of two of them is no better than this. */
const AREA_ROUNDING = 5e-4;

/**
 * Equipment grounding conductor of a run, one in each raceway: NEC Table 250.122 by the breaker, increased in the
 * ratio of circular mils by which the line conductors exceed the floor (250.122(B)), next size up, and never above
 * the line conductors (250.122(A)). Refused above 6000 A.
 */
export function groundingConductor(q: GroundingQuery): GroundingOutcome {
  const row = GROUNDING.find((r) => q.breakerAmps <= r.amps);
  if (!row) return { ok: false, message: 'NEC Table 250.122 ends at 6000 A' };
  const tableSize = row[q.material];
  const tableCmil = sizeNamed(tableSize)!.cmil;
  const ratio = Math.max(1, q.installedCmil / q.floorCmil);
  const wanted = Math.min(tableCmil * ratio, Math.max(q.lineCmil, 0));
  const all = sizesOf(q.material, 'awg');
  const size = all.find((s) => s.cmil >= wanted * (1 - AREA_ROUNDING)) ?? all[all.length - 1]!;
  return { ok: true, size: size.size, tableSize, ratio, upsized: size.cmil > tableCmil };
}
