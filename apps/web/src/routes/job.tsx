import { Outlet, useParams } from 'react-router-dom';
import { paths } from '../app/paths.ts';
import { useMembership } from '../features/accounts/hooks/use-membership.ts';
import { JobTitleBlock } from '../features/schedule/components/job-title-block.tsx';
import { SavedState } from '../features/schedule/components/saved-state.tsx';
import { OpenJob, useReplica } from '../job/open-job.tsx';
import { useResult } from '../job/use-result.ts';
import { LinkButton } from '../ui/button.tsx';
import { InSaved } from '../ui/slot.tsx';

/** One job and everything in it: one replica, one solver, one title block. */
export function Component() {
  const { job = '' } = useParams();
  const { firmId, mayIssue } = useMembership();
  return (
    <OpenJob key={job} firm={firmId} job={job}>
      <InSaved>
        <SavedState />
      </InSaved>
      <Heading reports={mayIssue ? paths.reports(firmId, job) : null} />
      <Outlet />
    </OpenJob>
  );
}

function Heading({ reports }: { reports: string | null }) {
  const { rows } = useReplica();
  const { result } = useResult();
  const worst = result?.worst;
  const circuit = worst?.circuitId ? rows.circuit.get(worst.circuitId) : undefined;
  const name = worst ? [worst.worst.id, circuit?.description].filter(Boolean).join(', ') : null;
  return (
    <JobTitleBlock
      rows={rows}
      worstName={name}
      action={
        reports && (
          <LinkButton to={reports} look="line">
            Issue report
          </LinkButton>
        )
      }
    />
  );
}
