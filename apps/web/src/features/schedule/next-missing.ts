import type { CircuitView, PanelView } from '@farlug/contract/schedule';

export interface Missing {
  panelId: string;
  circuit: CircuitView;
}

/** Circuits with something still to be filled in, in the order of the schedule. */
export const missingIn = (panels: readonly PanelView[]): Missing[] =>
  panels.flatMap((panel) =>
    panel.circuits.flatMap((circuit) => (circuit.next ? [{ panelId: panel.id, circuit }] : [])),
  );

/** The one after the chosen circuit, from the top again after the last. */
export function nextMissing(panels: readonly PanelView[], chosenId: string | null): Missing | null {
  const list = missingIn(panels);
  const order = panels.flatMap((panel) => panel.circuits.map((circuit) => circuit.id));
  const at = chosenId === null ? -1 : order.indexOf(chosenId);
  return list.find(({ circuit }) => order.indexOf(circuit.id) > at) ?? list[0] ?? null;
}
