import { NavLink, useLocation, useNavigate } from 'react-router-dom';
import { Select } from './select.tsx';
import { DESK, useMedia } from './use-media.ts';

const TAB =
  '-mb-px inline-flex tap items-center border-b-2 px-3 text-grid no-underline hover:text-ink [&:not([aria-current])]:border-transparent [&:not([aria-current])]:text-ink-soft aria-[current=page]:border-copper aria-[current=page]:font-bold aria-[current=page]:text-ink';

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
        <NavLink key={link.to} to={link.to} className={TAB}>
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
