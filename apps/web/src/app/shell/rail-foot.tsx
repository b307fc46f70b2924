import type { SessionView } from '@farlug/contract/routes';
import { Link } from 'react-router-dom';
import { useSignOut } from '../../features/accounts/hooks/use-sign-out.ts';
import { ROLE_WORDS } from '../../features/accounts/role-words.ts';
import { Menu } from '../../ui/menu.tsx';
import { useShortcutSheet } from '../../ui/shortcuts.tsx';
import { SavedSlot } from '../../ui/slot.tsx';
import { THEMES, useTheme } from '../../ui/theme.ts';
import { paths } from '../paths.ts';

type Membership = SessionView['memberships'][number];

interface RailFootProps {
  person: NonNullable<SessionView['person']>;
  membership: Membership;
  memberships: readonly Membership[];
}

const THEME_WORDS = { system: 'As the system', light: 'Light', dark: 'Dark' } as const;
const LINK = 'min-h-11 text-copper underline decoration-1 underline-offset-2 desk:min-h-6';

/** Who is here, for which firm, and what is the same on every page. */
export function RailFoot({ person, membership, memberships }: RailFootProps) {
  const showKeys = useShortcutSheet();
  const leave = useSignOut();
  const [theme, setTheme] = useTheme();
  const others = memberships.filter((entry) => entry.firmId !== membership.firmId);
  return (
    <div className="space-y-0.5">
      <SavedSlot />
      <p>
        {person.name}, {ROLE_WORDS[membership.role]}
      </p>
      <p className="truncate">{membership.firmName}</p>
      {others.map((entry) => (
        <p key={entry.firmId} className="truncate">
          <Link to={paths.jobs(entry.firmId)}>{entry.firmName}</Link>
        </p>
      ))}
      <div className="flex flex-wrap items-center gap-x-3 gap-y-0.5 pt-0.5">
        <Menu
          label="Light or dark"
          look="link"
          items={THEMES.map((name) => ({
            label: THEME_WORDS[name],
            onSelect: () => setTheme(name),
            chosen: name === theme,
          }))}
        />
        <button type="button" className={LINK} onClick={showKeys}>
          Keys ?
        </button>
        <Link to={paths.account()} className={`${LINK} inline-flex items-center`}>
          Account
        </Link>
        <button type="button" className={LINK} onClick={() => void leave()}>
          Sign out
        </button>
      </div>
    </div>
  );
}
