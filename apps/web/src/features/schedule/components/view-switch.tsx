import { Segmented } from '../../../ui/segmented.tsx';
import { DESK, useMedia } from '../../../ui/use-media.ts';
import type { ScheduleView } from '../hooks/use-schedule-address.ts';

interface ViewSwitchProps {
  view: ScheduleView;
  onView: (view: ScheduleView) => void;
}

const WHOLE = { value: 'loads', label: 'Worst first' } as const;
const ON_DESK = [
  { value: 'results', label: 'Results' },
  { value: 'fields', label: 'All fields' },
  WHOLE,
] as const;
const ON_PHONE = [{ value: 'results', label: 'Circuits' }, WHOLE] as const;

/** One panel with its results or all of its fields, or the whole job worst first. */
export function ViewSwitch({ view, onView }: ViewSwitchProps) {
  const desk = useMedia(DESK);
  const main = view === 'runs' ? 'loads' : view;
  return (
    <Segmented<ScheduleView>
      label="What is shown"
      value={desk || main !== 'fields' ? main : 'results'}
      onValue={onView}
      choices={desk ? ON_DESK : ON_PHONE}
    />
  );
}
