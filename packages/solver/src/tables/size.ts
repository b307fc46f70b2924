import type { Material } from '../job/vocabulary.ts';
import { AWG_DC } from './data/awg-dc.ts';
import { MM2_DC } from './data/mm2-dc.ts';

/** Which table a size belongs to: `awg` covers AWG and kcmil. */
export const SIZE_FAMILIES = ['awg', 'mm2'] as const;
export type SizeFamily = (typeof SIZE_FAMILIES)[number];

export interface ConductorSize {
  /** As written in a job file: `12 AWG`, `3/0 AWG`, `250 kcmil`, `16 mm2`. */
  size: string;
  family: SizeFamily;
  /** Circular mils; for mm² from the nominal area. */
  cmil: number;
  areaMm2: number;
}
export type SizeOutcome = ({ ok: true } & ConductorSize) | { ok: false; message: string };

/** mm² of one circular mil: π/4 of a square of 0.0254 mm (ASTM B258). */
const MM2_PER_CMIL = 5.067074790974977e-4;

const awg = AWG_DC.map(
  (row): ConductorSize => ({
    size: row.size,
    family: 'awg',
    cmil: row.cmil,
    areaMm2: row.cmil * MM2_PER_CMIL,
  }),
);
const mm2 = MM2_DC.map(
  (row): ConductorSize => ({
    size: `${row.areaMm2} mm2`,
    family: 'mm2',
    cmil: row.areaMm2 / MM2_PER_CMIL,
    areaMm2: row.areaMm2,
  }),
);
const bySize = new Map([...awg, ...mm2].map((row) => [row.size, row]));
const aluminumMm2 = new Set(MM2_DC.flatMap((row) => (row.aluminum === null ? [] : [`${row.areaMm2} mm2`])));

/** The table's entry for a size in its canonical form, or `undefined`. */
export const sizeNamed = (size: string): ConductorSize | undefined => bySize.get(size);

/**
 * Every size that the tables hold for a material, thinnest first.
 * `family`: AWG and kcmil (NEC Chapter 9 Table 8) or mm² (IEC 60228 class 2).
 */
export function sizesOf(material: Material, family: SizeFamily): readonly ConductorSize[] {
  if (family === 'awg') return awg;
  return material === 'copper' ? mm2 : mm2.filter((row) => aluminumMm2.has(row.size));
}

const NUMBER = /^(\d+(?:\.\d+)?)$/;

const canonical = (text: string): string | null => {
  const plain = text
    .normalize('NFKC')
    .trim()
    .toLowerCase()
    .replace(/\s+/g, ' ')
    .replace(/^(?:no\.?|#|nr\.?)\s*/, '')
    .replace(/["”]/g, '');
  const metric = /^(\d+(?:[.,]\d+)?)\s*(?:mm2|mm\^2|sq\.? ?mm|sqmm|mmq)$/.exec(plain);
  if (metric) return `${Number(metric[1]!.replace(',', '.'))} mm2`;
  const mils = /^(\d+)\s*(?:kcmil|mcm|kcm)$/.exec(plain);
  if (mils) return `${Number(mils[1])} kcmil`;
  const gauge = plain.replace(/\s*(?:awg|ga|gauge)\.?$/, '').replace(/^#\s*/, '');
  const aught = /^([1-4])\s*\/\s*0$/.exec(gauge);
  if (aught) return `${aught[1]}/0 AWG`;
  if (/^0{2,4}$/.test(gauge)) return `${gauge.length}/0 AWG`;
  const number = NUMBER.exec(gauge);
  if (!number) return null;
  const value = Number(number[1]);
  return value >= 250 && gauge === plain ? `${value} kcmil` : `${value} AWG`;
};

const EXAMPLES = 'such as 12, 3/0, 250 kcmil or 16 mm2';

/**
 * Reads a conductor size as people write it: `12`, `#12`, `12 AWG`, `3/0`, `0000`, `250`, `250 MCM`, `16mm²`.
 * A bare number is a gauge up to 18 and kcmil from 250. Refused: a size that the tables lack.
 */
export function parseSize(text: string): SizeOutcome {
  const size = canonical(text);
  if (!size) return { ok: false, message: `must be a conductor size ${EXAMPLES}; is "${text.trim()}"` };
  const row = bySize.get(size);
  if (row) return { ok: true, ...row };
  const family = size.endsWith('mm2') ? mm2 : awg;
  return { ok: false, message: `must be a size in the tables; ${size} is not, ${nearest(family, size)} are` };
}

const nearest = (family: readonly ConductorSize[], size: string): string => {
  const wanted = Number.parseFloat(size);
  const unit = size.split(' ')[1]!;
  const same = family.filter((row) => row.size.endsWith(unit) && !row.size.includes('/'));
  const sorted = [...same].sort(
    (a, b) => Math.abs(Number.parseFloat(a.size) - wanted) - Math.abs(Number.parseFloat(b.size) - wanted),
  );
  return sorted
    .slice(0, 2)
    .sort((a, b) => a.areaMm2 - b.areaMm2)
    .map((row) => row.size)
    .join(' and ');
};
