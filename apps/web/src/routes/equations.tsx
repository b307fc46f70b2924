import { EquationsPlace } from '../features/equations/components/equations-place.tsx';
import { HandCheckList } from '../features/sizing/components/hand-check-panel.tsx';
import { BriefCautions } from './brief-cautions.tsx';

export function Component() {
  return (
    <EquationsPlace cautions={<BriefCautions />} handCheckFor={(runs) => <HandCheckList runs={runs} />} />
  );
}
