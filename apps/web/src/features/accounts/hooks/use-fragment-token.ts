import { useEffect, useState } from 'react';

/** The token of a mailed link, read once from behind the #, which is then taken out of the address and history. */
export function useFragmentToken(): string | null {
  const [token] = useState(() => window.location.hash.replace(/^#(token=)?/, '') || null);
  useEffect(() => {
    if (window.location.hash)
      window.history.replaceState(
        window.history.state,
        '',
        window.location.pathname + window.location.search,
      );
  }, []);
  return token;
}
