import { saveFirmSettings } from '@farlug/contract/routes';
import { useState } from 'react';
import { useForm } from '../../../lib/use-form.ts';
import { Field } from '../../../ui/field.tsx';
import { Form } from '../../../ui/form.tsx';
import { LeaveGuard } from '../../../ui/leave-guard.tsx';
import { Message } from '../../../ui/message.tsx';
import { Segmented } from '../../../ui/segmented.tsx';
import { TextArea, TextInput } from '../../../ui/text-input.tsx';
import type { FirmPartProps } from '../firm-part.ts';
import { PartHeading } from './part-heading.tsx';

export function WordingPart({ firm, actions, mayManage }: FirmPartProps) {
  const [saved, setSaved] = useState(false);
  const form = useForm({
    initial: firm.settings,
    schema: saveFirmSettings.body,
    submit: async (settings) => {
      setSaved(false);
      const error = await actions.saveSettings(settings);
      setSaved(error === null);
      return error;
    },
  });
  const { values, set, errors } = form;
  return (
    <>
      <PartHeading
        title="Report and notices"
        note="What stands at the head of every report, and what your firm adds after the fixed cautions. Reports that were issued keep their wording."
      />
      <Form
        label="Report and notices"
        className="max-w-160 px-4 pb-8"
        onSubmit={form.onSubmit}
        error={form.formError}
        busy={form.busy}
        action="Save"
        disabled={!mayManage}
      >
        <Field label="Name of the firm" error={errors.name} required>
          <TextInput
            maxLength={200}
            disabled={!mayManage}
            value={values.name}
            onChange={(event) => set('name', event.target.value)}
          />
        </Field>
        <Field
          label="Heading of reports"
          hint="Address, license number, telephone."
          error={errors.reportHeading}
        >
          <TextArea
            rows={2}
            maxLength={400}
            disabled={!mayManage}
            value={values.reportHeading}
            onChange={(event) => set('reportHeading', event.target.value)}
          />
        </Field>
        <Field
          label="Your own notices"
          hint="Printed after the fixed cautions on every page, report and message, never in their place."
          error={errors.noticeWording}
        >
          <TextArea
            rows={5}
            maxLength={4000}
            disabled={!mayManage}
            value={values.noticeWording}
            onChange={(event) => set('noticeWording', event.target.value)}
          />
        </Field>
        <Field label="Currency" hint="Three letters, as USD or EUR." error={errors.currency}>
          <TextInput
            maxLength={3}
            className="max-w-28"
            disabled={!mayManage}
            value={values.currency}
            onChange={(event) => set('currency', event.target.value.toUpperCase())}
          />
        </Field>
        <Field label="New jobs start in">
          <Segmented
            value={values.lengthUnit}
            disabled={!mayManage}
            onValue={(unit: 'ft' | 'm') => set('lengthUnit', unit)}
            choices={[
              { value: 'ft', label: 'Feet' },
              { value: 'm', label: 'Metres' },
            ]}
          />
        </Field>
        <Field label="with conductor sizes in">
          <Segmented
            value={values.wireUnit}
            disabled={!mayManage}
            onValue={(unit: 'awg' | 'mm2') => set('wireUnit', unit)}
            choices={[
              { value: 'awg', label: 'AWG and kcmil' },
              { value: 'mm2', label: 'mm²' },
            ]}
          />
        </Field>
        <LeaveGuard when={form.changed} />
        {saved && !form.changed && <Message kind="done">Saved. Reports from now on carry it.</Message>}
      </Form>
    </>
  );
}
