import type { Edit } from '@farlug/contract/edit';
import type { JobRows } from '@farlug/contract/rows';
import { useMemo, useState } from 'react';
import { ApiError } from '../../../lib/api-error.ts';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { Message } from '../../../ui/message.tsx';
import { PageHeading } from '../../../ui/page-heading.tsx';
import { Scroller } from '../../../ui/scroller.tsx';
import { draftFromRows } from '../job-draft.ts';
import type { Preset } from '../limits-of-preset.ts';
import { editOfDraft } from '../rows-of-draft.ts';
import { JobForm } from './job-form.tsx';

interface JobSettingsPageProps {
  rows: JobRows;
  presets: readonly Preset[];
  archived: boolean;
  apply: (edit: Edit) => { ok: true } | { ok: false; message: string };
}

/** The same form as for a new job; saving is one edit, which can be undone in the schedule. */
export function JobSettingsPage({ rows, presets, archived, apply }: JobSettingsPageProps) {
  const stored = useMemo(() => draftFromRows(rows), [rows]);
  const [saved, setSaved] = useState(false);
  usePageTitle('Job settings', stored.name);
  return (
    <>
      <PageHeading
        title="Job settings"
        aside={stored.name}
        detail={
          archived
            ? 'This job is archived: it can be read, not changed.'
            : 'Saving counts as one change, and can be undone.'
        }
      />
      <Scroller label="Job settings" className="min-h-0 flex-1 overflow-auto">
        <JobForm
          initial={stored}
          presets={presets}
          systemLocked={rows.run.size > 0 || rows.load.size > 0}
          readOnly={archived}
          action="Save the settings"
          done={<Message kind={saved ? 'done' : 'note'}>{saved ? 'Saved.' : 'Nothing to save.'}</Message>}
          submit={async (draft) => {
            const edit = editOfDraft(rows, draft);
            const done = edit ? apply(edit) : { ok: true as const };
            setSaved(edit !== null && done.ok);
            return done.ok ? null : new ApiError('conflict', done.message);
          }}
        />
      </Scroller>
    </>
  );
}
