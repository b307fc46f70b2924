import { appendFileSync, mkdirSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, expect } from 'vitest';

/**
 * What each comparison allows and the largest difference that it saw. Every test file that compares leaves its lines in
 * `.data/test-logs/tolerances`; `FARLUG_LEDGER=FILE` adds to a file those that could be ten times tighter.
 */
interface Entry {
  tolerance: number;
  /** The largest difference as a share of its tolerance, with both. */
  share: number;
  difference: number;
  count: number;
  /** The tolerance is half a digit of what the source prints: no narrower one means anything. */
  printed: boolean;
}
const entries = new Map<string, Entry>();
const FOLDER = fileURLToPath(new URL('../../../../.data/test-logs/tolerances/', import.meta.url));
const LOOSE = 1 / 10;

/** Notes a difference beside what is allowed of it. */
export const note = (name: string, difference: number, tolerance: number, printed = false): void => {
  const entry = entries.get(name) ?? { tolerance, share: -1, difference, count: 0, printed };
  entry.count++;
  const share = difference / tolerance;
  if (share > entry.share) Object.assign(entry, { share, difference, tolerance });
  entries.set(name, entry);
};

declare module 'vitest' {
  // biome-ignore lint/suspicious/noExplicitAny: as vitest declares it
  interface Matchers<T = any> {
    /** A difference, taken without its sign, is at most `tolerance`; both are noted under `name`. */
    toBeWithin: (tolerance: number, name: string) => T;
  }
}

expect.extend({
  toBeWithin(difference: number, tolerance: number, name: string) {
    note(name, Math.abs(difference), tolerance);
    return {
      pass: Math.abs(difference) <= tolerance,
      message: () => `${name}: ${difference} off, ${tolerance} allowed`,
    };
  },
});

/** Notes a difference beside the precision that its source prints. */
export const notePrinted = (name: string, difference: number, tolerance: number): void =>
  note(name, Math.abs(difference), tolerance, true);

const line = (name: string, { tolerance, share, difference, count, printed }: Entry): string => {
  const room = share > 0 ? `${(1 / share).toPrecision(2)} times as wide as needed` : 'no difference';
  const why = printed ? ' (half a digit as printed)' : '';
  const seen = `${difference.toExponential(1)} seen in ${count}`;
  return `${name}: ${tolerance.toExponential(1)} allowed${why}, ${seen}, ${room}\n`;
};

afterAll(() => {
  if (entries.size === 0) return;
  const file = path.basename(expect.getState().testPath ?? 'unknown').replace(/\.test\.ts$/, '');
  mkdirSync(FOLDER, { recursive: true });
  const all = [...entries];
  writeFileSync(path.join(FOLDER, `${file}.txt`), all.map(([name, entry]) => line(name, entry)).join(''));
  const wanted = process.env.FARLUG_LEDGER;
  const loose = all.filter(([, { share, printed }]) => !printed && share < LOOSE);
  if (wanted) appendFileSync(wanted, loose.map(([name, entry]) => `${file}: ${line(name, entry)}`).join(''));
});
