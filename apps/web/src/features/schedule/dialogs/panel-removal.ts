import type { JobRows } from '@farlug/contract/rows';
import { scheduleView } from '@farlug/contract/schedule';
import { formatCount } from '../../../lib/format.ts';

/** What goes with a panel, and what stays without a feed, in words. */
export function whatGoesWith(rows: JobRows, panelId: string): { goes: string[]; stays: string[] } {
  const { panels } = scheduleView(rows);
  const panel = panels.find((one) => one.id === panelId);
  if (!panel) return { goes: [], stays: [] };
  const circuits = panel.circuits.filter((one) => one.circuit.kind === 'branch').length;
  const loads = panel.circuits.reduce((sum, one) => sum + one.loads.length, 0);
  const runs = (panel.fedFrom?.runIds ?? []).flatMap((id) => rows.run.get(id)?.code ?? []);
  const transformers = (panel.fedFrom?.transformerIds ?? []).flatMap(
    (id) => rows.transformer.get(id)?.code ?? [],
  );
  const readings = [...rows.reading.values()].filter((one) => one.busId === panel.panel.busId).length;
  const goes = [
    formatCount(circuits, 'circuit'),
    formatCount(loads, 'load'),
    ...(runs.length > 0 ? [`${runs.length === 1 ? 'its feeder' : 'the runs'} ${runs.join(', ')}`] : []),
    ...transformers.map((code) => `transformer ${code}`),
    ...(panel.fedFrom?.panelId && panel.fedFromText ? [`the breaker ${panel.fedFromText}`] : []),
    ...(readings > 0 ? [formatCount(readings, 'reading')] : []),
  ];
  return { goes, stays: panel.childIds.map((id) => panels.find((one) => one.id === id)!.code) };
}
