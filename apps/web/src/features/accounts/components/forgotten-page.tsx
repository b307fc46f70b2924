import { requestPasswordReset } from '@farlug/contract/routes';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { paths } from '../../../app/paths.ts';
import { call } from '../../../lib/call.ts';
import { useForm } from '../../../lib/use-form.ts';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { Field } from '../../../ui/field.tsx';
import { Form } from '../../../ui/form.tsx';
import { Message } from '../../../ui/message.tsx';
import { OutsidePage } from '../../../ui/outside-page.tsx';
import { TextInput } from '../../../ui/text-input.tsx';

export function ForgottenPage() {
  usePageTitle('Forgot the password');
  const [sentTo, setSentTo] = useState<string | null>(null);
  const form = useForm({
    initial: { email: '' },
    schema: requestPasswordReset.body,
    submit: async (body) => {
      const outcome = await call(requestPasswordReset, { body });
      if (!outcome.ok) return outcome.error;
      setSentTo(body.email);
      return null;
    },
  });
  return (
    <OutsidePage
      title="Forgot the password"
      lead="A link to choose a new one is mailed to the address of the account."
    >
      {sentTo && (
        <Message kind="done" className="mb-4">
          If {sentTo} has an account, a link is on its way. It works once and for a short time.
        </Message>
      )}
      <Form
        label="Ask for a link"
        onSubmit={form.onSubmit}
        error={form.formError}
        busy={form.busy}
        action={sentTo ? 'Mail it again' : 'Mail me a link'}
        beside={<Link to={paths.signIn()}>Back to signing in</Link>}
      >
        <Field label="E-mail" error={form.errors.email} required>
          <TextInput
            type="email"
            autoComplete="username"
            maxLength={254}
            value={form.values.email}
            onChange={(event) => form.set('email', event.target.value)}
          />
        </Field>
      </Form>
    </OutsidePage>
  );
}
