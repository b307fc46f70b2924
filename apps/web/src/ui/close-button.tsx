import type { ComponentProps } from 'react';

export function CloseButton(props: ComponentProps<'button'>) {
  return (
    <button
      type="button"
      aria-label="Close"
      className="-mr-2 ml-auto flex size-11 shrink-0 items-center justify-center text-ink-soft hover:text-ink desk:size-8"
      {...props}
    >
      <svg viewBox="0 0 12 12" aria-hidden="true" className="size-3 fill-none stroke-current stroke-[1.5]">
        <path d="m1 1 10 10M11 1 1 11" />
      </svg>
    </button>
  );
}
