import type { ReactNode } from 'react';
import { Button } from './button.tsx';

interface ErrorStateProps {
  title: string;
  children?: ReactNode;
  /** For whoever is asked for help. */
  requestId?: string | null;
  onRetry?: () => void;
  actions?: ReactNode;
  /** `h1` where it stands in place of a whole page. */
  level?: 'h1' | 'h2';
}

/** A part of the page that could not be shown; the rest goes on. */
export function ErrorState({
  title,
  children,
  requestId,
  onRetry,
  actions,
  level: Heading = 'h2',
}: ErrorStateProps) {
  return (
    <section role="alert" className="max-w-160 px-4 py-8">
      <Heading className="text-title">
        <span aria-hidden="true" className="mr-2 text-over">
          ▲
        </span>
        {title}
      </Heading>
      {children && <div className="mt-2 text-ink-soft">{children}</div>}
      {requestId && <p className="mt-2 text-label text-ink-soft">Request {requestId}</p>}
      {(onRetry || actions) && (
        <div className="mt-4 flex flex-wrap gap-3">
          {onRetry && <Button onClick={onRetry}>Try again</Button>}
          {actions}
        </div>
      )}
    </section>
  );
}
