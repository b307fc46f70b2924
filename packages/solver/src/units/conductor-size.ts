import type { Material } from '../job/vocabulary.ts';
import type { SizeFamily } from '../tables/size.ts';
import { parseSize } from '../tables/size.ts';
import { tidy } from './number.ts';

export type ConductorSizeOutcome =
  | {
      ok: true;
      size: string;
      family: SizeFamily;
      /** Parallel sets, 1 where none are written. */
      sets: number;
      /** `null` where the text names no metal. */
      material: Material | null;
      /** Canonical: `2 sets 3/0 AWG`, `12 AWG`. */
      text: string;
    }
  | { ok: false; message: string };

const MAX_SETS = 50;
const SETS = [
  /^(\d+) ?(?:sets?|runs?|parallel)(?: of)? (.+)$/i,
  /^\((\d+)\) ?(?:sets? (?:of )?)?(.+)$/i,
  /^(\d+) ?[x×*] ?(.+)$/i,
];
const METALS: readonly [RegExp, Material][] = [
  [/[ -]?\b(?:cu|copper)\b\.?/i, 'copper'],
  [/[ -]?\b(?:al|aluminum|aluminium|alum)\b\.?/i, 'aluminum'],
];
/** Insulation types of NEC Table 310.4(1), which schedules write beside the size. */
const INSULATION = /[ ,]+(?:thhn|thwn|thw|xhhw|rhh|rhw|use|tw|uf)(?:-2)?(?:\/(?:thhn|thwn|thw)(?:-2)?)?\b/gi;

/**
 * Reads a conductor size with what schedules write around it: `12`, `#12 Cu`, `2 sets 3/0`, `(2) 250 kcmil`,
 * `2 x 3/0 AL`, `10 THHN`, `16mm²`. The size itself is read by `parseSize` of the tables.
 */
export function parseConductorSize(text: string): ConductorSizeOutcome {
  let rest = tidy(text).replace(INSULATION, '');
  let material: Material | null = null;
  for (const [pattern, metal] of METALS) {
    if (!pattern.test(rest)) continue;
    material = metal;
    rest = rest.replace(pattern, '').trim();
  }
  const parallel = SETS.map((form) => form.exec(rest)).find((match) => match !== null);
  const sets = parallel ? Number(parallel[1]) : 1;
  if (sets < 1 || sets > MAX_SETS)
    return { ok: false, message: `must have 1 to ${MAX_SETS} sets; has ${sets}` };
  const size = parseSize(parallel ? parallel[2]! : rest);
  if (!size.ok) return size;
  const written = sets === 1 ? size.size : `${sets} sets ${size.size}`;
  return { ok: true, size: size.size, family: size.family, sets, material, text: written };
}
