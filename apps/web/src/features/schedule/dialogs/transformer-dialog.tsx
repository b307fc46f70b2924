import { deleteTransformerEdit, systemsOfRows } from '@farlug/contract/schedule';
import { PAIRS, type System, TRANSFORMER_CONNECTIONS, type TransformerConnection } from '@farlug/solver/job';
import { useMemo } from 'react';
import { SYSTEM_VOLTS, SYSTEM_WORDS } from '../../../lib/job-words.ts';
import { useForm } from '../../../lib/use-form.ts';
import { Field } from '../../../ui/field.tsx';

import { Segmented } from '../../../ui/segmented.tsx';
import { Select } from '../../../ui/select.tsx';
import { DeleteOrLeave } from './delete-or-leave.tsx';
import { DialogForm } from './dialog-form.tsx';
import { DialogPart, Further } from './dialog-part.tsx';
import { echoVolts } from './echoes.ts';
import { busOfFeed, type FeedValue, feedChoices } from './feed-choices.ts';
import { type JobDialogProps, taken } from './job-dialog.ts';
import { LongDialog } from './long-dialog.tsx';
import { furtherWrong, RunFields, RunFurtherFields } from './run-fields.tsx';
import {
  followFeed,
  newTransformerDraft,
  runTo,
  SECONDARIES,
  settleTransformer,
  type TransformerDraft,
  transformerDraft,
  withConnection,
} from './transformer-draft.ts';
import { TypedInput } from './typed-input.tsx';

interface TransformerDialogProps extends Omit<JobDialogProps, 'onAsk'> {
  /** Null adds one. */
  transformerId: string | null;
  feed: FeedValue;
}

const CONNECTION_WORDS: Record<TransformerConnection, string> = {
  'delta-wye': 'Delta–wye',
  'wye-wye': 'Wye–wye',
  'delta-delta': 'Delta–delta',
  'wye-delta': 'Wye–delta',
  'single-phase': 'Single-phase',
};

