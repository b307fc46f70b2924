import { useCallback, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { paths } from '../../../app/paths.ts';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { LinkButton } from '../../../ui/button.tsx';
import { PageHeading } from '../../../ui/page-heading.tsx';
import { Scroller } from '../../../ui/scroller.tsx';
import { useJobActions } from '../hooks/use-job-actions.ts';
import { blankDraft, type JobDraft } from '../job-draft.ts';
import { keepDraft, keptDraft } from '../kept-draft.ts';
import { limitsOfPreset, type Preset, startingPreset } from '../limits-of-preset.ts';
import { rowsOfDraft } from '../rows-of-draft.ts';
import { JobForm } from './job-form.tsx';

interface NewJobPageProps {
  firm: string;
  units: Parameters<typeof blankDraft>[0];
  presets: readonly Preset[];
}

function startingDraft(units: NewJobPageProps['units'], presets: readonly Preset[]): JobDraft {
  const draft = blankDraft(units);
  const preset = startingPreset(presets, units.wireUnit);
  return preset ? { ...draft, preset: preset.name, ...limitsOfPreset(preset) } : draft;
}

export function NewJobPage({ firm, units, presets }: NewJobPageProps) {
  usePageTitle('New job');
  const navigate = useNavigate();
  const { create } = useJobActions(firm);
  const [initial] = useState(() => keptDraft(firm) ?? startingDraft(units, presets));
  const keep = useCallback((draft: JobDraft) => keepDraft(firm, draft), [firm]);
  return (
    <>
      <PageHeading
        title="New job"
        detail="All of it can be changed later. Panels and circuits come next."
        actions={<LinkButton to={paths.uploadJob(firm)}>Upload a job file instead</LinkButton>}
      />
      <Scroller label="New job" className="min-h-0 flex-1 overflow-auto">
        <JobForm
          initial={initial}
          keep={keep}
          presets={presets}
          action="Make the job"
          beside={
            <LinkButton to={paths.jobs(firm)} look="bare">
              Back to the jobs
            </LinkButton>
          }
          submit={async (draft) => {
            const outcome = await create(rowsOfDraft(draft));
            if (!outcome.ok) return outcome.error;
            keepDraft(firm, null);
            navigate(paths.schedule(firm, outcome.data.id));
            return null;
          }}
        />
      </Scroller>
    </>
  );
}
