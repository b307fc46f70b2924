import type { ReactNode } from 'react';
import { cx } from './cx.ts';

/** Figures under a word each: the figure at the right, a hair line between. */
export function KeyFigures({
  items,
  columns = 1,
}: {
  items: readonly (readonly [ReactNode, ReactNode])[];
  columns?: 1 | 2;
}) {
  return (
    <dl className={cx('grid gap-x-6 text-grid', columns === 2 && 'grid-cols-2')}>
      {items.map(([word, figure], index) => (
        <div
          key={index}
          className={cx('flex justify-between gap-2 border-hair py-0.5', index >= columns && 'border-t')}
        >
          <dt className="text-ink-soft">{word}</dt>
          <dd className="text-right font-bold">{figure}</dd>
        </div>
      ))}
    </dl>
  );
}

/** What something stands on: a word at the left, text at the right. */
export function Particulars({ items }: { items: readonly (readonly [string, ReactNode])[] }) {
  return (
    <dl className="text-grid">
      {items.map(([word, text]) => (
        <div key={word} className="grid grid-cols-[6rem_minmax(0,1fr)] gap-x-2 py-0.5">
          <dt className="text-ink-soft">{word}</dt>
          <dd>{text}</dd>
        </div>
      ))}
    </dl>
  );
}
