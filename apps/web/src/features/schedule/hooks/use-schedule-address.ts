import { useMemo } from 'react';
import { useSearchParams } from 'react-router-dom';
import type { JobSchedule } from './use-schedule-view.ts';

export const SCHEDULE_VIEWS = ['results', 'fields', 'loads', 'runs'] as const;
export type ScheduleView = (typeof SCHEDULE_VIEWS)[number];

interface Place {
  panel?: string | null;
  circuit?: string | null;
  view?: ScheduleView;
}

export interface ScheduleAddress {
  /** The panel that is shown: the one named, that of the chosen circuit, or the first. */
  panelId: string | null;
  circuitId: string | null;
  view: ScheduleView;
  /** The address of another place of the schedule, with what else is chosen kept. */
  to: (place: Place) => string;
  go: (place: Place) => void;
}

/** Panel, chosen circuit and view stand in the address. */
export function useScheduleAddress(schedule: JobSchedule): ScheduleAddress {
  const [params, setParams] = useSearchParams();
  return useMemo(() => {
    const named = params.get('circuit');
    const circuitId = named !== null && schedule.circuit(named) ? named : null;
    const known = (id: string | null) => schedule.panels.find((panel) => panel.id === id)?.id ?? null;
    const own = circuitId === null ? null : (schedule.panelOf(circuitId)?.id ?? null);
    const panelId = own ?? known(params.get('panel')) ?? schedule.panels[0]?.id ?? null;
    const view = SCHEDULE_VIEWS.find((one) => one === params.get('view')) ?? 'results';
    const at = (place: Place) => {
      const next = new URLSearchParams(params);
      const set = (key: string, value: string | null | undefined) => {
        if (value) next.set(key, value);
        else next.delete(key);
      };
      if (place.panel !== undefined) {
        set('panel', place.panel);
        next.delete('circuit');
      }
      if (place.circuit !== undefined) {
        set('circuit', place.circuit);
        set('panel', schedule.panelOf(place.circuit ?? '')?.id ?? next.get('panel'));
      }
      if (place.view !== undefined) set('view', place.view === 'results' ? null : place.view);
      return next;
    };
    return {
      panelId,
      circuitId,
      view,
      to: (place) => `?${at(place)}`,
      go: (place) => setParams(at(place), { replace: true, preventScrollReset: true }),
    };
  }, [params, setParams, schedule]);
}
