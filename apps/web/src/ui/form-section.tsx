import type { ReactNode } from 'react';
import { cx } from './cx.ts';

/** A part of a long form: what it is about at the left, its fields at the right. */
export function FormSection({
  title,
  children,
  note,
  columns = 2,
}: {
  title: string;
  note?: ReactNode;
  children: ReactNode;
  columns?: 1 | 2 | 3;
}) {
  return (
    <fieldset className="grid min-w-0 gap-x-8 gap-y-3 border-t border-ink bg-sheet px-4 py-4 wide:grid-cols-[15rem_minmax(0,44rem)]">
      <legend className="sr-only">{title}</legend>
      <div>
        <p aria-hidden="true" className="font-bold">
          {title}
        </p>
        {note && <p className="text-label text-ink-soft">{note}</p>}
      </div>
      <div
        className={cx(
          'grid min-w-0 items-start gap-x-4 gap-y-3',
          columns === 2 && 'desk:grid-cols-2',
          columns === 3 && 'desk:grid-cols-3',
        )}
      >
        {children}
      </div>
    </fieldset>
  );
}
