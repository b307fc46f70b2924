import { openInspection } from '@farlug/contract/routes';
import { useEffect, useRef, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { paths } from '../../../app/paths.ts';
import type { ApiError } from '../../../lib/api-error.ts';
import { call } from '../../../lib/call.ts';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { ErrorState } from '../../../ui/error-state.tsx';
import { Skeleton } from '../../../ui/skeleton.tsx';
import { LinkEnded } from './link-ended.tsx';

/** Exchanges the token behind the # of a mailed link for a cookie, and goes on at a clean address. */
export function OpenLinkPage() {
  usePageTitle('Opening the report');
  const navigate = useNavigate();
  const [refused, setRefused] = useState<ApiError | 'no-token' | null>(null);
  const asked = useRef(false);
  useEffect(() => {
    if (asked.current) return;
    asked.current = true;
    const token = window.location.hash.replace(/^#(token=)?/, '');
    window.history.replaceState(window.history.state, '', window.location.pathname);
    if (!token) {
      setRefused('no-token');
      return;
    }
    void call(openInspection, { body: { token } }).then((outcome) => {
      if (outcome.ok) navigate(paths.inspection(), { replace: true });
      else setRefused(outcome.error);
    });
  }, [navigate]);

  if (refused === null) return <Skeleton label="Opening the report" rows={10} />;
  if (refused === 'no-token' || refused.code === 'link_gone' || refused.code === 'invalid')
    return <LinkEnded />;
  return (
    <main id="main">
      <ErrorState level="h1" title="The report cannot be opened now">
        {refused.message} Then open the link of the message once more.
      </ErrorState>
    </main>
  );
}
