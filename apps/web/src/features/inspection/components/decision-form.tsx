import { newId } from '@farlug/contract/edit';
import { DECISIONS, type DecisionKind } from '@farlug/contract/routes';
import { useEffect, useRef, useState } from 'react';
import { checkDecision, type DecisionDraft } from '../../../lib/decision-draft.ts';
import { DECISION_WORDS } from '../../../lib/decision-words.ts';
import { useForm } from '../../../lib/use-form.ts';
import { Button } from '../../../ui/button.tsx';
import { Field } from '../../../ui/field.tsx';
import { Message } from '../../../ui/message.tsx';
import { Segmented } from '../../../ui/segmented.tsx';
import { TextArea, TextInput } from '../../../ui/text-input.tsx';
import { useRecordDecision } from '../hooks/use-inspection.ts';

const BLANK: DecisionDraft = { decision: null, words: '', comments: '', name: '', title: '' };

interface DecisionFormProps {
  letter: string;
  recipient: string;
  /** A circuit to be taken up in the comments; each wish has a number of its own. */
  asked?: { no: number; place: string } | null;
}

/** Records the inspector’s decision against exactly this revision. */
export function DecisionForm({ letter, recipient, asked = null }: DecisionFormProps) {
  const record = useRecordDecision();
  const [id, setId] = useState(newId);
  const [done, setDone] = useState(false);
  const form = useForm<DecisionDraft>({
    initial: { ...BLANK, name: recipient },
    check: checkDecision,
    submit: async ({ decision, ...rest }) => {
      setDone(false);
      const error = await record({ id, decision: decision as DecisionKind, ...rest });
      if (error) return error;
      form.reset({ ...BLANK, name: rest.name, title: rest.title });
      setId(newId());
      setDone(true);
      return null;
    },
  });
  const { values, set, errors } = form;
  const comments = useRef<HTMLTextAreaElement>(null);
  const taken = useRef(0);
  useEffect(() => {
    const field = comments.current;
    if (!asked || !field || taken.current === asked.no) return;
    taken.current = asked.no;
    const before = field.value.trimEnd();
    set('comments', `${before}${before === '' ? '' : '\n'}${asked.place}: `);
    field.focus();
  }, [asked, set]);
  return (
    <form
      noValidate
      aria-label={`Decision on revision ${letter}`}
      onSubmit={form.onSubmit}
      data-print="never"
      className="space-y-3 border-t-2 border-ink bg-paper px-4 py-3"
    >
      <h2 className="text-body">Decision on revision {letter}</h2>
      {done && (
        <Message kind="done">
          Your decision is on record against revision {letter}. The firm sees it now; you can add to it below.
        </Message>
      )}
      <Field label="Decision" error={errors.decision}>
        <Segmented
          wide
          value={values.decision}
          onValue={(decision: DecisionKind) => set('decision', decision)}
          choices={DECISIONS.map((value) => ({ value, label: DECISION_WORDS[value] }))}
        />
      </Field>
      {values.decision === 'other' && (
        <Field label="In your own words" error={errors.words} required>
          <TextInput
            maxLength={2000}
            value={values.words}
            onChange={(event) => set('words', event.target.value)}
          />
        </Field>
      )}
      <Field label="Comments" hint="Name the run where you can, as LP-2-20." error={errors.comments}>
        <TextArea
          ref={comments}
          rows={3}
          maxLength={8000}
          value={values.comments}
          onChange={(event) => set('comments', event.target.value)}
        />
      </Field>
      <div className="grid items-start gap-3 desk:grid-cols-[1fr_1fr_auto]">
        <Field label="Name, as typed and unverified" error={errors.name} required>
          <TextInput
            autoComplete="name"
            maxLength={200}
            value={values.name}
            onChange={(event) => set('name', event.target.value)}
          />
        </Field>
        <Field label="Title or office" error={errors.title}>
          <TextInput
            autoComplete="organization-title"
            maxLength={200}
            value={values.title}
            onChange={(event) => set('title', event.target.value)}
          />
        </Field>
        <Button type="submit" look="go" big className="desk:mt-4.5" aria-disabled={form.busy || undefined}>
          {form.busy ? 'One moment …' : 'Record'}
        </Button>
      </div>
      {form.formError && <Message kind="wrong">{form.formError}</Message>}
    </form>
  );
}
