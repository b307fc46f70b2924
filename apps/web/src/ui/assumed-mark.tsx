import type { ReactNode } from 'react';

/** A value that nobody stated: dotted copper line and a raised a, wherever it counts. */
export function AssumedMark({ children, why }: { children: ReactNode; why?: string }) {
  return (
    <span title={why ? `assumed: ${why}` : 'assumed'} className="whitespace-nowrap">
      <span className="underline decoration-copper decoration-dotted decoration-1 underline-offset-3">
        {children}
      </span>
      <span aria-hidden="true" className="ml-px align-[5px] text-[10px] leading-none font-bold text-copper">
        a
      </span>
      <span className="sr-only"> assumed</span>
    </span>
  );
}
