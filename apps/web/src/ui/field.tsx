import { createContext, type ReactNode, use, useId } from 'react';
import { cx } from './cx.ts';

interface FieldWiring {
  id: string;
  labelId: string;
  describedBy: string | undefined;
  invalid: boolean;
  required: boolean;
}
const Wiring = createContext<FieldWiring | null>(null);

/** What a control inside a `Field` spreads: its id, its description and whether it is wrong. */
export function useFieldWiring(own?: string): {
  id: string | undefined;
  'aria-describedby': string | undefined;
  'aria-invalid': true | undefined;
  'aria-required': true | undefined;
} {
  const wiring = use(Wiring);
  return {
    id: own ?? wiring?.id,
    'aria-describedby': wiring?.describedBy,
    'aria-invalid': wiring?.invalid ? true : undefined,
    'aria-required': wiring?.required ? true : undefined,
  };
}

/** For a control that a label cannot point at, as a group of radios. */
export function useFieldLabelId(): string | undefined {
  return use(Wiring)?.labelId;
}

interface FieldProps {
  label: ReactNode;
  /** Unit or what may be typed; stays while the field is filled in. */
  hint?: ReactNode;
  /** What is wrong and what would be right. */
  error?: string | null | undefined;
  required?: boolean;
  hideLabel?: boolean;
  className?: string;
  children: ReactNode;
}

export function Field({
  label,
  hint,
  error,
  required = false,
  hideLabel = false,
  className,
  children,
}: FieldProps) {
  const id = useId();
  const hintId = hint ? `${id}-hint` : undefined;
  const errorId = error ? `${id}-error` : undefined;
  const describedBy = [hintId, errorId].filter(Boolean).join(' ') || undefined;
  return (
    <Wiring value={{ id, labelId: `${id}-label`, describedBy, invalid: Boolean(error), required }}>
      <div className={cx('min-w-0', className)}>
        <label
          id={`${id}-label`}
          htmlFor={id}
          className={cx('mb-0.5 block text-label text-ink-soft', hideLabel && 'sr-only')}
        >
          {label}
        </label>
        {children}
        {error && (
          <p id={errorId} className="mt-1 text-grid text-over" data-error>
            <span aria-hidden="true">▲ </span>
            {error}
          </p>
        )}
        {hint && (
          <p id={hintId} className="mt-1 text-label text-ink-soft">
            {hint}
          </p>
        )}
      </div>
    </Wiring>
  );
}
