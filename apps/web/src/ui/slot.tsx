import { createContext, type FC, type ReactNode, use, useMemo, useState } from 'react';
import { createPortal } from 'react-dom';

interface SlotState {
  element: HTMLElement | null;
  place: (element: HTMLElement | null) => void;
}
interface SlotParts {
  Provider: FC<{ children: ReactNode }>;
  Slot: FC;
  Fill: FC<{ children: ReactNode }>;
}

function createSlot(): SlotParts {
  const State = createContext<SlotState>({ element: null, place: () => {} });
  return {
    Provider({ children }) {
      const [element, place] = useState<HTMLElement | null>(null);
      const value = useMemo(() => ({ element, place }), [element]);
      return <State value={value}>{children}</State>;
    },
    Slot() {
      return <div ref={use(State).place} />;
    },
    Fill({ children }) {
      const { element } = use(State);
      return element ? createPortal(children, element) : null;
    },
  };
}

const rail = createSlot();
const saved = createSlot();

/** Lets the open place put its own parts into the frame around it. */
export function SlotProviders({ children }: { children: ReactNode }) {
  return (
    <rail.Provider>
      <saved.Provider>{children}</saved.Provider>
    </rail.Provider>
  );
}

/** Where the panels of a job stand in the rail. */
export const RailSlot: FC = rail.Slot;
export const InRail: FC<{ children: ReactNode }> = rail.Fill;
/** Where the rail says whether everything is saved. */
export const SavedSlot: FC = saved.Slot;
export const InSaved: FC<{ children: ReactNode }> = saved.Fill;
