import type { CircuitView, PanelView } from '@farlug/contract/schedule';

export interface MissingCircuit {
  circuit: CircuitView;
  panelId: string;
}

/** The circuits that still lack something, in the order of the schedule. */
export function missingCircuits(panels: readonly PanelView[]): MissingCircuit[] {
  return panels.flatMap((panel) =>
    panel.circuits.flatMap((circuit) => (circuit.next ? [{ circuit, panelId: panel.id }] : [])),
  );
}

/**
 * The one to fill in next: after the chosen circuit, else in the open panel, else the first of the job; lengths
 * before all else.
 */
export function nextMissing(
  missing: readonly MissingCircuit[],
  chosenId: string | null,
  panelId: string | null,
): MissingCircuit | null {
  const lengths = missing.filter(({ circuit }) => circuit.next?.field === 'length');
  const wanted = lengths.length > 0 ? lengths : missing;
  const chosen = wanted.findIndex(({ circuit }) => circuit.id === chosenId);
  if (chosen >= 0) return wanted[(chosen + 1) % wanted.length]!;
  return wanted.find((one) => one.panelId === panelId) ?? wanted[0] ?? null;
}
