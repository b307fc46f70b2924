import { Decimal } from 'decimal.js';
import { splitQuantity } from '../job/index.ts';
import { isChain } from './circuit-form.ts';
import type { CircuitParts } from './circuit-parts.ts';

/**
 * Lengths of a row as they are typed: one length, or for a chain of segments the distances from the panel in
 * turn, `40, 62, 85 ft`. Other shapes show the length of the home run.
 */
export function cumulativeLength(parts: CircuitParts): string {
  const lengths = parts.runs.map((run) => run.length);
  if (lengths.length === 0) return '';
  if (lengths.length === 1 || !isChain(parts)) return lengths[0] ?? '';
  if (lengths.includes(null)) return '';
  const units = new Set(lengths.map((length) => splitQuantity(length!).unit));
  if (units.size > 1) return lengths.join(' + ');
  let sum = new Decimal(0);
  const distances = lengths.map((length) => {
    sum = sum.plus(splitQuantity(length!).number);
    return sum.toFixed();
  });
  return `${distances.join(', ')} ${[...units][0]}`;
}
