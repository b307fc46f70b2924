import type { ComponentProps, ReactNode } from 'react';
import { Link, type LinkProps } from 'react-router-dom';
import { cx } from './cx.ts';

/**
 * `go` is the one solid copper button of a work area; `line` the copper outline of a title block; `bare` reads as
 * a link; `danger` asks for something that cannot be taken back.
 */
export type ButtonLook = 'plain' | 'go' | 'line' | 'bare' | 'danger';

const LOOKS: Record<ButtonLook, string> = {
  plain: 'border-rule bg-sheet text-ink hover:border-line',
  go: 'border-copper bg-copper font-bold text-on-copper hover:bg-[color-mix(in_srgb,var(--copper)_86%,var(--ink))]',
  line: 'border-copper bg-transparent font-bold text-copper hover:bg-wash',
  bare: 'border-transparent bg-transparent px-0! text-copper underline decoration-1 underline-offset-3 hover:decoration-2',
  danger: 'border-over bg-sheet font-bold text-over hover:bg-faint',
};

function buttonClass(look: ButtonLook, big: boolean): string {
  return cx(
    'inline-flex shrink-0 items-center justify-center gap-2 whitespace-nowrap rounded-control border no-underline',
    'disabled:border-rule disabled:bg-faint disabled:font-normal disabled:text-ink-soft disabled:opacity-100',
    'aria-disabled:border-rule aria-disabled:bg-faint aria-disabled:font-normal aria-disabled:text-ink-soft',
    big ? 'h-11 px-4 text-body' : 'tap px-3 text-grid',
    LOOKS[look],
  );
}

interface Look {
  look?: ButtonLook;
  big?: boolean;
  children?: ReactNode;
}

export function Button({
  look = 'plain',
  big = false,
  type = 'button',
  className,
  ...rest
}: Look & ComponentProps<'button'>) {
  return <button type={type} className={cx(buttonClass(look, big), className)} {...rest} />;
}

export function LinkButton({ look = 'plain', big = false, className, ...rest }: Look & LinkProps) {
  return <Link className={cx(buttonClass(look, big), className)} {...rest} />;
}

/** A link that leaves the application's router: a file, a PDF. */
export function FileButton({ look = 'plain', big = false, className, ...rest }: Look & ComponentProps<'a'>) {
  return <a className={cx(buttonClass(look, big), className)} {...rest} />;
}
