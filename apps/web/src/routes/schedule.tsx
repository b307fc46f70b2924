import { SchedulePlace } from '../features/schedule/components/schedule-place.tsx';
import { HandCheckPanel } from '../features/sizing/components/hand-check-panel.tsx';
import { SizesPanel } from '../features/sizing/components/sizes-panel.tsx';
import { BriefCautions } from './brief-cautions.tsx';

export function Component() {
  return (
    <SchedulePlace
      cautions={<BriefCautions />}
      sizesFor={(run) => <SizesPanel run={run} />}
      handCheckFor={(run) => <HandCheckPanel run={run} />}
    />
  );
}
