import type { ReactNode } from 'react';
import { cx } from './cx.ts';

/** The title block of a job, as on a drawing: cells parted by rules, 2 px of ink above. */
export function TitleBlock({ children, action }: { children: ReactNode; action?: ReactNode }) {
  return (
    <section
      aria-label="Title block"
      className="flex min-w-0 flex-none flex-wrap border-t-2 border-b border-ink bg-sheet desk:h-19 desk:flex-nowrap desk:overflow-hidden"
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
  /** From which width on; the cells that matter less come last. */
  from?: 'desk' | 'wide';
  /** May give way where the line is short. */
  shrink?: boolean;
}

export function TitleCell({
  label,
  children,
  sub,
  strong = false,
  phone = false,
  from = 'desk',
  shrink = false,
}: TitleCellProps) {
  const shown = phone
    ? 'flex grow border-b border-b-hair py-1.5 desk:grow-0 desk:border-b-0 desk:py-0'
    : from === 'wide'
      ? 'hidden wide:flex'
      : 'hidden desk:flex';
  return (
    <div
      className={cx(
        'flex-col justify-center border-l border-l-rule px-3 whitespace-nowrap first:w-full first:border-l-0 first:pl-4 desk:first:w-auto',
        shown,
        shrink ? 'min-w-26 shrink' : 'max-w-full shrink-0 desk:max-w-64',
      )}
    >
      <span className="truncate text-label text-ink-soft">{label}</span>
      <div className={cx('truncate text-body', strong && 'font-bold')}>{children}</div>
      {sub && <div className="truncate text-label text-ink-soft">{sub}</div>}
    </div>
  );
}
