import type { ReactNode } from 'react';

export function PartHeading({
  title,
  note,
  action,
}: {
  title: string;
  note?: ReactNode;
  action?: ReactNode;
}) {
  return (
    <header className="flex flex-wrap items-end gap-3 px-4 pt-4 pb-2">
      <div className="max-w-160">
        <h2 className="text-body">{title}</h2>
        {note && <p className="text-grid text-ink-soft">{note}</p>}
      </div>
      {action && <div className="desk:ml-auto">{action}</div>}
    </header>
  );
}
