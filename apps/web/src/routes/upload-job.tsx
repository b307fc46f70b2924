import { useMembership } from '../features/accounts/hooks/use-membership.ts';
import { UploadJobPage } from '../features/jobs/components/upload-job-page.tsx';

export function Component() {
  return <UploadJobPage firm={useMembership().firmId} />;
}
