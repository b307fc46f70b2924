import type { DeliveryView } from '@farlug/contract/routes';
import type { ApiError } from '../../../lib/api-error.ts';
import type { FieldErrors } from '../../../lib/form-errors.ts';
import { useForm } from '../../../lib/use-form.ts';
import { Dialog } from '../../../ui/dialog.tsx';
import { Field } from '../../../ui/field.tsx';
import { Form } from '../../../ui/form.tsx';
import { TextInput } from '../../../ui/text-input.tsx';
import { LINK_DAYS_DEFAULT, LINK_DAYS_RIGHT, linkDays } from '../link-days.ts';

interface RenewDialogProps {
  delivery: DeliveryView;
  onClose: () => void;
  renew: (days: number) => Promise<ApiError | null>;
}

export function RenewDialog({ delivery, onClose, renew }: RenewDialogProps) {
  const form = useForm({
    initial: { linkDays: LINK_DAYS_DEFAULT },
    check: (values): FieldErrors => (linkDays(values.linkDays) === null ? { linkDays: LINK_DAYS_RIGHT } : {}),
    submit: async (values) => {
      const error = await renew(linkDays(values.linkDays) ?? 0);
      if (!error) onClose();
      return error;
    },
  });
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title="Renew the link"
      description={`The old link stops at once; a new one is mailed to ${delivery.recipientEmail}.`}
    >
      <Form
        label="Renew the link"
        onSubmit={form.onSubmit}
        error={form.formError}
        busy={form.busy}
        action="Mail a new link"
      >
        <Field label="Works for, days" error={form.errors.linkDays}>
          <TextInput
            inputMode="numeric"
            maxLength={10}
            value={form.values.linkDays}
            onChange={(event) => form.set('linkDays', event.target.value)}
          />
        </Field>
      </Form>
    </Dialog>
  );
}
