import { tidy } from './number.ts';

export type BreakerOutcome =
  | { ok: true; amps: number; poles: 1 | 2 | 3; text: string }
  | { ok: false; message: string };

const EXAMPLES = '20, 20/2, 20A/2P, 3P-100 or B16';
const AMPS = '(\\d+(?:\\.\\d+)?) ?(?:a|amp|amps|at)?';
const POLES = '([123]) ?-?(?:p|pole|poles)';
const FORMS: readonly { form: RegExp; amps: number; poles: number }[] = [
  { form: new RegExp(`^${AMPS}$`), amps: 1, poles: 0 },
  { form: new RegExp(`^${AMPS} ?[/-] ?([123])$`), amps: 1, poles: 2 },
  { form: new RegExp(`^${AMPS} ?[/,x-]? ?${POLES}$`), amps: 1, poles: 2 },
  { form: new RegExp(`^${POLES} ?[/,x-]? ?${AMPS}$`), amps: 2, poles: 1 },
];
/** Curve letters of IEC 60898-1 (B, C, D) and IEC 60947-2 (K, Z): read past, the curve is not kept. */
const CURVE = /\b([bcdkz]) ?(?=\d)/;

/**
 * Reads a breaker: amperes and poles, as `20`, `20A`, `20/2`, `20A/2P`, `2P-30`, `3P 100A`, `B16`, `C20/2P`.
 * Where the poles are not written, `defaultPoles` (what the row already says) holds.
 */
export function parseBreaker(text: string, defaultPoles: 1 | 2 | 3 = 1): BreakerOutcome {
  const typed = tidy(text).toLowerCase().replace(CURVE, '');
  for (const { form, amps, poles } of FORMS) {
    const match = form.exec(typed);
    if (!match) continue;
    const rating = Number(match[amps]);
    const count = (poles === 0 ? defaultPoles : Number(match[poles])) as 1 | 2 | 3;
    if (rating <= 0 || rating > 10_000)
      return { ok: false, message: 'must be above 0 A and at most 10,000 A' };
    return { ok: true, amps: rating, poles: count, text: `${rating}/${count}` };
  }
  return { ok: false, message: `must be a breaker such as ${EXAMPLES}; is "${text.trim()}"` };
}
