import { DEFAULTS } from '@farlug/contract/presets';
import { useState } from 'react';
import { useForm } from '../../../lib/use-form.ts';
import { Button } from '../../../ui/button.tsx';
import { LeaveGuard } from '../../../ui/leave-guard.tsx';
import { Message } from '../../../ui/message.tsx';
import { RowHead, Table, Td, Th } from '../../../ui/table.tsx';
import { TextInput } from '../../../ui/text-input.tsx';
import type { FirmPartProps } from '../firm-part.ts';
import { PartHeading } from './part-heading.tsx';

/** Each starting value with its ground, and the firm’s house rule beside it. */
export function DefaultsPart({ firm, actions, mayManage }: FirmPartProps) {
  const [saved, setSaved] = useState(false);
  const form = useForm<Record<string, string>>({
    initial: { ...firm.defaults },
    submit: async (values) => {
      setSaved(false);
      const kept = Object.entries(values).map(([id, text]) => [id, text.trim()] as const);
      const error = await actions.saveDefaults(Object.fromEntries(kept.filter(([, text]) => text !== '')));
      setSaved(error === null);
      return error;
    },
  });
  return (
    <form noValidate aria-label="Defaults" onSubmit={form.onSubmit}>
      <LeaveGuard when={form.changed} />
      <PartHeading
        title="Starting defaults"
        note="What a new circuit starts from where nobody says otherwise, and why. A house rule is shown to your people beside the default; the figures themselves are changed on each job."
      />
      <Table stacked caption="Starting defaults and their grounds">
        <thead>
          <tr>
            <Th>Default</Th>
            <Th>Ground</Th>
            <Th>House rule, if different</Th>
          </tr>
        </thead>
        <tbody>
          {DEFAULTS.map(({ id, text, ground }) => (
            <tr key={id}>
              <RowHead className="min-w-64 font-normal">{text}</RowHead>
              <Td label="Ground" className="min-w-48 text-ink-soft">
                {ground}
              </Td>
              <Td label="House rule, if different" className="min-w-56">
                {mayManage ? (
                  <TextInput
                    compact
                    aria-label={`House rule: ${text}`}
                    maxLength={80}
                    value={form.values[id] ?? ''}
                    onChange={(event) => form.set(id, event.target.value)}
                  />
                ) : (
                  (firm.defaults[id] ?? '')
                )}
              </Td>
            </tr>
          ))}
        </tbody>
      </Table>
      {mayManage && (
        <div className="flex flex-wrap items-center gap-4 px-4 py-4">
          <Button type="submit" look="go" big aria-disabled={form.busy || undefined}>
            Save the house rules
          </Button>
          {form.formError && <Message kind="wrong">{form.formError}</Message>}
          {saved && !form.changed && <Message kind="done">Saved.</Message>}
        </div>
      )}
    </form>
  );
}
