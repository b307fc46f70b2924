import { signOut } from '@farlug/contract/routes';
import { useQueryClient } from '@tanstack/react-query';
import { useCallback } from 'react';
import { call } from '../../../lib/call.ts';

/** Signs out and forgets everything that was shown. The page is loaded anew, so that nothing stays in memory. */
export function useSignOut(): () => Promise<void> {
  const cache = useQueryClient();
  return useCallback(async () => {
    await call(signOut, {});
    cache.clear();
    window.location.assign('/');
  }, [cache]);
}
