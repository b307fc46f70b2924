import { spaceStep, spacesOfBreaker } from '../job/index.ts';
import type { JobRows, Row } from '../rows/index.ts';

/** The spaces of a panel that breakers other than those of `exceptCircuitId` hold. */
export function takenSpaces(rows: JobRows, panelId: string, exceptCircuitId?: string): Set<number> {
  const panel = rows.panel.get(panelId)!;
  const taken = new Set<number>();
  for (const breaker of rows.breaker.values()) {
    if (breaker.circuitId === exceptCircuitId) continue;
    if (rows.circuit.get(breaker.circuitId)?.panelId !== panelId) continue;
    for (const space of spacesOfBreaker(panel.layout, breaker)) taken.add(space);
  }
  return taken;
}

/** The first space from which `poles` spaces of a column are free; null in a full panel. */
export function firstOpenSpace(rows: JobRows, panel: Row<'panel'>, poles: number): number | null {
  const taken = takenSpaces(rows, panel.id);
  const step = spaceStep(panel.layout);
  const starts = Array.from({ length: panel.spaces }, (_, i) => i + 1);
  const inRowOrder =
    panel.layout === 'three-phase-ways' && poles === 3 ? starts.filter((space) => space % 3 === 1) : starts;
  const fits = (start: number) =>
    Array.from({ length: poles }, (_, i) => start + i * step).every(
      (space) => space <= panel.spaces && !taken.has(space),
    );
  return inRowOrder.find(fits) ?? null;
}
