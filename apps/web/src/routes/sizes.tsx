import { HandCheckPanel } from '../features/sizing/components/hand-check-panel.tsx';
import { SizesPlace } from '../features/sizing/components/sizes-place.tsx';
import { BriefCautions } from './brief-cautions.tsx';

export function Component() {
  return <SizesPlace cautions={<BriefCautions />} handCheckFor={(run) => <HandCheckPanel run={run} />} />;
}
