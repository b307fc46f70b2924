import { Tabs as Primitive } from 'radix-ui';
import type { ReactNode } from 'react';
import { NavLink } from 'react-router-dom';
import { cx } from './cx.ts';

const TAB =
  'tap inline-flex items-center px-3 text-grid text-ink-soft no-underline -mb-px border-b-2 border-transparent hover:text-ink';
const CHOSEN = 'border-copper font-bold text-ink';

export interface Tab {
  value: string;
  label: string;
  content: ReactNode;
}

export function Tabs({
  label,
  value,
  onValue,
  tabs,
}: {
  label: string;
  value: string;
  onValue: (value: string) => void;
  tabs: readonly Tab[];
}) {
  return (
    <Primitive.Root value={value} onValueChange={onValue}>
      <Primitive.List aria-label={label} className="flex flex-wrap border-b border-ink">
        {tabs.map((tab) => (
          <Primitive.Trigger
            key={tab.value}
            value={tab.value}
            className={cx(TAB, tab.value === value && CHOSEN)}
          >
            {tab.label}
          </Primitive.Trigger>
        ))}
      </Primitive.List>
      {tabs.map((tab) => (
        <Primitive.Content key={tab.value} value={tab.value} className="pt-3 focus-visible:outline-offset-2">
          {tab.content}
        </Primitive.Content>
      ))}
    </Primitive.Root>
  );
}

/** Parts of a place that have addresses of their own. */
export function TabLinks({
  label,
  links,
}: {
  label: string;
  links: readonly { to: string; label: string }[];
}) {
  return (
    <nav aria-label={label} data-print="never" className="flex flex-wrap border-b border-ink px-1">
      {links.map((link) => (
        <NavLink key={link.to} to={link.to} className={({ isActive }) => cx(TAB, isActive && CHOSEN)}>
          {link.label}
        </NavLink>
      ))}
    </nav>
  );
}
