import { signIn } from '@farlug/contract/routes';
import { call } from '../../../lib/call.ts';
import { useForm } from '../../../lib/use-form.ts';
import { Field } from '../../../ui/field.tsx';
import { Form } from '../../../ui/form.tsx';
import { TextInput } from '../../../ui/text-input.tsx';
import { useAfterSignIn } from '../hooks/use-after-sign-in.ts';

/** `inline` stands on one line, as at the foot of the front page. */
export function SignInForm({ inline = false }: { inline?: boolean }) {
  const arrived = useAfterSignIn();
  const form = useForm({
    initial: { email: '', password: '' },
    schema: signIn.body,
    submit: async (body) => {
      const outcome = await call(signIn, { body });
      if (!outcome.ok) return outcome.error;
      arrived(outcome.data);
      return null;
    },
  });
  return (
    <Form
      label="Sign in"
      onSubmit={form.onSubmit}
      error={form.formError}
      busy={form.busy}
      action="Sign in"
      plain={inline}
      className={inline ? 'desk:flex desk:flex-wrap desk:items-end desk:gap-3 desk:space-y-0' : undefined}
    >
      <Field label="E-mail" error={form.errors.email} className={inline ? 'desk:w-54' : undefined}>
        <TextInput
          type="email"
          autoComplete="username"
          value={form.values.email}
          maxLength={254}
          onChange={(event) => form.set('email', event.target.value)}
        />
      </Field>
      <Field label="Password" error={form.errors.password} className={inline ? 'desk:w-44' : undefined}>
        <TextInput
          type="password"
          autoComplete="current-password"
          value={form.values.password}
          maxLength={200}
          onChange={(event) => form.set('password', event.target.value)}
        />
      </Field>
    </Form>
  );
}
