import { readInvitation } from '@farlug/contract/routes';
import { useQuery } from '@tanstack/react-query';
import { ApiError } from '../../../lib/api-error.ts';
import { ask } from '../../../lib/call.ts';
import { formatDay } from '../../../lib/format.ts';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { ErrorState } from '../../../ui/error-state.tsx';
import { OutsidePage } from '../../../ui/outside-page.tsx';
import { Skeleton } from '../../../ui/skeleton.tsx';
import { useFragmentToken } from '../hooks/use-fragment-token.ts';
import { ROLE_DUTIES, ROLE_WORDS } from '../role-words.ts';
import { AcceptForm } from './accept-form.tsx';
import { LinkGone } from './link-gone.tsx';

export function InvitationPage() {
  usePageTitle('Invitation');
  const token = useFragmentToken();
  const invitation = useQuery({
    queryKey: ['invitation', token],
    queryFn: ({ signal }) => ask(readInvitation, { body: { token: token ?? '' }, signal }),
    enabled: token !== null,
    staleTime: Number.POSITIVE_INFINITY,
  });
  const refused = invitation.error instanceof ApiError ? invitation.error.code : null;
  if (token === null || refused === 'link_gone' || refused === 'invalid')
    return <LinkGone message={refused === 'link_gone' ? invitation.error?.message : undefined} />;
  if (invitation.isError)
    return (
      <main id="main">
        <ErrorState
          level="h1"
          title="The invitation cannot be read now"
          onRetry={() => void invitation.refetch()}
        >
          {invitation.error.message}
        </ErrorState>
      </main>
    );
  if (invitation.isPending) return <Skeleton label="Reading the invitation" />;
  const { firmName, email, role, expiresAt, hasAccount } = invitation.data;
  return (
    <OutsidePage
      title={`${firmName} invites you`}
      lead={`As ${ROLE_WORDS[role]}: ${ROLE_DUTIES[role]}. For ${email}, until ${formatDay(expiresAt)}.`}
    >
      <AcceptForm token={token} email={email} hasAccount={hasAccount} />
    </OutsidePage>
  );
}
