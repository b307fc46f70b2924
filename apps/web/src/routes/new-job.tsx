import { LIMIT_PRESETS } from '@farlug/contract/presets';
import { useMembership } from '../features/accounts/hooks/use-membership.ts';
import { useFirm } from '../features/firm/hooks/use-firm.ts';
import { NewJobPage } from '../features/jobs/components/new-job-page.tsx';
import { ErrorState } from '../ui/error-state.tsx';
import { Skeleton } from '../ui/skeleton.tsx';

export function Component() {
  const { firmId } = useMembership();
  const firm = useFirm(firmId);
  if (firm.isPending) return <Skeleton label="Opening the form" rows={12} />;
  if (firm.isError)
    return (
      <ErrorState title="The firm’s presets could not be fetched" onRetry={() => void firm.refetch()}>
        {firm.error.message}
      </ErrorState>
    );
  return (
    <NewJobPage firm={firmId} units={firm.data.settings} presets={[...firm.data.presets, ...LIMIT_PRESETS]} />
  );
}
