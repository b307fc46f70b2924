import { signOut } from '@farlug/contract/routes';
import { useQueryClient } from '@tanstack/react-query';
import { useCallback } from 'react';
import { forgetKeptEdits } from '../../../job/job-port.ts';
import { call } from '../../../lib/call.ts';

/** Signs out and forgets everything that was shown or kept. The page is loaded anew, so that nothing stays in memory. */
export function useSignOut(): () => Promise<void> {
  const cache = useQueryClient();
  return useCallback(async () => {
    await call(signOut, {});
    forgetKeptEdits();
    forgetKeptForms();
    cache.clear();
    window.location.assign('/');
  }, [cache]);
}

function forgetKeptForms(): void {
  try {
    sessionStorage.clear();
  } catch {
    // A browser that stores nothing has nothing to forget.
  }
}
