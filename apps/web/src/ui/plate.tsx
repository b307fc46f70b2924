import type { ReactNode } from 'react';
import { cx } from './cx.ts';

/** A part of a page on the sheet, opened by a line of ink. */
export function Plate({
  title,
  aside,
  children,
  className,
  id,
}: {
  title?: ReactNode;
  aside?: ReactNode;
  children: ReactNode;
  className?: string;
  id?: string;
}) {
  return (
    <section id={id} className={cx('border-t border-ink bg-sheet', className)}>
      {title && (
        <header className="flex flex-wrap items-baseline gap-x-3 gap-y-1 px-4 pt-3">
          <h2 className="text-body">{title}</h2>
          {aside && <div className="ml-auto text-label text-ink-soft">{aside}</div>}
        </header>
      )}
      {children}
    </section>
  );
}
