import { deletePanelEdit, duplicatePanelEdit } from '@farlug/contract/schedule';
import { useState } from 'react';
import type { FieldErrors } from '../../../lib/form-errors.ts';
import { useForm } from '../../../lib/use-form.ts';
import { Button } from '../../../ui/button.tsx';
import { Dialog } from '../../../ui/dialog.tsx';
import { Form } from '../../../ui/form.tsx';
import { Message } from '../../../ui/message.tsx';
import { type JobDialogProps, taken } from './job-dialog.ts';
import { whatGoesWith } from './panel-removal.ts';
import { TypedInput } from './typed-input.tsx';

interface PanelActionProps extends Omit<JobDialogProps, 'onAsk'> {
  panelId: string;
}

/** A copy of a panel with its circuits in the same spaces, under another name. */
export function DuplicatePanelDialog({
  rows,
  apply,
  onClose,
  panelId,
  onDone,
}: PanelActionProps & { onDone: (panelId: string) => void }) {
  const code = rows.bus.get(rows.panel.get(panelId)?.busId ?? '')?.code ?? '';
  const form = useForm({
    initial: { code: '' },
    check: ({ code: typed }): FieldErrors => {
      const { problem } = duplicatePanelEdit(rows, panelId, typed);
      return problem ? { code: problem } : {};
    },
    submit: async ({ code: typed }) => {
      const { edit, id } = duplicatePanelEdit(rows, panelId, typed);
      const error = taken(apply, edit);
      if (!error && id) onDone(id);
      return error;
    },
  });
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Duplicate ${code}`}
      description="Its circuits stand in the same spaces, and it is fed like it from the next open ones. Panels that it feeds are not copied."
    >
      <Form
        label={`Duplicate ${code}`}
        onSubmit={form.onSubmit}
        error={form.formError}
        busy={form.busy}
        action="Make the copy"
      >
        <TypedInput
          label="Name of the copy"
          hint="As LP-2."
          required
          maxLength={60}
          value={form.values.code}
          error={form.errors.code}
          onText={(typed) => form.set('code', typed)}
        />
      </Form>
    </Dialog>
  );
}

/** Asks before a panel goes, and says what goes with it. */
export function DeletePanelDialog({
  rows,
  apply,
  onClose,
  panelId,
  onDone,
}: PanelActionProps & { onDone: () => void }) {
  const [refused, setRefused] = useState<string | null>(null);
  const code = rows.bus.get(rows.panel.get(panelId)?.busId ?? '')?.code ?? 'the panel';
  const { goes, stays } = whatGoesWith(rows, panelId);
  const remove = () => {
    const { edit, problem } = deletePanelEdit(rows, panelId);
    const wrong = problem ?? taken(apply, edit)?.message ?? null;
    setRefused(wrong);
    if (wrong === null) onDone();
  };
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Delete ${code}?`}
      description="One step, which undo takes back."
      actions={
        <>
          <Button look="danger" big onClick={remove}>
            Delete {code}
          </Button>
          <Button big onClick={onClose}>
            Keep it
          </Button>
        </>
      }
    >
      {refused && <Message kind="wrong">{refused}</Message>}
      <p className="text-grid">With it go:</p>
      <ul className="list-disc pl-5 text-grid">
        {goes.map((one) => (
          <li key={one}>{one}</li>
        ))}
      </ul>
      {stays.length > 0 && (
        <Message kind="note" className="mt-3">
          {stays.join(', ')} {stays.length === 1 ? 'stays' : 'stay'} without a feed: until something else
          feeds {stays.length === 1 ? 'it' : 'them'}, {stays.length === 1 ? 'its' : 'their'} circuits are left
          out of the results.
        </Message>
      )}
    </Dialog>
  );
}
