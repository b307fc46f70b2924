import { SignInForm } from '../features/accounts/components/sign-in-form.tsx';
import { homeOf } from '../features/accounts/hooks/use-after-sign-in.ts';
import { useSession } from '../features/accounts/hooks/use-session.ts';
import { FrontPage } from '../features/front/components/front-page.tsx';
import { BriefCautions } from './brief-cautions.tsx';

export function Component() {
  const session = useSession().data;
  return (
    <FrontPage
      home={session?.person ? homeOf(session) : null}
      signIn={<SignInForm inline />}
      local={session?.local ?? false}
      cautions={<BriefCautions />}
    />
  );
}
