import type { FormEvent, ReactNode } from 'react';
import { Button } from './button.tsx';
import { cx } from './cx.ts';
import { Message } from './message.tsx';

interface FormProps {
  label: string;
  onSubmit: (event: FormEvent<HTMLFormElement>) => void;
  /** What belongs to no field. */
  error?: string | null;
  busy?: boolean;
  /** The word on the button. */
  action: string;
  busyAction?: string;
  disabled?: boolean;
  plain?: boolean;
  /** Beside the button, as a way back. */
  beside?: ReactNode;
  children: ReactNode;
  className?: string;
}

/** Fields, what was refused, and the button that sends. */
export function Form({
  label,
  onSubmit,
  error,
  busy = false,
  action,
  busyAction = 'One moment …',
  disabled = false,
  plain = false,
  beside,
  children,
  className,
}: FormProps) {
  return (
    <form noValidate aria-label={label} onSubmit={onSubmit} className={cx('space-y-4', className)}>
      {children}
      {error && <Message kind="wrong">{error}</Message>}
      <div className="flex flex-wrap items-center gap-4">
        <Button
          type="submit"
          look={plain ? 'plain' : 'go'}
          big
          disabled={disabled}
          aria-disabled={busy || undefined}
        >
          {busy ? busyAction : action}
        </Button>
        {beside}
      </div>
    </form>
  );
}
