import { type ReactNode, useId } from 'react';

/** Fields that stay folded until they are asked for; folded out where one of them is wrong. */
export function Further({ title, wrong, children }: { title: string; wrong: boolean; children: ReactNode }) {
  return (
    <details open={wrong || undefined} className="border-t border-rule pt-2">
      <summary className="tap content-center text-grid text-copper">{title}</summary>
      <div className="mt-2 grid gap-3 desk:grid-cols-2">{children}</div>
    </details>
  );
}

/** A part of a dialog: its heading and its fields in two columns. */
export function DialogPart({
  title,
  note,
  children,
}: {
  title: string;
  note?: ReactNode;
  children: ReactNode;
}) {
  const id = useId();
  return (
    <section aria-labelledby={id} className="min-w-0">
      <h3 id={id} className="border-b border-line pb-1 text-label font-normal text-ink-soft">
        {title}
      </h3>
      {note && <p className="mt-2 text-grid text-ink-soft">{note}</p>}
      <div className="mt-3 grid items-start gap-3 desk:grid-cols-2">{children}</div>
    </section>
  );
}
