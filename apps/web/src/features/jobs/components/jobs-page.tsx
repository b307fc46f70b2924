import { downloadJobFile, type JobSummary } from '@farlug/contract/routes';
import { type ReactNode, useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import { paths } from '../../../app/paths.ts';
import { formatCount } from '../../../lib/format.ts';
import { routeUrl } from '../../../lib/route-url.ts';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { Button, LinkButton } from '../../../ui/button.tsx';
import { cx } from '../../../ui/cx.ts';
import { EmptyState } from '../../../ui/empty-state.tsx';
import { ErrorState } from '../../../ui/error-state.tsx';
import { Field } from '../../../ui/field.tsx';
import type { MenuItem } from '../../../ui/menu.tsx';
import { Message } from '../../../ui/message.tsx';
import { PageHeading } from '../../../ui/page-heading.tsx';
import { Scroller } from '../../../ui/scroller.tsx';
import { Segmented } from '../../../ui/segmented.tsx';
import { Skeleton } from '../../../ui/skeleton.tsx';
import { TextInput } from '../../../ui/text-input.tsx';
import { DESK, useMedia } from '../../../ui/use-media.ts';
import { useJobActions } from '../hooks/use-job-actions.ts';
import { useJobs } from '../hooks/use-jobs.ts';
import { JobCards } from './job-cards.tsx';
import { DeleteDialog, DuplicateDialog } from './job-dialogs.tsx';
import { JobsTable } from './jobs-table.tsx';
import { NoJobs } from './no-jobs.tsx';

interface JobsPageProps {
  firm: string;
  firmName: string;
  cautions: ReactNode;
}

/** Search and filter stand in the address; the list answers while one types. */
export function JobsPage({ firm, firmName, cautions }: JobsPageProps) {
  usePageTitle('Jobs', firmName);
  const [query, setQuery] = useSearchParams();
  const search = query.get('q') ?? '';
  const archived = query.get('show') === 'archived';
  const jobs = useJobs(firm, search.trim(), archived);
  const actions = useJobActions(firm);
  const [asked, setAsked] = useState<{ what: 'duplicate' | 'delete'; job: JobSummary } | null>(null);
  const [refused, setRefused] = useState<string | null>(null);
  const List = useMedia(DESK) ? JobsTable : JobCards;

  const change = (key: string, value: string) =>
    setQuery(
      (before) => {
        const next = new URLSearchParams(before);
        if (value) next.set(key, value);
        else next.delete(key);
        return next;
      },
      { replace: true },
    );

  const archive = async (job: JobSummary) => {
    const outcome = await actions.archive(job.id, job.archivedAt === null);
    setRefused(outcome.ok ? null : outcome.error.message);
  };
  const actionsOf = (job: JobSummary): MenuItem[] => [
    { label: 'Duplicate', onSelect: () => setAsked({ what: 'duplicate', job }) },
    {
      label: 'Download job file',
      onSelect: () => window.location.assign(routeUrl(downloadJobFile, { firm, job: job.id })),
    },
    { label: job.archivedAt === null ? 'Archive' : 'Bring back', onSelect: () => void archive(job) },
    {
      label: job.revision ? 'Delete (has revisions)' : 'Delete',
      danger: true,
      disabled: job.revision !== null,
      onSelect: () => setAsked({ what: 'delete', job }),
    },
  ];
  const untouched = search === '' && !archived;
  const none = untouched && jobs.data?.length === 0;

  return (
    <>
      <PageHeading
        title="Jobs"
        aside={firmName}
        detail={jobs.data ? formatCount(jobs.data.length, archived ? 'archived job' : 'job') : undefined}
        actions={
          <>
            <LinkButton to={paths.uploadJob(firm)}>Upload a job file</LinkButton>
            <LinkButton to={paths.newJob(firm)} look={none ? 'plain' : 'go'}>
              New job
            </LinkButton>
          </>
        }
      />
      <div className={cx('flex flex-wrap items-end gap-3 px-4 pb-3', none && 'hidden')} data-print="never">
        <Field label="Search name, address, permit" className="w-full desk:w-72">
          <TextInput
            type="search"
            compact
            maxLength={200}
            value={search}
            onChange={(event) => change('q', event.target.value)}
          />
        </Field>
        <Segmented
          label="Which jobs"
          value={archived ? 'archived' : 'open'}
          onValue={(value) => change('show', value === 'archived' ? 'archived' : '')}
          choices={[
            { value: 'open', label: 'Open' },
            { value: 'archived', label: 'Archived' },
          ]}
        />
      </div>
      {refused && (
        <Message kind="wrong" className="mx-4 mb-3">
          {refused}
        </Message>
      )}
      <Scroller
        label="List of jobs"
        className="flex min-h-0 flex-1 flex-col overflow-auto border-t border-ink bg-sheet"
      >
        {jobs.isPending ? (
          <Skeleton label="Fetching the jobs" />
        ) : jobs.isError ? (
          <ErrorState title="The jobs could not be fetched" onRetry={() => void jobs.refetch()}>
            {jobs.error.message}
          </ErrorState>
        ) : jobs.data.length > 0 ? (
          <List firm={firm} jobs={jobs.data} actionsOf={actionsOf} />
        ) : untouched ? (
          <NoJobs firm={firm} />
        ) : (
          <EmptyState
            title={
              search
                ? `No ${archived ? 'archived' : 'open'} job matches “${search}”.`
                : 'Nothing is archived.'
            }
            actions={<Button onClick={() => setQuery({}, { replace: true })}>Show all open jobs</Button>}
          />
        )}
        <footer className="mt-auto border-t border-rule bg-paper px-4 py-2">{cautions}</footer>
      </Scroller>
      {asked?.what === 'duplicate' && (
        <DuplicateDialog
          job={asked.job}
          onClose={() => setAsked(null)}
          duplicate={async (name) => {
            const outcome = await actions.duplicate(asked.job.id, name);
            if (!outcome.ok) return outcome.error;
            setAsked(null);
            return null;
          }}
        />
      )}
      {asked?.what === 'delete' && (
        <DeleteDialog
          job={asked.job}
          onClose={() => setAsked(null)}
          remove={async () => {
            const outcome = await actions.remove(asked.job.id);
            if (!outcome.ok) return outcome.error;
            setAsked(null);
            return null;
          }}
        />
      )}
    </>
  );
}
