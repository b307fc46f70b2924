import type { Row } from '../rows/index.ts';
import type { CircuitParts } from './circuit-parts.ts';
import { cumulativeLength } from './distances.ts';
import { racewayFromText } from './words.ts';

/** The fields of a row of the schedule grid; each is text that a person can type back. */
export const CIRCUIT_FIELDS = [
  'spaces',
  'breaker',
  'kind',
  'description',
  'room',
  'loadType',
  'load',
  'powerFactor',
  'demand',
  'continuous',
  'class',
  'starting',
  'material',
  'size',
  'neutral',
  'ground',
  'sets',
  'raceway',
  'length',
  'notes',
] as const;
export type CircuitField = (typeof CIRCUIT_FIELDS)[number];

/** What stands in a field, written so that typing it again changes nothing. */
export function fieldText(parts: CircuitParts, field: CircuitField): string {
  const { circuit, runs, loads } = parts;
  const run = runs[0];
  switch (field) {
    case 'spaces':
      return `${parts.spaces.join(',')}${parts.breakers[0]?.half ?? ''}`;
    case 'breaker':
      return breakerText(parts.breakers);
    case 'kind':
      return circuit.kind;
    case 'description':
    case 'room':
    case 'loadType':
    case 'notes':
      return circuit[field] ?? '';
    case 'load':
      return loads.map(loadText).join(' + ');
    case 'powerFactor':
      return shared(loads, (load) => powerFactorText(load));
    case 'demand':
      return loads.length === 0 && run && circuit.kind !== 'branch'
        ? (run.demand ?? '1')
        : shared(loads, demandText);
    case 'continuous':
      return loads.length === 0 ? '' : shared(loads, (load) => (load.continuous ? 'yes' : 'no'));
    case 'class':
      return shared(loads, (load) => load.class);
    case 'starting':
      return shared(loads, startingText);
    case 'material':
      return run?.material ?? '';
    case 'size':
      return run ? sizeText(run) : '';
    case 'neutral':
      return run ? neutralText(run) : '';
    case 'ground':
      return run?.groundingSize ?? '';
    case 'sets':
      return run ? String(run.sets) : '';
    case 'raceway':
      return run ? racewayText(run) : '';
    case 'length':
      return cumulativeLength(parts);
  }
}

export function breakerText(breakers: readonly Row<'breaker'>[]): string {
  const texts = breakers.map(({ amps, poles }) => `${amps ?? ''}${poles > 1 ? `/${poles}` : ''}`);
  return new Set(texts).size <= 1 ? (texts[0] ?? '') : texts.join(' + ');
}

export function loadText({ size, quantity }: Pick<Row<'load'>, 'size' | 'quantity'>): string {
  if (size === null) return '';
  return quantity === null || quantity === '1' ? size : `${quantity} × ${size}`;
}

const powerFactorText = ({ powerFactor, leading }: Row<'load'>): string =>
  powerFactor === null ? '' : `${powerFactor}${leading ? ' leading' : ''}`;

export function demandText({ demand, demandVa }: Pick<Row<'load'>, 'demand' | 'demandVa'>): string {
  if (demandVa !== null) return `${demandVa} VA`;
  return demand ?? '1';
}

const startingText = ({ startingAmps, startingPowerFactor }: Row<'load'>): string =>
  startingAmps === null ? '' : `${startingAmps} A at ${startingPowerFactor ?? '?'}`;

export function sizeText({ size, ohmsR, ohmsX, ohmsPer }: Row<'run'>): string {
  if (size !== null || ohmsR === null) return size ?? '';
  return `${ohmsR} + j${ohmsX ?? '0'} Ω/${ohmsPer === 'km' ? 'km' : '1000 ft'}`;
}

/** `none`, `same`, or the size of a neutral that differs. */
export function neutralText({ conductors, neutralSize }: Row<'run'>): string {
  return conductors.includes('N') ? (neutralSize ?? 'same') : 'none';
}

/** The raceway as it was typed, where that says what it is made of. */
export function racewayText({ raceway, racewaySize }: Pick<Row<'run'>, 'raceway' | 'racewaySize'>): string {
  if (racewaySize === null) return raceway ?? '';
  if (raceway === null || racewayFromText(racewaySize)?.raceway === raceway) return racewaySize;
  return `${racewaySize} ${raceway}`;
}

/** What all loads of a row have in common; each in turn where they differ. */
function shared(loads: readonly Row<'load'>[], textOf: (load: Row<'load'>) => string): string {
  const texts = loads.map(textOf);
  return new Set(texts).size <= 1 ? (texts[0] ?? '') : texts.join(' + ');
}
