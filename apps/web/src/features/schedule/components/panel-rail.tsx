import { RailTree } from '../../../ui/rail.tsx';
import { InRail } from '../../../ui/slot.tsx';
import type { JobResult } from '../../../workers/results.ts';
import type { JobSchedule } from '../hooks/use-schedule-view.ts';
import { panelTreeItems } from '../panel-tree-items.ts';

interface PanelRailProps {
  schedule: JobSchedule;
  result: JobResult | null;
  current: string | null;
  to: (panelId: string) => string;
}

export function PanelRail({ schedule, result, current, to }: PanelRailProps) {
  return (
    <InRail>
      <RailTree title="Panels" items={panelTreeItems(schedule.panels, result, current, to)} />
    </InRail>
  );
}
