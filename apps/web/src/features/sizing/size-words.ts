import type { Material } from '@farlug/solver/job';
import { NEAR_SHARE, type ShownVerdict } from '@farlug/solver/judge';
import { formatNumber, formatSize } from '@farlug/solver/units';
import type { SizeFigures } from '../../workers/answer-sizes.ts';

const METAL: Record<Material, string> = { copper: 'Cu', aluminum: 'Al' };

/** `2 × 3/0 AWG Cu`. */
export const sizeText = ({ size, sets, material }: Pick<SizeFigures, 'size' | 'sets' | 'material'>): string =>
  `${sets > 1 ? `${sets} × ` : ''}${formatSize(size)} ${METAL[material]}`;

/** `12 Cu`: in narrow places, where AWG goes without saying. */
export const shortSizeText = (size: Pick<SizeFigures, 'size' | 'sets' | 'material'>): string =>
  sizeText(size).replace(' AWG', '');

/** `135 ft`, `any`, `none`: how long the run may be in this size. */
export function passesTo({ longest }: SizeFigures, lengthUnit: string): string {
  if (!longest) return '';
  if (longest.kind === 'up-to') return `${formatNumber(longest.length, 0)} ${lengthUnit}`;
  return longest.kind === 'any' ? 'any length' : 'no length';
}

export const ampacityText = ({ floor }: SizeFigures): string =>
  floor.status === 'not-checked'
    ? 'not checked'
    : `${formatNumber(floor.ampacityAmps, 0)} A${floor.status === 'below' ? ', below' : ''}`;

export const groundingText = ({ grounding, material }: SizeFigures): string =>
  grounding.ok ? shortSizeText({ size: grounding.size, sets: 1, material }) : '';

/** The verdict of everything beyond, with near where the worst load's total is. */
export function shownVerdict({ verdict, worst }: SizeFigures): ShownVerdict {
  if (verdict !== 'within' || !worst?.limitPercent) return verdict;
  return worst.totalPercent >= NEAR_SHARE * worst.limitPercent ? 'near' : verdict;
}
