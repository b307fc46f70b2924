import { useCallback } from 'react';
import { useSearchParams } from 'react-router-dom';

export const SCHEDULE_VIEWS = ['results', 'fields', 'loads', 'runs'] as const;
export type ScheduleViewName = (typeof SCHEDULE_VIEWS)[number];

interface Selection {
  panel: string | null;
  circuit: string | null;
  view: ScheduleViewName;
}

const isView = (text: string | null): text is ScheduleViewName =>
  (SCHEDULE_VIEWS as readonly string[]).includes(text ?? '');

/** What is chosen in the schedule stands in the address, so that back, reload and a sent link show the same. */
export function useSelection(): [Selection, (change: Partial<Selection>) => void] {
  const [params, setParams] = useSearchParams();
  const view = params.get('view');
  const select = useCallback(
    (change: Partial<Selection>) =>
      setParams(
        (before) => {
          const after = new URLSearchParams(before);
          for (const [key, value] of Object.entries(change))
            if (value === null || value === 'results') after.delete(key);
            else after.set(key, value);
          return after;
        },
        { replace: true },
      ),
    [setParams],
  );
  return [
    { panel: params.get('panel'), circuit: params.get('circuit'), view: isView(view) ? view : 'results' },
    select,
  ];
}
