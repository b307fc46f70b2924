import { type ReactNode, useState } from 'react';
import { formatCount } from '../../../lib/format.ts';
import { revisionLetter } from '../../../lib/revision-letter.ts';
import { Button } from '../../../ui/button.tsx';
import { EmptyState } from '../../../ui/empty-state.tsx';
import { ErrorState } from '../../../ui/error-state.tsx';
import { Message } from '../../../ui/message.tsx';
import { PageHeading } from '../../../ui/page-heading.tsx';
import { Scroller } from '../../../ui/scroller.tsx';
import { Skeleton } from '../../../ui/skeleton.tsx';
import { useReportActions } from '../hooks/use-report-actions.ts';
import { useRevisions } from '../hooks/use-revisions.ts';
import type { JobStanding } from '../job-standing.ts';
import { Blockers } from './blockers.tsx';
import { IssueDialog } from './issue-dialog.tsx';
import { RevisionPlate } from './revision-plate.tsx';

interface ReportsPageProps {
  firm: string;
  job: string;
  standing: JobStanding;
  mayIssue: boolean;
  cautions: ReactNode;
}

export function ReportsPage({ firm, job, standing, mayIssue, cautions }: ReportsPageProps) {
  const revisions = useRevisions(firm, job);
  const actions = useReportActions(firm, job);
  const [asking, setAsking] = useState(false);
  const [issued, setIssued] = useState<number | null>(null);
  const list = revisions.data?.revisions ?? [];
  const newest = list[0];
  const blocked = standing.leftOut.length > 0 || standing.unsolvable !== null || standing.archived;
  return (
    <>
      <PageHeading
        title="Reports"
        detail={
          newest
            ? `${formatCount(list.length, 'revision')}. Revision ${revisionLetter(newest.no)} was issued from change ${newest.seq}; the job is at change ${standing.seq}.`
            : `Nothing issued yet. The job is at change ${standing.seq}.`
        }
        actions={
          mayIssue && (
            <Button look="go" disabled={blocked} onClick={() => setAsking(true)}>
              Issue a report
            </Button>
          )
        }
      />
      <Scroller label="Reports" className="min-h-0 flex-1 overflow-auto border-t border-ink">
        {!mayIssue && (
          <Message kind="note" className="m-4">
            An estimator reads reports; a contractor or an administrator issues them.
          </Message>
        )}
        <Blockers standing={standing} />
        {issued !== null && (
          <Message kind="done" className="m-4">
            Revision {revisionLetter(issued)} is issued. Its PDF is made now; then send it to the inspector.
          </Message>
        )}
        {revisions.isPending ? (
          <Skeleton label="Fetching the revisions" />
        ) : revisions.isError ? (
          <ErrorState title="The revisions could not be fetched" onRetry={() => void revisions.refetch()}>
            {revisions.error.message}
          </ErrorState>
        ) : list.length === 0 ? (
          <EmptyState title="No revision yet">
            A report pins the job as it stands: input, tables, limits and wording, under a hash that is
            printed on every page. It goes to an inspector by e-mail with a link of their own, and stands
            alone as a PDF.
          </EmptyState>
        ) : (
          list.map((revision) => (
            <RevisionPlate
              key={revision.id}
              firm={firm}
              job={job}
              revision={revision}
              newest={revision === newest}
              actions={mayIssue ? actions : null}
            />
          ))
        )}
        <div className="border-t border-rule px-4 py-3">{cautions}</div>
      </Scroller>
      {asking && (
        <IssueDialog
          standing={standing}
          onClose={() => setAsking(false)}
          issue={async (body) => {
            const outcome = await actions.issue(body);
            if (!outcome.ok) return outcome.error;
            setIssued(outcome.data.no);
            setAsking(false);
            return null;
          }}
        />
      )}
    </>
  );
}
