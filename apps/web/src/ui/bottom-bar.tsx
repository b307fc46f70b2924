import { Dialog } from 'radix-ui';
import { type ReactNode, useState } from 'react';
import { NavLink } from 'react-router-dom';
import { CloseButton } from './close-button.tsx';
import { cx } from './cx.ts';
import type { PlaceLink } from './rail.tsx';

const TAB = 'relative flex h-13 items-center justify-center text-grid text-ink-soft no-underline';
const MARKED =
  'aria-[current=page]:font-bold aria-[current=page]:text-ink aria-[current=page]:after:absolute aria-[current=page]:after:inset-x-0 aria-[current=page]:after:top-0 aria-[current=page]:after:h-[3px] aria-[current=page]:after:bg-copper';

/** The rail of a phone: four places, the rest behind “More”. */
export function BottomBar({ places, more }: { places: readonly PlaceLink[]; more: ReactNode }) {
  const [open, setOpen] = useState(false);
  const near = places.slice(0, 4);
  const far = places.slice(4);
  return (
    <>
      <nav
        aria-label="Places"
        data-print="never"
        className="grid auto-cols-fr grid-flow-col border-t border-ink bg-sheet pb-[env(safe-area-inset-bottom)] desk:hidden"
      >
        {near.map((place) => (
          <NavLink key={place.to} to={place.to} end={place.end ?? false} className={cx(TAB, MARKED)}>
            {place.label}
          </NavLink>
        ))}
        <button type="button" aria-haspopup="dialog" className={TAB} onClick={() => setOpen(true)}>
          More
        </button>
      </nav>
      <Dialog.Root open={open} onOpenChange={setOpen}>
        <Dialog.Portal>
          <Dialog.Overlay className="fixed inset-0 z-40 bg-[color-mix(in_srgb,#15181c_46%,transparent)]" />
          <Dialog.Content
            aria-describedby={undefined}
            className="fixed inset-x-0 bottom-0 z-50 border-t-2 border-ink bg-sheet pb-[env(safe-area-inset-bottom)] focus:outline-none"
          >
            <header className="flex items-center px-4 py-1">
              <Dialog.Title className="text-title">More</Dialog.Title>
              <Dialog.Close asChild>
                <CloseButton />
              </Dialog.Close>
            </header>
            <ul>
              {far.map((place) => (
                <li key={place.to} className="border-t border-hair">
                  <NavLink
                    to={place.to}
                    end={place.end ?? false}
                    onClick={() => setOpen(false)}
                    className="flex h-12 items-center px-4 text-ink no-underline aria-[current=page]:font-bold"
                  >
                    {place.label}
                  </NavLink>
                </li>
              ))}
            </ul>
            <div className="border-t border-rule px-4 py-3 text-grid text-ink-soft">{more}</div>
          </Dialog.Content>
        </Dialog.Portal>
      </Dialog.Root>
    </>
  );
}
