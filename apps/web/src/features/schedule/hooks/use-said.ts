import { useCallback, useState } from 'react';
import type { Typed } from './use-schedule-edits.ts';

/** What was done or refused last, as the page says it in words. */
export function useSaid(): [string | null, (done: Typed, words: string | null) => void] {
  const [said, setSaid] = useState<string | null>(null);
  const say = useCallback((done: Typed, words: string | null) => setSaid(done.problem ?? words), []);
  return [said, say];
}
