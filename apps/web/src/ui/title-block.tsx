import type { ReactNode } from 'react';
import { cx } from './cx.ts';

/** The title block of a job, as on a drawing: cells parted by rules, 2 px of ink above. */
export function TitleBlock({ children, action }: { children: ReactNode; action?: ReactNode }) {
  return (
    <section
      aria-label="Title block"
      className="flex min-w-0 overflow-x-auto border-t-2 border-b border-ink bg-sheet desk:h-19"
    >
      {children}
      {action && (
        <div
          className="ml-auto hidden flex-none items-center border-l border-rule px-4 desk:flex"
          data-print="never"
        >
          {action}
        </div>
      )}
    </section>
  );
}

interface TitleCellProps {
  label: ReactNode;
  children: ReactNode;
  sub?: ReactNode;
  strong?: boolean;
  /** Shown on a phone too, where only what matters most has room. */
  phone?: boolean;
  /** May give way where the line is short. */
  shrink?: boolean;
}

export function TitleCell({
  label,
  children,
  sub,
  strong = false,
  phone = false,
  shrink = false,
}: TitleCellProps) {
  return (
    <div
      className={cx(
        'min-w-0 flex-col justify-center border-l border-rule px-3 whitespace-nowrap first:border-l-0 first:pl-4',
        phone ? 'flex py-1.5 desk:py-0' : 'hidden desk:flex',
        shrink ? 'shrink' : 'flex-none',
      )}
    >
      <span className="text-label text-ink-soft">{label}</span>
      <div className={cx('truncate text-body', strong && 'font-bold')}>{children}</div>
      {sub && <div className="truncate text-label text-ink-soft">{sub}</div>}
    </div>
  );
}
