import { acceptInvitation, freshPassword, name } from '@farlug/contract/routes';
import { z } from 'zod';
import { call } from '../../../lib/call.ts';
import { useForm } from '../../../lib/use-form.ts';
import { Field } from '../../../ui/field.tsx';
import { Form } from '../../../ui/form.tsx';
import { TextInput } from '../../../ui/text-input.tsx';
import { useAfterSignIn } from '../hooks/use-after-sign-in.ts';

const newcomer = z.object({ name, password: freshPassword });
const known = z.object({ name: z.string(), password: z.string().min(1, 'Enter your password.').max(200) });

interface AcceptFormProps {
  token: string;
  email: string;
  /** The person signs in instead of choosing a password. */
  hasAccount: boolean;
}

export function AcceptForm({ token, email, hasAccount }: AcceptFormProps) {
  const arrived = useAfterSignIn();
  const form = useForm({
    initial: { name: '', password: '' },
    schema: hasAccount ? known : newcomer,
    submit: async (values) => {
      const outcome = await call(acceptInvitation, {
        body: { token, name: hasAccount ? null : values.name, password: values.password },
      });
      if (!outcome.ok) return outcome.error;
      arrived(outcome.data);
      return null;
    },
  });
  return (
    <Form
      label="Accept the invitation"
      onSubmit={form.onSubmit}
      error={form.formError}
      busy={form.busy}
      action="Accept"
    >
      <input type="hidden" autoComplete="username" value={email} readOnly />
      {!hasAccount && (
        <Field
          label="Your name"
          hint="As it stands in reports that you issue."
          error={form.errors.name}
          required
        >
          <TextInput
            autoComplete="name"
            maxLength={200}
            value={form.values.name}
            onChange={(event) => form.set('name', event.target.value)}
          />
        </Field>
      )}
      <Field
        label={hasAccount ? 'The password of your account' : 'Choose a password'}
        hint={hasAccount ? undefined : 'At least 12 characters.'}
        error={form.errors.password}
        required
      >
        <TextInput
          type="password"
          autoComplete={hasAccount ? 'current-password' : 'new-password'}
          maxLength={200}
          value={form.values.password}
          onChange={(event) => form.set('password', event.target.value)}
        />
      </Field>
    </Form>
  );
}
