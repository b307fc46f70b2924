import type { Conductor, PanelLayout } from '@farlug/solver/job';
import type { Row } from '../rows/index.ts';

/** Two-column panels number odd on the left and even on the right: a pole further down is two spaces on. */
export const spaceStep = (layout: PanelLayout): number => (layout === 'two-column' ? 2 : 1);

/** The row of a space: the conductor of row i is `lines[(i − 1) mod n]`. */
export const rowOfSpace = (layout: PanelLayout, space: number): number =>
  layout === 'two-column' ? Math.ceil(space / 2) : space;

export function lineOfSpace(panel: Pick<Row<'panel'>, 'layout' | 'lines'>, space: number): Conductor {
  return panel.lines[(rowOfSpace(panel.layout, space) - 1) % panel.lines.length]!;
}

export function spacesOfBreaker(
  layout: PanelLayout,
  breaker: Pick<Row<'breaker'>, 'space' | 'poles'>,
): number[] {
  return Array.from({ length: breaker.poles }, (_, i) => breaker.space + i * spaceStep(layout));
}

const compare = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0);
const inSpaceOrder = (breakers: readonly Row<'breaker'>[]): Row<'breaker'>[] =>
  [...breakers].sort(
    (a, b) => a.space - b.space || compare(a.half ?? '', b.half ?? '') || compare(a.id, b.id),
  );

/** Every space of a circuit's breakers, in the order of the panel. */
export function spacesOfCircuit(layout: PanelLayout, breakers: readonly Row<'breaker'>[]): number[] {
  return inSpaceOrder(breakers).flatMap((breaker) => spacesOfBreaker(layout, breaker));
}

export const firstBreaker = (breakers: readonly Row<'breaker'>[]): Row<'breaker'> | null =>
  inSpaceOrder(breakers).find((breaker) => breaker.amps !== null) ?? inSpaceOrder(breakers)[0] ?? null;

/**
 * Spaces grouped into breakers: neighbours of a column go together, up to `poles` of them (three where unsaid).
 * Spaces that are not neighbours are breakers of their own.
 */
export function breakersOfSpaces(
  layout: PanelLayout,
  spaces: readonly number[],
  poles: number | null,
): { space: number; poles: number }[] {
  const most = poles ?? 3;
  const step = spaceStep(layout);
  const found: { space: number; poles: number }[] = [];
  for (const space of [...new Set(spaces)].sort((a, b) => a - b)) {
    const open = found.find((one) => one.poles < most && one.space + one.poles * step === space);
    if (open) open.poles++;
    else found.push({ space, poles: 1 });
  }
  return found;
}

/** `1,3,5`, `1/3/5`, `1 3 5` or `1-3-5` as spaces; null where the text is anything else. */
export function spacesFromText(text: string): number[] | null {
  const parts = text.trim().split(/\s*[,/;+&-]\s*|\s+/);
  if (!parts.every((part) => /^\d{1,3}$/.test(part))) return null;
  const spaces = parts.map(Number);
  const fits = spaces.every((space) => space >= 1 && space <= 200) && new Set(spaces).size === spaces.length;
  return fits ? spaces : null;
}
