import { changePassword, freshPassword } from '@farlug/contract/routes';
import { useState } from 'react';
import { Link, Navigate } from 'react-router-dom';
import { z } from 'zod';
import { paths } from '../../../app/paths.ts';
import { call } from '../../../lib/call.ts';
import { useForm } from '../../../lib/use-form.ts';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { Button } from '../../../ui/button.tsx';
import { Field } from '../../../ui/field.tsx';
import { Form } from '../../../ui/form.tsx';
import { Message } from '../../../ui/message.tsx';
import { OutsidePage } from '../../../ui/outside-page.tsx';
import { Skeleton } from '../../../ui/skeleton.tsx';
import { TextInput } from '../../../ui/text-input.tsx';
import { useSession } from '../hooks/use-session.ts';
import { useSignOut } from '../hooks/use-sign-out.ts';
import { ROLE_WORDS } from '../role-words.ts';

const typed = z.object({
  current: z.string().min(1, 'Enter the password that you have now.').max(200),
  password: freshPassword,
});

export function AccountPage() {
  usePageTitle('Account');
  const session = useSession();
  const leave = useSignOut();
  if (session.isPending) return <Skeleton label="Opening your account" />;
  if (!session.data?.person) return <Navigate to={paths.signIn(paths.account())} replace />;
  const { person, memberships } = session.data;
  return (
    <OutsidePage title={person.name} lead={person.email}>
      <h2 className="border-b border-ink pb-1 text-body">Firms</h2>
      {memberships.length === 0 && (
        <p className="py-2 text-ink-soft">
          You belong to no firm now. Ask an administrator for an invitation, or{' '}
          <Link to={paths.signUp()}>set up a firm</Link> with another address.
        </p>
      )}
      <ul className="mb-6">
        {memberships.map((entry) => (
          <li key={entry.firmId} className="flex items-center justify-between border-b border-hair py-2">
            <Link to={paths.jobs(entry.firmId)}>{entry.firmName}</Link>
            <span className="text-grid text-ink-soft">{ROLE_WORDS[entry.role]}</span>
          </li>
        ))}
      </ul>
      <h2 className="mb-3 border-b border-ink pb-1 text-body">Password</h2>
      <PasswordForm email={person.email} />
      <h2 className="mt-8 mb-3 border-b border-ink pb-1 text-body">This device</h2>
      <Button big onClick={() => void leave()}>
        Sign out
      </Button>
    </OutsidePage>
  );
}

function PasswordForm({ email }: { email: string }) {
  const [done, setDone] = useState(false);
  const form = useForm({
    initial: { current: '', password: '' },
    schema: typed,
    submit: async (body) => {
      setDone(false);
      const outcome = await call(changePassword, { body });
      if (!outcome.ok) return outcome.error;
      form.reset({ current: '', password: '' });
      setDone(true);
      return null;
    },
  });
  return (
    <Form
      label="Change the password"
      onSubmit={form.onSubmit}
      error={form.formError}
      busy={form.busy}
      action="Change the password"
      plain
    >
      <input type="hidden" autoComplete="username" value={email} readOnly />
      <Field label="Password now" error={form.errors.current}>
        <TextInput
          type="password"
          autoComplete="current-password"
          maxLength={200}
          value={form.values.current}
          onChange={(event) => form.set('current', event.target.value)}
        />
      </Field>
      <Field label="New password" hint="At least 12 characters." error={form.errors.password}>
        <TextInput
          type="password"
          autoComplete="new-password"
          maxLength={200}
          value={form.values.password}
          onChange={(event) => form.set('password', event.target.value)}
        />
      </Field>
      {done && <Message kind="done">The new password holds from now on.</Message>}
    </Form>
  );
}
