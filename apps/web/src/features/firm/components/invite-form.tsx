import { FIRM_ROLES, type FirmRole } from '@farlug/contract/route';
import { inviteMember } from '@farlug/contract/routes';
import { useState } from 'react';
import { useForm } from '../../../lib/use-form.ts';
import { Field } from '../../../ui/field.tsx';
import { Form } from '../../../ui/form.tsx';
import { Message } from '../../../ui/message.tsx';
import { Select } from '../../../ui/select.tsx';
import { TextInput } from '../../../ui/text-input.tsx';
import type { FirmActions } from '../hooks/use-firm-actions.ts';
import { ROLE_DUTIES, ROLE_NAMES } from '../role-words.ts';
import { PartHeading } from './part-heading.tsx';

export function InviteForm({ invite }: { invite: FirmActions['invite'] }) {
  const [invited, setInvited] = useState<string | null>(null);
  const form = useForm({
    initial: { email: '', role: 'contractor' as FirmRole },
    schema: inviteMember.body,
    submit: async ({ email, role }) => {
      setInvited(null);
      const error = await invite(email, role);
      if (error) return error;
      setInvited(email);
      form.reset({ email: '', role });
      return null;
    },
  });
  return (
    <section className="mt-4 border-t border-ink bg-sheet pb-6">
      <PartHeading title="Invite somebody" note="A link is mailed to them; it works once." />
      <Form
        label="Invite somebody"
        className="max-w-120 px-4"
        onSubmit={form.onSubmit}
        error={form.formError}
        busy={form.busy}
        action="Send the invitation"
      >
        <Field label="E-mail" error={form.errors.email} required>
          <TextInput
            type="email"
            maxLength={254}
            value={form.values.email}
            onChange={(event) => form.set('email', event.target.value)}
          />
        </Field>
        <Field label="Role" hint={ROLE_DUTIES[form.values.role]} error={form.errors.role}>
          <Select
            value={form.values.role}
            onValue={(role: FirmRole) => form.set('role', role)}
            choices={FIRM_ROLES.map((role) => ({ value: role, label: ROLE_NAMES[role] }))}
          />
        </Field>
        {invited && <Message kind="done">An invitation is on its way to {invited}.</Message>}
      </Form>
    </section>
  );
}
