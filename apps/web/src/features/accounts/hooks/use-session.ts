import { getSession, type SessionView } from '@farlug/contract/routes';
import { type UseQueryResult, useQuery, useQueryClient } from '@tanstack/react-query';
import { useCallback } from 'react';
import { ask, keepCsrfToken } from '../../../lib/call.ts';

export const SESSION_KEY = ['session'] as const;

export function useSession(): UseQueryResult<SessionView> {
  return useQuery({
    queryKey: SESSION_KEY,
    queryFn: async ({ signal }) => {
      const session = await ask(getSession, { signal });
      keepCsrfToken(session.csrfToken);
      return session;
    },
    staleTime: 5 * 60_000,
  });
}

/** Takes over a session that the server just answered; what another person saw is forgotten. */
export function useTakeSession(): (session: SessionView) => void {
  const cache = useQueryClient();
  return useCallback(
    (session) => {
      cache.clear();
      keepCsrfToken(session.csrfToken);
      cache.setQueryData(SESSION_KEY, session);
    },
    [cache],
  );
}
