import { Dialog } from 'radix-ui';
import { type ReactNode, useEffect, useId, useRef } from 'react';
import { CloseButton } from './close-button.tsx';
import { DESK, useMedia } from './use-media.ts';

interface SideSheetProps {
  title: ReactNode;
  subtitle?: ReactNode;
  onClose: () => void;
  children: ReactNode;
}

/**
 * What is known of the chosen run, beside the work area: a column from 1200 px on, over the grid below that, and
 * a sheet from the bottom on a phone. Only there does it take the focus; elsewhere the grid keeps it.
 */
export function SideSheet(props: SideSheetProps) {
  return useMedia(DESK) ? <Column {...props} /> : <Bottom {...props} />;
}

function Column({ title, subtitle, onClose, children }: SideSheetProps) {
  const id = useId();
  const sheet = useRef<HTMLElement>(null);
  useEffect(() => {
    const closeOnEscape = (event: KeyboardEvent) => {
      if (event.key === 'Escape' && sheet.current?.contains(document.activeElement)) onClose();
    };
    document.addEventListener('keydown', closeOnEscape);
    return () => document.removeEventListener('keydown', closeOnEscape);
  }, [onClose]);
  return (
    <aside
      ref={sheet}
      aria-labelledby={id}
      // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls has to be reachable by keyboard
      tabIndex={0}
      className="fixed top-19 right-0 bottom-0 z-20 w-95 overflow-auto border-l border-rule bg-sheet -outline-offset-2 wide:static"
    >
      <header className="flex items-baseline gap-2 px-4 pt-3">
        <h2 id={id} className="min-w-0 text-title">
          {title}
        </h2>
        <CloseButton onClick={onClose} />
      </header>
      {subtitle && <p className="px-4 text-label text-ink-soft">{subtitle}</p>}
      {children}
    </aside>
  );
}

function Bottom({ title, subtitle, onClose, children }: SideSheetProps) {
  return (
    <Dialog.Root open onOpenChange={(open) => !open && onClose()}>
      <Dialog.Portal>
        <Dialog.Overlay className="fixed inset-0 z-40 bg-[color-mix(in_srgb,#15181c_46%,transparent)]" />
        <Dialog.Content
          aria-describedby={undefined}
          className="fixed inset-x-0 bottom-0 z-50 max-h-[88dvh] overflow-auto border-t-2 border-ink bg-sheet pb-[env(safe-area-inset-bottom)] focus:outline-none"
        >
          <header className="sticky top-0 z-10 flex items-baseline gap-2 border-b border-rule bg-sheet px-4 py-2">
            <div className="min-w-0">
              <Dialog.Title className="text-title">{title}</Dialog.Title>
              {subtitle && <p className="text-label text-ink-soft">{subtitle}</p>}
            </div>
            <Dialog.Close asChild>
              <CloseButton />
            </Dialog.Close>
          </header>
          {children}
        </Dialog.Content>
      </Dialog.Portal>
    </Dialog.Root>
  );
}

/** A part of a side sheet, under a ruled line. */
export function SheetSection({ title, children }: { title?: ReactNode; children: ReactNode }) {
  return (
    <section className="border-t border-rule px-4 py-3 first-of-type:border-t-0">
      {title && <h3 className="mb-1 text-label font-normal text-ink-soft">{title}</h3>}
      {children}
    </section>
  );
}
