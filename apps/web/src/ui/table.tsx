import type { ComponentProps, ReactNode } from 'react';
import { cx } from './cx.ts';
import { Scroller } from './scroller.tsx';

/** A table on the sheet: ruled lines, no boxes. It scrolls by itself where the page is narrower. */
export function Table({
  caption,
  showCaption = false,
  stacked = false,
  className,
  children,
}: {
  caption: ReactNode;
  showCaption?: boolean;
  /** Rows under each other on a phone; the cells then need their `label`. */
  stacked?: boolean;
  className?: string;
  children: ReactNode;
}) {
  return (
    <Scroller label={`Table: ${textOf(caption)}`} className="max-w-full overflow-x-auto">
      <table className={cx('w-full border-collapse text-grid', stacked && 'stack-rows', className)}>
        <caption className={cx(showCaption ? 'pb-1 text-left text-label text-ink-soft' : 'sr-only')}>
          {caption}
        </caption>
        {children}
      </table>
    </Scroller>
  );
}

const textOf = (node: ReactNode): string => (typeof node === 'string' ? node : 'rows');

export function Th({
  numeric = false,
  className,
  scope = 'col',
  ...rest
}: ComponentProps<'th'> & { numeric?: boolean }) {
  return (
    <th
      scope={scope}
      className={cx(
        'border-b border-line px-2 py-1 text-label font-normal text-ink-soft first:pl-4 last:pr-4',
        numeric ? 'text-right' : 'text-left',
        className,
      )}
      {...rest}
    />
  );
}

/** The cell that names its row. */
export function RowHead({ className, ...rest }: ComponentProps<'th'>) {
  return (
    <th
      scope="row"
      className={cx(
        'border-b border-hair px-2 py-1 text-left align-baseline font-bold first:pl-4',
        className,
      )}
      {...rest}
    />
  );
}

interface TdProps extends ComponentProps<'td'> {
  numeric?: boolean;
  /** The word of its column, shown beside it where rows are stacked. */
  label?: string;
}

export function Td({ numeric = false, label, className, ...rest }: TdProps) {
  return (
    <td
      data-label={label}
      className={cx(
        'border-b border-hair px-2 py-1 align-baseline first:pl-4 last:pr-4',
        numeric && 'whitespace-nowrap text-right',
        className,
      )}
      {...rest}
    />
  );
}
