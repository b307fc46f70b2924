import { Link } from 'react-router-dom';
import { paths } from '../../../app/paths.ts';
import { Mark } from '../../../ui/mark.tsx';
import { Menu } from '../../../ui/menu.tsx';
import { THEMES, useTheme } from '../../../ui/theme.ts';

const LINKS = [
  ['method', 'Method'],
  ['tables', 'Tables and editions'],
  ['limits', 'Limits of use'],
] as const;
const THEME_WORDS = { system: 'As the system', light: 'Light', dark: 'Dark' } as const;

export function FrontHeader() {
  const [theme, setTheme] = useTheme();
  return (
    <header className="flex flex-wrap items-center gap-x-8 gap-y-1 border-t-2 border-b border-t-ink border-b-rule px-4 py-3 desk:px-12 desk:py-4.5">
      <Link
        to={paths.front()}
        className="flex items-center gap-2.5 text-title font-bold text-ink no-underline"
      >
        <Mark size={34} />
        Farlug
      </Link>
      <nav
        aria-label="About"
        className="order-last flex w-full gap-6 desk:order-none desk:ml-auto desk:w-auto desk:gap-8"
      >
        {LINKS.map(([part, label]) => (
          <Link
            key={part}
            to={paths.about(part)}
            className="inline-flex min-h-11 items-center text-ink no-underline hover:underline aria-[current]:font-bold desk:min-h-0"
          >
            {label}
          </Link>
        ))}
      </nav>
      <span className="ml-auto desk:ml-0">
        <Menu
          label="Light or dark"
          look="link"
          items={THEMES.map((name) => ({
            label: THEME_WORDS[name],
            onSelect: () => setTheme(name),
            chosen: name === theme,
          }))}
        />
      </span>
    </header>
  );
}
