import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { Mark } from './mark.tsx';
import { ThemeSwitch } from './theme-switch.tsx';

/** A page outside any firm: one column under the mark. */
export function OutsidePage({
  title,
  lead,
  children,
  foot,
}: {
  title: string;
  lead?: ReactNode;
  children: ReactNode;
  foot?: ReactNode;
}) {
  return (
    <div className="mx-auto flex min-h-dvh max-w-360 flex-col">
      <header className="flex items-center gap-4 border-t-2 border-b border-t-ink border-b-rule px-4 py-3 desk:px-12">
        <Link to="/" className="flex items-center gap-2.5 text-title font-bold text-ink no-underline">
          <Mark />
          Farlug
        </Link>
        <div className="ml-auto">
          <ThemeSwitch />
        </div>
      </header>
      <main id="main" className="w-full flex-1 px-4 py-8 desk:px-12">
        <div className="max-w-120">
          <h1 tabIndex={-1} data-page-heading className="text-title outline-none">
            {title}
          </h1>
          {lead && <p className="mt-1 text-ink-soft">{lead}</p>}
          <div className="mt-6">{children}</div>
        </div>
      </main>
      {foot && (
        <footer className="border-t border-rule px-4 py-4 text-label text-ink-soft desk:px-12">{foot}</footer>
      )}
    </div>
  );
}
