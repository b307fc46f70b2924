import type { ReactNode } from 'react';
import { BottomBar } from '../../ui/bottom-bar.tsx';
import { type PlaceLink, Rail } from '../../ui/rail.tsx';
import { RailSlot } from '../../ui/slot.tsx';

interface FrameProps {
  home: string;
  places: readonly PlaceLink[];
  foot: ReactNode;
  children: ReactNode;
}

/** Rail at the left and the page beside it; on a phone the page above and a bar below. */
export function Frame({ home, places, foot, children }: FrameProps) {
  return (
    <div
      data-print="flow"
      className="grid h-dvh grid-rows-[minmax(0,1fr)_auto] desk:min-h-110 desk:grid-cols-[168px_minmax(0,1fr)] desk:grid-rows-[minmax(0,1fr)]"
    >
      <Rail home={home} places={places} foot={foot}>
        <RailSlot />
      </Rail>
      <main id="main" data-print="flow" className="flex min-h-0 min-w-0 flex-col">
        {children}
      </main>
      <BottomBar places={places} more={foot} />
    </div>
  );
}
