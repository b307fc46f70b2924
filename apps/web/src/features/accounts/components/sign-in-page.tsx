import { Link } from 'react-router-dom';
import { paths } from '../../../app/paths.ts';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { OutsidePage } from '../../../ui/outside-page.tsx';
import { useSession } from '../hooks/use-session.ts';
import { LocalNote } from './local-note.tsx';
import { SignInForm } from './sign-in-form.tsx';

export function SignInPage() {
  usePageTitle('Sign in');
  const session = useSession();
  return (
    <OutsidePage title="Sign in">
      <SignInForm />
      <p className="mt-6 flex flex-wrap gap-x-6 gap-y-2">
        <Link to={paths.signUp()}>Set up a new firm</Link>
        <Link to={paths.forgot()}>Forgot the password</Link>
      </p>
      {session.data?.local && <LocalNote />}
    </OutsidePage>
  );
}
