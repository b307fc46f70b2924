import type { ReactNode } from 'react';
import { cx } from './cx.ts';

/** A region that may scroll and therefore can be reached by keyboard. */
export function Scroller({
  label,
  className,
  children,
}: {
  label: string;
  className?: string;
  children: ReactNode;
}) {
  return (
    <section
      aria-label={label}
      // biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls has to be reachable by keyboard
      tabIndex={0}
      data-print="flow"
      className={cx('relative -outline-offset-2', className)}
    >
      {children}
    </section>
  );
}
