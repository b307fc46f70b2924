import { createContext, type ReactNode, use, useEffect, useMemo, useState } from 'react';
import { Dialog } from './dialog.tsx';
import { Key } from './keys.tsx';

export interface ShortcutGroup {
  title: string;
  /** Keys pressed together are one entry, as `['Ctrl', 'Z']`. */
  keys: readonly (readonly [readonly string[], string])[];
}

interface ShortcutState {
  open: () => void;
  add: (group: ShortcutGroup) => () => void;
}
const Shortcuts = createContext<ShortcutState>({ open: () => {}, add: () => () => {} });

/** Shows a place’s keys in the sheet while the place is open. The group must be a constant. */
export function useShortcuts(group: ShortcutGroup): void {
  const { add } = use(Shortcuts);
  useEffect(() => add(group), [add, group]);
}

export function useShortcutSheet(): () => void {
  return use(Shortcuts).open;
}

const EVERYWHERE: ShortcutGroup = {
  title: 'Everywhere',
  keys: [
    [['?'], 'this sheet'],
    [['Esc'], 'close what is open'],
    [['Tab'], 'next control'],
  ],
};

const typing = (target: EventTarget | null) =>
  target instanceof HTMLElement &&
  (target.isContentEditable || ['INPUT', 'TEXTAREA', 'SELECT'].includes(target.tagName));

export function ShortcutProvider({ children }: { children: ReactNode }) {
  const [isOpen, setOpen] = useState(false);
  const [groups, setGroups] = useState<readonly ShortcutGroup[]>([]);
  const value = useMemo<ShortcutState>(
    () => ({
      open: () => setOpen(true),
      add: (group) => {
        setGroups((list) => [...list, group]);
        return () => setGroups((list) => list.filter((entry) => entry !== group));
      },
    }),
    [],
  );
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if (
        event.key !== '?' ||
        event.ctrlKey ||
        event.metaKey ||
        event.defaultPrevented ||
        typing(event.target)
      )
        return;
      event.preventDefault();
      setOpen(true);
    };
    document.addEventListener('keydown', onKey);
    return () => document.removeEventListener('keydown', onKey);
  }, []);
  return (
    <Shortcuts value={value}>
      {children}
      <Dialog open={isOpen} onOpenChange={setOpen} title="Keys" wide>
        <div className="grid gap-6 desk:grid-cols-2">
          {[...groups, EVERYWHERE].map((group) => (
            <section key={group.title}>
              <h3 className="border-b border-line pb-1 text-label font-normal text-ink-soft">
                {group.title}
              </h3>
              <dl className="text-grid">
                {group.keys.map(([keys, what]) => (
                  <div key={what} className="flex items-center gap-3 border-b border-hair py-1">
                    <dt className="flex w-32 flex-none flex-wrap gap-1">
                      {keys.map((key) => (
                        <Key key={key}>{key}</Key>
                      ))}
                    </dt>
                    <dd>{what}</dd>
                  </div>
                ))}
              </dl>
            </section>
          ))}
        </div>
      </Dialog>
    </Shortcuts>
  );
}
