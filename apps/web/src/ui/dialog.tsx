import { Dialog as Primitive } from 'radix-ui';
import type { ReactNode } from 'react';
import { CloseButton } from './close-button.tsx';
import { cx } from './cx.ts';

interface DialogProps {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  title: ReactNode;
  description?: ReactNode;
  /** The buttons, the one that does it first. */
  actions?: ReactNode;
  wide?: boolean;
  children?: ReactNode;
}

/** A sheet laid over the page: focus stays inside, Esc and the page behind it close it. */
export function Dialog({
  open,
  onOpenChange,
  title,
  description,
  actions,
  wide = false,
  children,
}: DialogProps) {
  return (
    <Primitive.Root open={open} onOpenChange={onOpenChange}>
      <Primitive.Portal>
        <Primitive.Overlay className="fixed inset-0 z-40 bg-[color-mix(in_srgb,#15181c_46%,transparent)]" />
        <Primitive.Content
          {...(description ? {} : { 'aria-describedby': undefined })}
          className={cx(
            'fixed inset-x-0 bottom-0 z-50 flex max-h-[92dvh] flex-col border-t-2 border-ink bg-sheet focus:outline-none',
            'desk:inset-x-auto desk:top-1/2 desk:bottom-auto desk:left-1/2 desk:max-h-[86dvh] desk:-translate-x-1/2 desk:-translate-y-1/2 desk:border-x desk:border-b desk:border-x-line desk:border-b-line',
            wide ? 'desk:w-[min(60rem,94vw)]' : 'desk:w-[min(34rem,94vw)]',
          )}
        >
          <header className="flex items-start gap-3 border-b border-rule px-4 py-3">
            <div className="min-w-0">
              <Primitive.Title className="text-title">{title}</Primitive.Title>
              {description && (
                <Primitive.Description className="text-grid text-ink-soft">
                  {description}
                </Primitive.Description>
              )}
            </div>
            <Primitive.Close asChild>
              <CloseButton />
            </Primitive.Close>
          </header>
          {children && <div className="min-h-0 flex-1 overflow-auto px-4 py-3">{children}</div>}
          {actions && (
            <footer className="flex flex-wrap gap-2 border-t border-rule bg-paper px-4 py-3">
              {actions}
            </footer>
          )}
        </Primitive.Content>
      </Primitive.Portal>
    </Primitive.Root>
  );
}
