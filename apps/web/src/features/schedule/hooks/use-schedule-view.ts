import { type CircuitView, type PanelView, type ScheduleView, scheduleView } from '@farlug/contract/schedule';
import { useMemo } from 'react';
import { useReplica } from '../../../job/open-job.tsx';

export interface JobSchedule extends ScheduleView {
  circuit(id: string): CircuitView | null;
  panelOf(circuitId: string): PanelView | null;
  /** `LP-2-20, roof deck`: a circuit, or a load that stands in none, by its row. */
  nameOf(key: string): string;
}

/** The schedules of the open job, made anew when a row changes. */
export function useScheduleView(): JobSchedule {
  const { rows } = useReplica();
  return useMemo(() => {
    const view = scheduleView(rows);
    const circuits = new Map(
      view.panels.flatMap((panel) => panel.circuits.map((one) => [one.id, { one, panel }] as const)),
    );
    return {
      ...view,
      circuit: (id) => circuits.get(id)?.one ?? null,
      panelOf: (id) => circuits.get(id)?.panel ?? null,
      nameOf(key) {
        const circuit = circuits.get(key)?.one;
        if (!circuit) return rows.load.get(key)?.name ?? rows.load.get(key)?.code ?? key;
        const serves = circuit.fields.description.text;
        return serves ? `${circuit.code}, ${serves}` : circuit.code;
      },
    };
  }, [rows]);
}
