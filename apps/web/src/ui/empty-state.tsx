import type { ReactNode } from 'react';

/** Nothing here yet: what comes next, and the way to it. */
export function EmptyState({
  title,
  children,
  actions,
}: {
  title: string;
  children?: ReactNode;
  actions?: ReactNode;
}) {
  return (
    <section className="max-w-160 px-4 py-8">
      <h2 className="text-title">{title}</h2>
      {children && <div className="mt-2 text-ink-soft">{children}</div>}
      {actions && <div className="mt-4 flex flex-wrap items-center gap-3">{actions}</div>}
    </section>
  );
}
