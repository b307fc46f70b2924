import { newId } from '@farlug/contract/edit';
import { type issueRevision, PAPER_SIZES } from '@farlug/contract/routes';
import type { Scenario } from '@farlug/solver/job';
import { useState } from 'react';
import type { z } from 'zod';
import type { ApiError } from '../../../lib/api-error.ts';
import { SCENARIO_ORDER, SCENARIO_WORDS } from '../../../lib/job-words.ts';
import { useForm } from '../../../lib/use-form.ts';
import { Dialog } from '../../../ui/dialog.tsx';
import { Field } from '../../../ui/field.tsx';
import { Form } from '../../../ui/form.tsx';
import { Message } from '../../../ui/message.tsx';
import { Segmented } from '../../../ui/segmented.tsx';
import { Select } from '../../../ui/select.tsx';
import { TextArea } from '../../../ui/text-input.tsx';
import type { JobStanding } from '../job-standing.ts';

type Paper = (typeof PAPER_SIZES)[number];
const PAPER_WORDS: Record<Paper, string> = { letter: 'US Letter', a4: 'A4' };

interface IssueDialogProps {
  standing: JobStanding;
  onClose: () => void;
  issue: (body: z.input<typeof issueRevision.body>) => Promise<ApiError | null>;
}

export function IssueDialog({ standing, onClose, issue }: IssueDialogProps) {
  const [revision] = useState(newId);
  const [movedOn, setMovedOn] = useState(false);
  const form = useForm({
    initial: {
      scenario: standing.scenario,
      paper: (navigator.language.endsWith('US') || navigator.language.endsWith('CA')
        ? 'letter'
        : 'a4') as Paper,
      equationsPanel: '',
      note: '',
    },
    submit: async (values) => {
      const error = await issue({
        ...values,
        revision,
        seq: standing.seq,
        equationsPanel: values.equationsPanel || null,
      });
      setMovedOn(error?.code === 'job_moved_on');
      return error;
    },
  });
  const { values, set, errors } = form;
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title="Issue a report"
      description={`Pins the job as it stands now, at change ${standing.seq}. A revision cannot be changed or taken back.`}
    >
      <Form
        label="Issue a report"
        onSubmit={form.onSubmit}
        error={form.formError}
        busy={form.busy}
        action="Issue"
        busyAction="Solving …"
        disabled={!standing.saved}
      >
        <Field
          label="Scenario of the verdicts"
          hint={SCENARIO_WORDS[values.scenario].others}
          error={errors.scenario}
        >
          <Select
            value={values.scenario}
            onValue={(scenario: Scenario) => set('scenario', scenario)}
            choices={SCENARIO_ORDER.map((value) => ({ value, label: SCENARIO_WORDS[value].label }))}
          />
        </Field>
        <Field label="Paper" error={errors.paper}>
          <Segmented
            value={values.paper}
            onValue={(paper: Paper) => set('paper', paper)}
            choices={PAPER_SIZES.map((value) => ({ value, label: PAPER_WORDS[value] }))}
          />
        </Field>
        <Field
          label="Node equations written out"
          hint="Of one panel, with numbers, so that they can be checked by hand."
          error={errors.equationsPanel}
        >
          <Select
            value={values.equationsPanel}
            onValue={(panel) => set('equationsPanel', panel)}
            choices={[
              { value: '', label: 'The panel of the worst load' },
              ...standing.panels.map(({ id, label }) => ({ value: id, label })),
            ]}
          />
        </Field>
        <Field label="Note to the reader" hint="Printed on the first page." error={errors.note}>
          <TextArea
            rows={3}
            maxLength={2000}
            value={values.note}
            onChange={(event) => set('note', event.target.value)}
          />
        </Field>
        {!standing.saved && (
          <Message kind="note">
            Your last change is still being saved; the report can be issued right after.
          </Message>
        )}
        {movedOn && (
          <Message kind="note">
            Somebody changed the job meanwhile. This page has taken the change over: look at it, then issue
            again.
          </Message>
        )}
      </Form>
    </Dialog>
  );
}
