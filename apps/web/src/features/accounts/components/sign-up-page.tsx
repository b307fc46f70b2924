import { signUp } from '@farlug/contract/routes';
import { Link } from 'react-router-dom';
import { paths } from '../../../app/paths.ts';
import { call } from '../../../lib/call.ts';
import { useForm } from '../../../lib/use-form.ts';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { Field } from '../../../ui/field.tsx';
import { Form } from '../../../ui/form.tsx';
import { OutsidePage } from '../../../ui/outside-page.tsx';
import { TextInput } from '../../../ui/text-input.tsx';
import { useAfterSignIn } from '../hooks/use-after-sign-in.ts';

export function SignUpPage() {
  usePageTitle('Set up a firm');
  const arrived = useAfterSignIn();
  const form = useForm({
    initial: { name: '', email: '', password: '', firmName: '' },
    schema: signUp.body,
    submit: async (body) => {
      const outcome = await call(signUp, { body });
      if (!outcome.ok) return outcome.error;
      arrived(outcome.data);
      return null;
    },
  });
  const text = (field: 'name' | 'email' | 'password' | 'firmName') => ({
    value: form.values[field],
    onChange: (event: { target: { value: string } }) => form.set(field, event.target.value),
  });
  return (
    <OutsidePage
      title="Set up a firm"
      lead="You become its administrator and can invite contractors and estimators by e-mail."
    >
      <Form
        label="Set up a firm"
        onSubmit={form.onSubmit}
        error={form.formError}
        busy={form.busy}
        action="Set up the firm"
        beside={<Link to={paths.signIn()}>Sign in instead</Link>}
      >
        <Field label="Name of the firm" error={form.errors.firmName} required>
          <TextInput autoComplete="organization" maxLength={200} {...text('firmName')} />
        </Field>
        <Field
          label="Your name"
          hint="As it stands in reports that you issue."
          error={form.errors.name}
          required
        >
          <TextInput autoComplete="name" maxLength={200} {...text('name')} />
        </Field>
        <Field label="E-mail" error={form.errors.email} required>
          <TextInput type="email" autoComplete="username" maxLength={254} {...text('email')} />
        </Field>
        <Field label="Password" hint="At least 12 characters." error={form.errors.password} required>
          <TextInput type="password" autoComplete="new-password" maxLength={200} {...text('password')} />
        </Field>
      </Form>
    </OutsidePage>
  );
}
