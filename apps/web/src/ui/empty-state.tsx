import type { ReactNode } from 'react';

/** Nothing here yet: what comes next, and the way to it. */
export function EmptyState({
  title,
  children,
  actions,
  level: Heading = 'h2',
}: {
  title: string;
  children?: ReactNode;
  actions?: ReactNode;
  /** `h1` where it stands in place of a whole page. */
  level?: 'h1' | 'h2';
}) {
  return (
    <section className="max-w-160 px-4 py-8">
      <Heading
        className="text-title outline-none"
        {...(Heading === 'h1' && { tabIndex: -1, 'data-page-heading': true })}
      >
        {title}
      </Heading>
      {children && <div className="mt-2 text-ink-soft">{children}</div>}
      {actions && <div className="mt-4 flex flex-wrap items-center gap-3">{actions}</div>}
    </section>
  );
}
