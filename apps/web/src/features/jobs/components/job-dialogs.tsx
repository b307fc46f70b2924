import type { JobSummary } from '@farlug/contract/routes';
import { useState } from 'react';
import type { ApiError } from '../../../lib/api-error.ts';
import type { FieldErrors } from '../../../lib/form-errors.ts';
import { useForm } from '../../../lib/use-form.ts';
import { Button } from '../../../ui/button.tsx';
import { Dialog } from '../../../ui/dialog.tsx';
import { Field } from '../../../ui/field.tsx';
import { Form } from '../../../ui/form.tsx';
import { Message } from '../../../ui/message.tsx';
import { TextInput } from '../../../ui/text-input.tsx';

export function DuplicateDialog({
  job,
  onClose,
  duplicate,
}: {
  job: JobSummary;
  onClose: () => void;
  duplicate: (name: string) => Promise<ApiError | null>;
}) {
  const form = useForm({
    initial: { name: `${job.name.slice(0, 380)}, copy` },
    check: ({ name }): FieldErrors => (name.trim() === '' ? { name: 'Enter a name for the copy.' } : {}),
    submit: ({ name }) => duplicate(name.trim()),
  });
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Duplicate ${job.name}`}
      description="Schedule, service and limits are copied as they stand now; revisions, deliveries and decisions are not."
    >
      <Form
        label="Duplicate"
        onSubmit={form.onSubmit}
        error={form.formError}
        busy={form.busy}
        action="Make the copy"
      >
        <Field label="Name of the copy" error={form.errors.name}>
          <TextInput
            maxLength={400}
            value={form.values.name}
            onChange={(event) => form.set('name', event.target.value)}
          />
        </Field>
      </Form>
    </Dialog>
  );
}

export function DeleteDialog({
  job,
  onClose,
  remove,
}: {
  job: JobSummary;
  onClose: () => void;
  remove: () => Promise<ApiError | null>;
}) {
  const [refused, setRefused] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const confirm = async () => {
    setBusy(true);
    const error = await remove();
    setBusy(false);
    setRefused(error?.message ?? null);
  };
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Delete ${job.name}?`}
      description="The whole schedule goes, and it cannot be brought back. A job file downloaded before is a backup."
      actions={
        <>
          <Button look="danger" big aria-disabled={busy || undefined} onClick={() => !busy && void confirm()}>
            Delete the job
          </Button>
          <Button big onClick={onClose}>
            Keep it
          </Button>
        </>
      }
    >
      {refused && <Message kind="wrong">{refused}</Message>}
    </Dialog>
  );
}
