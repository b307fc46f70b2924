import { SchedulePlace } from '../features/schedule/components/schedule-place.tsx';
import { BriefCautions } from './brief-cautions.tsx';

export function Component() {
  return <SchedulePlace cautions={<BriefCautions />} />;
}