/** A transformer off its nameplate, and the run to its primary. */
export function TransformerDialog({ rows, apply, onClose, transformerId, feed }: TransformerDialogProps) {
  const job = [...rows.job.values()][0]!;
  const row = rows.transformer.get(transformerId ?? '');
  const form = useForm<TransformerDraft>({
    initial: row ? transformerDraft(rows, row) : newTransformerDraft(rows, feed),
    check: (draft) => settleTransformer(rows, transformerId, draft).errors,
    submit: async (draft) => {
      const error = taken(apply, settleTransformer(rows, transformerId, draft).edit);
      if (!error) onClose();
      return error;
    },
  });
  const { values, set, errors } = form;
  const choices = useMemo(() => feedChoices(rows), [rows]);
  const connection = values.connection as TransformerConnection;
  const primaryRun = row ? runTo(rows, row.fromBusId) : null;
  const text = (
    field: 'code' | 'kva' | 'primaryVolts' | 'secondaryVolts' | 'percentZ' | 'tapPercent' | 'ratio',
    label: string,
    hint: string | null,
    more: Partial<Parameters<typeof TypedInput>[0]> = {},
  ) => (
    <TypedInput
      label={label}
      hint={hint}
      value={values[field]}
      error={errors[field]}
      onText={(typed) => set(field, typed)}
      {...more}
    />
  );
  const title = row ? `Transformer ${row.code}` : 'Add a transformer';
  const chooseFeed = (value: FeedValue) => {
    set('feed', value);
    const follows = followFeed(rows, value);
    for (const [field, given] of Object.entries(follows)) set(field as keyof TransformerDraft, given);
  };
  const chooseConnection = (value: TransformerConnection) => {
    const here = systemsOfRows(rows).get(row?.fromBusId ?? busOfFeed(rows, values.feed) ?? '');
    for (const [field, given] of Object.entries(withConnection(value, here)))
      set(field as keyof TransformerDraft, given);
  };
  return (
    <LongDialog changed={form.changed} onClose={onClose} title={title}>
      <DialogForm
        label={title}
        onSubmit={form.onSubmit}
        error={form.formError}
        busy={form.busy}
        action={row ? 'Save the transformer' : 'Add the transformer'}
        beside={
          <DeleteOrLeave
            what={row ? `transformer ${row.code}` : null}
            goes="The runs on both of its sides stay; what lies beyond it is then not fed."
            onLeave={onClose}
            onDelete={() => {
              const { edit, problem } = deleteTransformerEdit(rows, transformerId!);
              const wrong = problem ?? taken(apply, edit)?.message ?? null;
              if (wrong === null) onClose();
              return wrong;
            }}
          />
        }
      >
        {!row && (
          <DialogPart title="Where it stands">
            {text('code', 'Name', 'T2', { required: true, maxLength: 60 })}
            <Field label="Primary fed from" required error={errors.feed}>
              <Select
                value={values.feed}
                onValue={chooseFeed}
                choices={[{ value: '', label: 'Choose a panel or point' }, ...choices]}
              />
            </Field>
          </DialogPart>
        )}
        <DialogPart title="Nameplate">
          {text('kva', 'Rating, kVA', '75, 112.5')}
          <Field label="Connection, primary to secondary" error={errors.connection}>
            <Select
              value={connection}
              onValue={chooseConnection}
              choices={TRANSFORMER_CONNECTIONS.map((value) => ({ value, label: CONNECTION_WORDS[value] }))}
            />
          </Field>
          {connection === 'single-phase' && (
            <Field label="Primary between" error={errors.primary}>
              <Select
                value={values.primary}
                onValue={(primary) => set('primary', primary)}
                choices={PAIRS.map((value) => ({ value: value as string, label: value }))}
              />
            </Field>
          )}
          <Field label="Secondary" error={errors.system}>
            <Select
              value={values.system}
              onValue={(system) => set('system', system)}
              choices={SECONDARIES[connection].map((value) => ({
                value: value as string,
                label: SYSTEM_WORDS[value],
              }))}
            />
          </Field>
          {text('primaryVolts', 'Primary volts', '480 V', { echo: echoVolts })}
          {text(
            'secondaryVolts',
            `Secondary volts, ${SYSTEM_VOLTS[values.system as System].between}`,
            SYSTEM_VOLTS[values.system as System].example,
            { echo: echoVolts },
          )}
          {text('percentZ', 'Impedance, %Z', 'Off the nameplate, as 4.2 %.')}
          <div className="grid grid-cols-[minmax(0,1fr)_auto] items-start gap-2">
            {text('ratio', values.ratioOf, 'Of the winding; the data sheet has it.')}
            <Field label="Given as">
              <Segmented
                value={values.ratioOf}
                onValue={(ratioOf) => set('ratioOf', ratioOf)}
                choices={[
                  { value: 'X/R', label: 'X/R' },
                  { value: 'R/X', label: 'R/X' },
                ]}
              />
            </Field>
          </div>
          {text('tapPercent', 'Tap, %', '+2.5 raises the secondary; empty: none.')}
        </DialogPart>
        {(!row || primaryRun) && (
          <>
            <DialogPart title="Run to its primary">
              <RunFields
                texts={values.run}
                errors={errors}
                lengthUnit={job.lengthUnit}
                metric={job.wireUnit === 'mm2'}
                ownBreaker={primaryRun ? primaryRun.circuitId === null : !values.feed.startsWith('panel:')}
                onTexts={(run) => set('run', run)}
              />
            </DialogPart>
            <Further title="More of the run" wrong={furtherWrong(errors)}>
              <RunFurtherFields
                texts={values.run}
                errors={errors}
                lengthUnit={job.lengthUnit}
                metric={job.wireUnit === 'mm2'}
                onTexts={(run) => set('run', run)}
              />
            </Further>
          </>
        )}
      </DialogForm>
    </LongDialog>
  );
}
