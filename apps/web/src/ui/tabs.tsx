import { Tabs as Primitive } from 'radix-ui';
import type { ReactNode } from 'react';
import { NavLink, useLocation, useNavigate } from 'react-router-dom';
import { cx } from './cx.ts';
import { Select } from './select.tsx';
import { DESK, useMedia } from './use-media.ts';

const TAB =
  '-mb-px inline-flex tap items-center border-b-2 px-3 text-grid no-underline hover:text-ink [&:not([aria-current],[data-state=active])]:border-transparent [&:not([aria-current],[data-state=active])]:text-ink-soft';
const CHOSEN =
  'aria-[current=page]:border-copper aria-[current=page]:font-bold aria-[current=page]:text-ink data-[state=active]:border-copper data-[state=active]:font-bold data-[state=active]:text-ink';

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
          <Primitive.Trigger key={tab.value} value={tab.value} className={cx(TAB, CHOSEN)}>
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

interface TabLinksProps {
  label: string;
  links: readonly { to: string; label: string }[];
}

/** Parts of a place that have addresses of their own: tabs, and on a phone a list. */
export function TabLinks(props: TabLinksProps) {
  return useMedia(DESK) ? <LinkRow {...props} /> : <LinkList {...props} />;
}

function LinkRow({ label, links }: TabLinksProps) {
  return (
    <nav aria-label={label} data-print="never" className="flex flex-wrap border-b border-ink px-1">
      {links.map((link) => (
        <NavLink key={link.to} to={link.to} className={cx(TAB, CHOSEN)}>
          {link.label}
        </NavLink>
      ))}
    </nav>
  );
}

function LinkList({ label, links }: TabLinksProps) {
  const navigate = useNavigate();
  const { pathname } = useLocation();
  return (
    <nav aria-label={label} data-print="never" className="border-b border-ink px-4 pb-3">
      <Select
        aria-label={label}
        value={links.find((link) => link.to === pathname)?.to ?? ''}
        onValue={(to) => void navigate(to)}
        choices={links.map((link) => ({ value: link.to, label: link.label }))}
      />
    </nav>
  );
}
