import { useMembership } from '../features/accounts/hooks/use-membership.ts';
import { JobsPage } from '../features/jobs/components/jobs-page.tsx';
import { BriefCautions } from './brief-cautions.tsx';

export function Component() {
  const { firmId, membership } = useMembership();
  return <JobsPage firm={firmId} firmName={membership.firmName} cautions={<BriefCautions />} />;
}
