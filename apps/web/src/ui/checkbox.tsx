import { Checkbox as Primitive } from 'radix-ui';
import { type ReactNode, useId } from 'react';
import { cx } from './cx.ts';

interface CheckboxProps {
  checked: boolean | 'indeterminate';
  onChecked: (checked: boolean) => void;
  label: ReactNode;
  hint?: ReactNode;
  hideLabel?: boolean;
  disabled?: boolean;
  className?: string;
}

export function Checkbox({
  checked,
  onChecked,
  label,
  hint,
  hideLabel = false,
  disabled,
  className,
}: CheckboxProps) {
  const id = useId();
  return (
    <div className={cx('flex tap items-start gap-2 py-1.5 desk:py-0.5', className)}>
      <Primitive.Root
        id={id}
        checked={checked}
        disabled={disabled}
        onCheckedChange={(next) => onChecked(next === true)}
        aria-describedby={hint ? `${id}-hint` : undefined}
        className="relative mt-1 flex size-5 shrink-0 items-center justify-center rounded-control border border-line bg-sheet before:absolute before:-inset-3 before:content-[''] disabled:border-rule disabled:bg-faint data-[state=checked]:border-copper data-[state=checked]:bg-copper data-[state=indeterminate]:border-copper desk:before:hidden"
      >
        <Primitive.Indicator className="text-on-copper">
          <svg viewBox="0 0 12 12" aria-hidden="true" className="size-3 fill-none stroke-current stroke-2">
            <path d={checked === 'indeterminate' ? 'M2 6h8' : 'm1.5 6.5 3 3 6-7'} />
          </svg>
        </Primitive.Indicator>
      </Primitive.Root>
      <span className={cx('pt-0.5', hideLabel && 'sr-only')}>
        <label htmlFor={id} className="text-grid desk:text-body">
          {label}
        </label>
        {hint && (
          <span id={`${id}-hint`} className="block text-label text-ink-soft">
            {hint}
          </span>
        )}
      </span>
    </div>
  );
}
