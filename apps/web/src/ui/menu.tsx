import { DropdownMenu } from 'radix-ui';
import type { ReactNode } from 'react';
import { Button, type ButtonLook } from './button.tsx';
import { cx } from './cx.ts';

export interface MenuItem {
  label: string;
  onSelect: () => void;
  disabled?: boolean;
  danger?: boolean;
  /** One of several that are mutually exclusive, and the one that holds. */
  chosen?: boolean;
  /** The key that does the same. */
  keys?: string;
}

interface MenuProps {
  label: ReactNode;
  /** Read aloud where the label alone would not say of what. */
  name?: string;
  look?: ButtonLook | 'link';
  items: readonly MenuItem[];
}

export function Menu({ label, name, look = 'plain', items }: MenuProps) {
  return (
    <DropdownMenu.Root>
      <DropdownMenu.Trigger asChild>
        {look === 'link' ? (
          <button
            type="button"
            aria-label={name}
            className="min-h-11 text-copper underline decoration-1 underline-offset-2 desk:min-h-6"
          >
            {label}
          </button>
        ) : (
          <Button look={look} aria-label={name}>
            {label}
          </Button>
        )}
      </DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          align="end"
          sideOffset={2}
          className="z-50 min-w-44 border border-line bg-sheet py-1 text-grid"
        >
          {items.map((item) => (
            <DropdownMenu.Item
              key={item.label}
              disabled={item.disabled}
              onSelect={item.onSelect}
              className={cx(
                'flex tap cursor-pointer items-center gap-6 px-3 outline-none data-disabled:cursor-not-allowed data-disabled:text-ink-soft data-highlighted:bg-wash',
                item.danger && 'text-over',
              )}
            >
              <span className={cx(item.chosen && 'font-bold')}>
                {item.label}
                {item.chosen && <span className="sr-only">, chosen</span>}
              </span>
              {item.keys && <kbd className="ml-auto font-hand text-label text-ink-soft">{item.keys}</kbd>}
            </DropdownMenu.Item>
          ))}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}
