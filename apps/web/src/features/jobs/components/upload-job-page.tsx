import { rowsFromJob } from '@farlug/contract/job';
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { paths } from '../../../app/paths.ts';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { Button, LinkButton } from '../../../ui/button.tsx';
import { FileDrop } from '../../../ui/file-drop.tsx';
import { Message } from '../../../ui/message.tsx';
import { PageHeading } from '../../../ui/page-heading.tsx';
import { Scroller } from '../../../ui/scroller.tsx';
import { RowHead, Table, Td, Th } from '../../../ui/table.tsx';
import { useJobActions } from '../hooks/use-job-actions.ts';
import { JOB_FILE_BYTES_MAX, type ReadJobFile, readJobFile } from '../read-job-file.ts';
import { JobFileSummary } from './job-file-summary.tsx';

const SHOWN_MAX = 200;

/** A job file is judged here; nothing is written before the person has seen what is in it. */
export function UploadJobPage({ firm }: { firm: string }) {
  usePageTitle('Upload a job file');
  const navigate = useNavigate();
  const { create } = useJobActions(firm);
  const [read, setRead] = useState<{ name: string; result: ReadJobFile } | null>(null);
  const [busy, setBusy] = useState(false);
  const [refused, setRefused] = useState<string | null>(null);

  const take = async (file: File) => {
    setRefused(null);
    const text = file.size > JOB_FILE_BYTES_MAX ? '' : await file.text();
    setRead({ name: file.name, result: readJobFile(text, file.size) });
  };
  const make = async (result: ReadJobFile & { ok: true }) => {
    setBusy(true);
    const outcome = await create(rowsFromJob(result.job));
    setBusy(false);
    if (outcome.ok) navigate(paths.schedule(firm, outcome.data.id));
    else setRefused(outcome.error.message);
  };

  return (
    <>
      <PageHeading
        title="Upload a job file"
        detail="A job as one JSON document, as downloaded from a job. For a CSV or XLSX schedule, open a job first."
        actions={<LinkButton to={paths.jobs(firm)}>Back to the jobs</LinkButton>}
      />
      <Scroller label="Job file" className="min-h-0 flex-1 overflow-auto border-t border-ink">
        <div className="max-w-240 p-4">
          <FileDrop
            label={read ? 'Choose another file' : 'Choose a job file'}
            hint="or drop it here. It is read in this browser; nothing is stored yet."
            accept=".json,application/json"
            onFile={(file) => void take(file)}
          />
        </div>
        {read?.result.ok && (
          <section className="border-t border-ink bg-sheet pb-4">
            <JobFileSummary fileName={read.name} job={read.result.job} warnings={read.result.warnings} />
            <div className="flex flex-wrap items-center gap-4 px-4">
              <Button
                look="go"
                big
                aria-disabled={busy || undefined}
                onClick={() => !busy && read.result.ok && void make(read.result)}
              >
                {busy ? 'One moment …' : 'Make this job'}
              </Button>
              {refused && <Message kind="wrong">{refused}</Message>}
            </div>
          </section>
        )}
        {read && !read.result.ok && (
          <section className="border-t border-ink bg-sheet">
            <Message kind="wrong" className="mx-4 my-3">
              <b>{read.name}</b>: {read.result.reason} Nothing was written.
            </Message>
            {read.result.problems.length > 0 && (
              <Table stacked caption="What must be put right">
                <thead>
                  <tr>
                    <Th>Place in the file</Th>
                    <Th>What is wrong</Th>
                  </tr>
                </thead>
                <tbody>
                  {read.result.problems.slice(0, SHOWN_MAX).map((problem) => (
                    <tr key={`${problem.path} ${problem.message}`}>
                      <RowHead className="font-code text-label">{problem.path || 'the whole file'}</RowHead>
                      <Td label="What is wrong">{problem.message}</Td>
                    </tr>
                  ))}
                </tbody>
              </Table>
            )}
            {read.result.problems.length > SHOWN_MAX && (
              <p className="px-4 py-2 text-grid text-ink-soft">
                and {read.result.problems.length - SHOWN_MAX} more.
              </p>
            )}
          </section>
        )}
      </Scroller>
    </>
  );
}
