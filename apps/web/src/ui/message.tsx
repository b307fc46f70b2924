import type { ReactNode } from 'react';
import { cx } from './cx.ts';
import { Glyph } from './glyph.tsx';

/** One line about what was just done or refused, where it was done. */
export function Message({
  kind,
  children,
  className,
}: {
  kind: 'done' | 'wrong' | 'note';
  children: ReactNode;
  className?: string;
}) {
  return (
    <div
      role={kind === 'wrong' ? 'alert' : 'status'}
      className={cx(
        'flex items-baseline gap-2 border-l-3 bg-sheet px-3 py-2 text-grid',
        kind === 'wrong' ? 'border-over' : kind === 'done' ? 'border-within' : 'border-line',
        className,
      )}
    >
      {kind !== 'note' && (
        <Glyph
          kind={kind === 'wrong' ? 'over' : 'within'}
          className={kind === 'wrong' ? 'text-over' : 'text-within'}
        />
      )}
      <div className="min-w-0">{children}</div>
    </div>
  );
}
