import { Navigate, Outlet, useLocation, useMatch, useParams } from 'react-router-dom';
import { useSession } from '../../features/accounts/hooks/use-session.ts';
import { ErrorState } from '../../ui/error-state.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { NotFound } from '../not-found.tsx';
import { paths } from '../paths.ts';
import { Frame } from './frame.tsx';
import { placesOf } from './places.ts';
import { RailFoot } from './rail-foot.tsx';

/** The frame around everything of a firm: who is not signed in is asked to, who does not belong sees nothing. */
export function FirmFrame() {
  const { firm = '' } = useParams();
  const here = useLocation();
  const inJob = useMatch('/firms/:firm/jobs/:job/:place');
  const session = useSession();

  if (session.isPending) return <Skeleton rows={12} label="Opening your firm" />;
  if (session.isError)
    return (
      <main id="main">
        <ErrorState level="h1" title="The server does not answer" onRetry={() => void session.refetch()}>
          {session.error.message}
        </ErrorState>
      </main>
    );
  const { person, memberships } = session.data;
  if (!person) return <Navigate to={paths.signIn(`${here.pathname}${here.search}`)} replace />;
  const membership = memberships.find((entry) => entry.firmId === firm);
  if (!membership) return <NotFound />;

  return (
    <Frame
      home={paths.jobs(firm)}
      places={placesOf(firm, inJob?.params.job ?? null)}
      foot={<RailFoot person={person} membership={membership} memberships={memberships} />}
    >
      <Outlet />
    </Frame>
  );
}
