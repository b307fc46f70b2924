import type { ReactNode } from 'react';
import { cx } from '../../../ui/cx.ts';
import type { GridColumn } from '../columns.ts';

interface GridCellProps {
  column: GridColumn;
  place: string;
  /** The one cell of the grid that Tab reaches. */
  here: boolean;
  /** An editor stands in it and has the focus in its place. */
  editing: boolean;
  wrong: string | null;
  onClick: () => void;
  onDoubleClick: () => void;
  children: ReactNode;
}

export function GridCell({
  column,
  place,
  here,
  editing,
  wrong,
  onClick,
  onDoubleClick,
  children,
}: GridCellProps) {
  return (
    // biome-ignore lint/a11y/useKeyWithClickEvents: the grid handles the keys of its cells
    <td
      // biome-ignore lint/a11y/noNoninteractiveElementToInteractiveRole: the grid pattern names its cells so
      role="gridcell"
      data-cell={place}
      tabIndex={editing ? undefined : here ? 0 : -1}
      aria-readonly={column.field === null || undefined}
      aria-invalid={wrong !== null || undefined}
      onClick={onClick}
      onDoubleClick={onDoubleClick}
      className={cx(
        'relative border-b border-hair px-1.5 py-0.5 align-baseline -outline-offset-2 first:pl-4 last:pr-4',
        column.width,
        column.numeric && 'text-right whitespace-nowrap',
        column.key !== 'description' && column.key !== 'notes' && 'whitespace-nowrap',
      )}
    >
      {children}
      {wrong !== null && (
        <span
          role="alert"
          className="absolute top-full left-0 z-20 block w-72 border border-over bg-sheet px-2 py-1 text-left text-label whitespace-normal text-over"
        >
          {wrong}
        </span>
      )}
    </td>
  );
}
