import { newId } from '@farlug/contract/edit';
import { DECISIONS, type DecisionKind, type recordPaperDecision } from '@farlug/contract/routes';
import { useState } from 'react';
import type { z } from 'zod';
import type { ApiError } from '../../../lib/api-error.ts';
import { checkDecision, type DecisionDraft } from '../../../lib/decision-draft.ts';
import { DECISION_WORDS } from '../../../lib/decision-words.ts';
import { useForm } from '../../../lib/use-form.ts';
import { Dialog } from '../../../ui/dialog.tsx';
import { Field } from '../../../ui/field.tsx';
import { Form } from '../../../ui/form.tsx';
import { Segmented } from '../../../ui/segmented.tsx';
import { TextArea, TextInput } from '../../../ui/text-input.tsx';

interface PaperDecisionDialogProps {
  letter: string;
  onClose: () => void;
  decide: (body: z.input<typeof recordPaperDecision.body>) => Promise<ApiError | null>;
}

export function PaperDecisionDialog({ letter, onClose, decide }: PaperDecisionDialogProps) {
  const [id] = useState(newId);
  const form = useForm<DecisionDraft>({
    initial: { decision: null, words: '', comments: '', name: '', title: '' },
    check: checkDecision,
    submit: async ({ decision, ...rest }) => {
      const error = await decide({ id, decision: decision as DecisionKind, ...rest });
      if (!error) onClose();
      return error;
    },
  });
  const { values, set, errors } = form;
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Decision on revision ${letter}, from paper`}
      description="As it stands on the paper that came back. Who entered it is kept with it."
    >
      <Form
        label="Decision from paper"
        onSubmit={form.onSubmit}
        error={form.formError}
        busy={form.busy}
        action="Put it on record"
      >
        <Field label="Decision" error={errors.decision}>
          <Segmented
            value={values.decision}
            onValue={(decision: DecisionKind) => set('decision', decision)}
            choices={DECISIONS.map((value) => ({ value, label: DECISION_WORDS[value] }))}
          />
        </Field>
        {values.decision === 'other' && (
          <Field label="In the authority’s own words" error={errors.words} required>
            <TextInput
              maxLength={2000}
              value={values.words}
              onChange={(event) => set('words', event.target.value)}
            />
          </Field>
        )}
        <Field label="Comments" error={errors.comments}>
          <TextArea
            rows={3}
            maxLength={8000}
            value={values.comments}
            onChange={(event) => set('comments', event.target.value)}
          />
        </Field>
        <Field label="Name on the paper" error={errors.name} required>
          <TextInput
            maxLength={200}
            value={values.name}
            onChange={(event) => set('name', event.target.value)}
          />
        </Field>
        <Field label="Title or office" error={errors.title}>
          <TextInput
            maxLength={200}
            value={values.title}
            onChange={(event) => set('title', event.target.value)}
          />
        </Field>
      </Form>
    </Dialog>
  );
}
