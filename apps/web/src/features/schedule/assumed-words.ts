import type { Assumed } from '@farlug/contract/job';
import type { PanelView } from '@farlug/contract/schedule';
import { formatCount } from '../../lib/format.ts';

const WORDS: readonly (readonly [Assumed['field'], string])[] = [
  ['size', 'load'],
  ['powerFactor', 'power factor'],
  ['length', 'length'],
  ['raceway', 'raceway'],
];

/** `7 loads, 21 power factors, 2 lengths`: what a panel's results stand on without anybody having stated it. */
export function assumedWords(assumed: readonly Assumed[], panel: PanelView): string | null {
  const own = new Set(panel.circuits.map((circuit) => circuit.id));
  const here = assumed.filter(({ circuitId }) => circuitId !== null && own.has(circuitId));
  const counts = WORDS.flatMap(([field, word]) => {
    const count = here.filter((one) => one.field === field).length;
    return count > 0 ? [formatCount(count, word)] : [];
  });
  return counts.length > 0 ? counts.join(', ') : null;
}
