import type { SessionView } from '@farlug/contract/routes';
import { useCallback } from 'react';
import { useNavigate, useSearchParams } from 'react-router-dom';
import { paths } from '../../../app/paths.ts';
import { useTakeSession } from './use-session.ts';

/** Where a signed-in person goes first: the page that asked for it, or the jobs of their firm. */
export function homeOf(session: SessionView): string {
  const firm = session.memberships[0];
  return firm ? paths.jobs(firm.firmId) : paths.account();
}

const ownAddress = (next: string | null) => (next?.startsWith('/') && !next.startsWith('//') ? next : null);

export function useAfterSignIn(): (session: SessionView) => void {
  const navigate = useNavigate();
  const take = useTakeSession();
  const [query] = useSearchParams();
  return useCallback(
    (session) => {
      take(session);
      navigate(ownAddress(query.get('next')) ?? homeOf(session), { replace: true });
    },
    [navigate, take, query],
  );
}
