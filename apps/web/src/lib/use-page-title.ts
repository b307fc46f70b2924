import { useEffect } from 'react';

/** The document's title while a page is shown: the most particular part first. */
export function usePageTitle(...parts: (string | null | undefined)[]): void {
  const title = [...parts.filter(Boolean), 'Farlug'].join(', ');
  useEffect(() => {
    document.title = title;
  }, [title]);
}
