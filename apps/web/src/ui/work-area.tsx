import type { ReactNode } from 'react';
import { cx } from './cx.ts';

/** The work area and, where a run is chosen, the side sheet beside it. */
export function WorkArea({ children, side }: { children: ReactNode; side?: ReactNode }) {
  return (
    <div
      data-print="flow"
      className={cx(
        'grid min-h-0 flex-1 grid-cols-[minmax(0,1fr)]',
        side && 'wide:grid-cols-[minmax(0,1fr)_380px]',
      )}
    >
      <div className="flex min-h-0 min-w-0 flex-col" data-print="flow">
        {children}
      </div>
      {side}
    </div>
  );
}
