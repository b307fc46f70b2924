import type { System } from '@farlug/solver/job';
import { useMemo } from 'react';
import { SYSTEM_FAULT, SYSTEM_ORDER, SYSTEM_VOLTS, SYSTEM_WORDS } from '../../../lib/job-words.ts';
import { useForm } from '../../../lib/use-form.ts';
import { Button } from '../../../ui/button.tsx';
import { Checkbox } from '../../../ui/checkbox.tsx';
import { Field } from '../../../ui/field.tsx';

import { Segmented } from '../../../ui/segmented.tsx';
import { Select } from '../../../ui/select.tsx';
import { DialogForm } from './dialog-form.tsx';
import { DialogPart } from './dialog-part.tsx';
import { echoAmps, echoVolts } from './echoes.ts';
import { feedChoices } from './feed-choices.ts';
import { FurtherSources } from './further-sources.tsx';
import { type JobDialogProps, taken } from './job-dialog.ts';
import { LongDialog } from './long-dialog.tsx';
import { RunFields } from './run-fields.tsx';
import { followPoint, newSourceDraft, type SourceDraft, settleSource } from './source-draft.ts';
import { TypedInput } from './typed-input.tsx';

/** A further source: a generator, a battery, a second service. The first one stands in the job's settings. */
export function SourceDialog({ rows, apply, onClose }: Omit<JobDialogProps, 'onAsk'>) {
  const job = [...rows.job.values()][0]!;
  const form = useForm<SourceDraft>({
    initial: newSourceDraft(rows),
    check: (draft) => settleSource(rows, draft).errors,
    submit: async (draft) => {
      const error = taken(apply, settleSource(rows, draft).edit);
      if (!error) onClose();
      return error;
    },
  });
  const { values, set, errors } = form;
  const choices = useMemo(() => feedChoices(rows), [rows]);
  const direct = values.system === 'dc-2w';
  const text = (
    field: 'code' | 'volts' | 'openVolts' | 'faultAmps' | 'faultXOverR' | 'impedanceR' | 'impedanceX',
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
  return (
    <LongDialog
      changed={form.changed}
      onClose={onClose}
      title="Add a source"
      description="A generator, a battery, a second service. PV that follows the grid is a circuit of class Generation with a negative load."
    >
      <FurtherSources rows={rows} apply={apply} />
      <DialogForm
        label="Add a source"
        onSubmit={form.onSubmit}
        error={form.formError}
        busy={form.busy}
        action="Add the source"
        beside={
          <Button big onClick={onClose}>
            Leave it
          </Button>
        }
      >
        <DialogPart title="Source">
          {text('code', 'Name', 'Standby generator', { required: true, maxLength: 60 })}
          <Field label="Feeds in at" required error={errors.to}>
            <Select
              value={values.to}
              onValue={(to) => {
                set('to', to);
                const there = followPoint(rows, to);
                if (there) {
                  set('system', there.system);
                  set('volts', there.volts);
                }
              }}
              choices={[{ value: '', label: 'Choose a panel or point' }, ...choices]}
            />
          </Field>
          <Field label="Supply system">
            <Select
              value={values.system}
              onValue={(system: System) => set('system', system)}
              choices={SYSTEM_ORDER.map((system) => ({ value: system, label: SYSTEM_WORDS[system] }))}
            />
          </Field>
          {text(
            'volts',
            `Nominal volts, ${SYSTEM_VOLTS[values.system].between}`,
            SYSTEM_VOLTS[values.system].example,
            {
              required: true,
              echo: echoVolts,
            },
          )}
          {text('openVolts', 'Volts at no load, if known', 'What the meter shows with everything off.', {
            echo: echoVolts,
          })}
          <Checkbox
            checked={values.off}
            onChecked={(off) => set('off', off)}
            label="Off"
            hint="A standby source is off while the service is on; it is switched in the job’s settings."
          />
        </DialogPart>
        <DialogPart
          title="Behind its terminals"
          note="For a motor’s start the lowest fault current matters: ask for it."
        >
          <Field
            label="Stated as"
            className="desk:col-span-2"
            hint={
              values.strength === 'stiff' ? 'Taken as unyielding: starting is then not judged.' : undefined
            }
          >
            <Segmented
              value={values.strength}
              onValue={(strength) => set('strength', strength)}
              choices={[
                { value: 'fault', label: 'Fault current' },
                { value: 'impedance', label: 'Impedance' },
                { value: 'stiff', label: 'Not stated' },
              ]}
            />
          </Field>
          {values.strength === 'fault' && (
            <>
              {text('faultAmps', SYSTEM_FAULT[values.system], '900 A, 22 kA', {
                required: true,
                echo: echoAmps,
              })}
              {!direct && text('faultXOverR', 'X/R', '0 where it is not known: all resistance.')}
            </>
          )}
          {values.strength === 'impedance' && (
            <>
              {text('impedanceR', 'R of each line, ohm', '0.02', { required: true })}
              {!direct && text('impedanceX', 'X of each line, ohm', '0.12')}
            </>
          )}
        </DialogPart>
        <DialogPart title="Its run">
          <RunFields
            texts={values.run}
            errors={errors}
            lengthUnit={job.lengthUnit}
            metric={job.wireUnit === 'mm2'}
            ownBreaker
            onTexts={(run) => set('run', run)}
          />
        </DialogPart>
      </DialogForm>
    </LongDialog>
  );
}
