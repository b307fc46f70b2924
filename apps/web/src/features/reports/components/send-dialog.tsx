import { newId } from '@farlug/contract/edit';
import { email, name, type sendRevision } from '@farlug/contract/routes';
import { useState } from 'react';
import { z } from 'zod';
import type { ApiError } from '../../../lib/api-error.ts';
import { useForm } from '../../../lib/use-form.ts';
import { Dialog } from '../../../ui/dialog.tsx';
import { Field } from '../../../ui/field.tsx';
import { Form } from '../../../ui/form.tsx';
import { TextArea, TextInput } from '../../../ui/text-input.tsx';
import { LINK_DAYS_DEFAULT, LINK_DAYS_RIGHT, linkDays } from '../link-days.ts';

const typed = z.object({
  recipientName: name,
  recipientEmail: email,
  linkDays: z.string().refine((text) => linkDays(text) !== null, LINK_DAYS_RIGHT),
});

interface SendDialogProps {
  letter: string;
  onClose: () => void;
  send: (body: z.input<typeof sendRevision.body>) => Promise<ApiError | null>;
}

export function SendDialog({ letter, onClose, send }: SendDialogProps) {
  const [delivery] = useState(newId);
  const form = useForm({
    initial: { recipientName: '', recipientEmail: '', message: '', linkDays: LINK_DAYS_DEFAULT },
    schema: typed,
    submit: async (values) => {
      const error = await send({ ...values, delivery, linkDays: linkDays(values.linkDays) ?? 0 });
      if (!error) onClose();
      return error;
    },
  });
  const { values, set, errors } = form;
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Send revision ${letter}`}
      description="The PDF goes along, with a link that is the recipient’s own. No account is needed to read, check and decide."
    >
      <Form
        label={`Send revision ${letter}`}
        onSubmit={form.onSubmit}
        error={form.formError}
        busy={form.busy}
        action="Send"
      >
        <Field label="Name of the inspector" error={errors.recipientName} required>
          <TextInput
            maxLength={200}
            value={values.recipientName}
            onChange={(event) => set('recipientName', event.target.value)}
          />
        </Field>
        <Field label="E-mail" error={errors.recipientEmail} required>
          <TextInput
            type="email"
            maxLength={254}
            value={values.recipientEmail}
            onChange={(event) => set('recipientEmail', event.target.value)}
          />
        </Field>
        <Field label="Message" hint="The cautions follow it." error={errors.message}>
          <TextArea
            rows={4}
            maxLength={4000}
            value={values.message}
            onChange={(event) => set('message', event.target.value)}
          />
        </Field>
        <Field label="The link works for, days" error={errors.linkDays}>
          <TextInput
            inputMode="numeric"
            maxLength={10}
            value={values.linkDays}
            onChange={(event) => set('linkDays', event.target.value)}
          />
        </Field>
      </Form>
    </Dialog>
  );
}
