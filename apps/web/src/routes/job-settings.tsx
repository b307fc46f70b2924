import { LIMIT_PRESETS } from '@farlug/contract/presets';
import { useMembership } from '../features/accounts/hooks/use-membership.ts';
import { useFirm } from '../features/firm/hooks/use-firm.ts';
import { JobSettingsPage } from '../features/jobs/components/job-settings-page.tsx';
import { useOpenJob, useReplica } from '../job/open-job.tsx';

export function Component() {
  const { firmId } = useMembership();
  const firm = useFirm(firmId);
  const { archived, replica } = useOpenJob();
  const { rows } = useReplica();
  return (
    <JobSettingsPage
      rows={rows}
      presets={[...(firm.data?.presets ?? []), ...LIMIT_PRESETS]}
      archived={archived}
      apply={(edit) => replica.apply(edit)}
    />
  );
}
