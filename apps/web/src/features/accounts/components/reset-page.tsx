import { freshPassword, resetPassword } from '@farlug/contract/routes';
import { useState } from 'react';
import { z } from 'zod';
import { paths } from '../../../app/paths.ts';
import { call } from '../../../lib/call.ts';
import { useForm } from '../../../lib/use-form.ts';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { LinkButton } from '../../../ui/button.tsx';
import { Field } from '../../../ui/field.tsx';
import { Form } from '../../../ui/form.tsx';
import { Message } from '../../../ui/message.tsx';
import { OutsidePage } from '../../../ui/outside-page.tsx';
import { TextInput } from '../../../ui/text-input.tsx';
import { useFragmentToken } from '../hooks/use-fragment-token.ts';
import { LinkGone } from './link-gone.tsx';

const typed = z.object({ password: freshPassword });

export function ResetPage() {
  usePageTitle('Choose a new password');
  const token = useFragmentToken();
  const [state, setState] = useState<'asking' | 'done' | 'gone'>(token ? 'asking' : 'gone');
  const form = useForm({
    initial: { password: '' },
    schema: typed,
    submit: async ({ password }) => {
      const outcome = await call(resetPassword, { body: { token: token ?? '', password } });
      if (outcome.ok) setState('done');
      else if (outcome.error.code === 'link_gone') setState('gone');
      else return outcome.error;
      return null;
    },
  });
  if (state === 'gone')
    return <LinkGone again={<LinkButton to={paths.forgot()}>Ask for a new link</LinkButton>} />;
  return (
    <OutsidePage
      title="Choose a new password"
      lead="Every other device that is signed in with the old one is signed out."
    >
      {state === 'done' ? (
        <>
          <Message kind="done">The new password holds from now on.</Message>
          <LinkButton to={paths.signIn()} look="go" big className="mt-4">
            Sign in
          </LinkButton>
        </>
      ) : (
        <Form
          label="Choose a new password"
          onSubmit={form.onSubmit}
          error={form.formError}
          busy={form.busy}
          action="Save the password"
        >
          <Field label="New password" hint="At least 12 characters." error={form.errors.password} required>
            <TextInput
              type="password"
              autoComplete="new-password"
              maxLength={200}
              value={form.values.password}
              onChange={(event) => form.set('password', event.target.value)}
            />
          </Field>
        </Form>
      )}
    </OutsidePage>
  );
}
