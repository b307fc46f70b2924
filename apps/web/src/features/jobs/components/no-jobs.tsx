import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { paths } from '../../../app/paths.ts';
import { Button, LinkButton } from '../../../ui/button.tsx';
import { EmptyState } from '../../../ui/empty-state.tsx';
import { Message } from '../../../ui/message.tsx';
import { demoJobRows } from '../demo-jobs.ts';
import { useJobActions } from '../hooks/use-job-actions.ts';

/** What to do first, with the demo job as a copy to try everything on. */
export function NoJobs({ firm }: { firm: string }) {
  const navigate = useNavigate();
  const { create } = useJobActions(firm);
  const [busy, setBusy] = useState(false);
  const [refused, setRefused] = useState<string | null>(null);

  const openDemo = async () => {
    setBusy(true);
    const refusal = await copyDemo();
    setBusy(false);
    setRefused(refusal);
  };
  const copyDemo = async (): Promise<string | null> => {
    const rows = await demoJobRows();
    if (rows === null) return 'The demo job cannot be fetched now. Try again in a moment.';
    const outcome = await create(rows);
    if (!outcome.ok) return outcome.error.message;
    navigate(paths.schedule(firm, outcome.data.id));
    return null;
  };

  return (
    <EmptyState
      title="No job yet"
      actions={
        <>
          <LinkButton to={paths.newJob(firm)} look="go" big>
            Start a job
          </LinkButton>
          <LinkButton to={paths.uploadJob(firm)} big>
            Upload a job file
          </LinkButton>
          <Button big aria-disabled={busy || undefined} onClick={() => !busy && void openDemo()}>
            {busy ? 'Copying …' : 'Take the demo job'}
          </Button>
        </>
      }
    >
      <p>
        Start one with its name, service and limits, then enter or upload its panel schedule. To look around
        first, take a copy of the demo job: a workshop of nine panels, some runs of which fall short.
      </p>
      {refused && (
        <Message kind="wrong" className="mt-3">
          {refused}
        </Message>
      )}
    </EmptyState>
  );
}
