import type { ReactNode } from 'react';

interface PageHeadingProps {
  title: ReactNode;
  aside?: ReactNode;
  detail?: ReactNode;
  actions?: ReactNode;
}

/** Opens a work area: what it is, what it stands on, what can be done. Takes the focus after a navigation. */
export function PageHeading({ title, aside, detail, actions }: PageHeadingProps) {
  return (
    <header className="flex min-h-15 first:border-t-2 first:border-ink flex-wrap items-center gap-x-3 gap-y-2 px-4 py-3">
      <div className="min-w-0">
        <h1 tabIndex={-1} data-page-heading className="text-title outline-none">
          {title}
          {aside && <span className="font-normal"> {aside}</span>}
        </h1>
        {detail && <p className="text-label text-ink-soft">{detail}</p>}
      </div>
      {actions && (
        <div className="flex flex-wrap items-center gap-2 desk:ml-auto" data-print="never">
          {actions}
        </div>
      )}
    </header>
  );
}
