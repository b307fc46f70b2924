import { inOrder } from '@farlug/contract/job';
import { deleteSourceEdit } from '@farlug/contract/schedule';
import { useState } from 'react';
import { Button } from '../../../ui/button.tsx';
import { Message } from '../../../ui/message.tsx';
import { type JobDialogProps, taken } from './job-dialog.ts';

/** The sources that a job has beside its first one, each to be deleted when asked for twice. */
export function FurtherSources({ rows, apply }: Pick<JobDialogProps, 'rows' | 'apply'>) {
  const [asked, setAsked] = useState<string | null>(null);
  const [refused, setRefused] = useState<string | null>(null);
  const sources = inOrder(rows.source.values()).slice(1);
  if (sources.length === 0) return null;
  const remove = (id: string) => {
    const { edit, problem } = deleteSourceEdit(rows, id);
    setRefused(problem ?? taken(apply, edit)?.message ?? null);
    setAsked(null);
  };
  return (
    <section aria-label="Further sources of the job" className="mb-4">
      <ul>
        {sources.map((source) => (
          <li
            key={source.id}
            className="flex flex-wrap items-center gap-x-4 gap-y-2 border-b border-hair py-1 text-grid"
          >
            <b>{source.code}</b>
            <span className="text-ink-soft">
              {source.volts === null ? 'volts missing' : `${source.volts} V`}
              {source.off ? ', off' : ''}; changed in the job’s settings
            </span>
            {asked === source.id ? (
              <>
                <span>The runs that leave it go with it.</span>
                <Button look="danger" onClick={() => remove(source.id)}>
                  Delete {source.code}
                </Button>
                <Button onClick={() => setAsked(null)}>Keep it</Button>
              </>
            ) : (
              <Button onClick={() => setAsked(source.id)} aria-label={`Delete ${source.code} …`}>
                Delete …
              </Button>
            )}
          </li>
        ))}
      </ul>
      {refused && <Message kind="wrong">{refused}</Message>}
    </section>
  );
}
