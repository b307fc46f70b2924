import type { ComponentProps } from 'react';
import { cx } from './cx.ts';
import { useFieldWiring } from './field.tsx';

const EDGE =
  'w-full min-w-0 rounded-control border border-line bg-sheet px-3 text-ink aria-invalid:border-2 aria-invalid:border-over disabled:border-rule disabled:bg-faint disabled:text-ink-soft';

/**
 * `active` is the phone's field that is being filled in: copper edge, the largest size. `compact` stands in a row of
 * buttons.
 */
export function TextInput({
  active = false,
  compact = false,
  className,
  id,
  ...rest
}: ComponentProps<'input'> & { active?: boolean; compact?: boolean }) {
  return (
    <input
      {...useFieldWiring(id)}
      autoComplete="off"
      className={cx(
        EDGE,
        active
          ? 'h-14 border-2 border-copper text-display font-bold'
          : compact
            ? 'h-11 text-body desk:h-8 desk:text-grid'
            : 'h-12 text-body desk:h-10',
        className,
      )}
      {...rest}
    />
  );
}

export function TextArea({ className, id, rows = 3, ...rest }: ComponentProps<'textarea'>) {
  return (
    <textarea
      {...useFieldWiring(id)}
      rows={rows}
      className={cx(EDGE, 'block resize-y py-2 text-body', className)}
      {...rest}
    />
  );
}
