import { cx } from './cx.ts';

function Line({ className }: { className?: string }) {
  return <span className={cx('block h-3 animate-[wait_1.6s_ease-in-out_infinite] bg-faint', className)} />;
}

/** The lines of what is on its way, where they will stand. */
export function Skeleton({ rows = 6, label = 'Loading' }: { rows?: number; label?: string }) {
  return (
    <div role="status" aria-busy="true" className="px-4 py-3">
      <span className="sr-only">{label}</span>
      {Array.from({ length: rows }, (_, row) => (
        <div key={row} className="flex h-7 items-center gap-6 border-b border-hair">
          <Line className="w-1/4" />
          <Line className="w-1/3" />
          <Line className="ml-auto w-16" />
        </div>
      ))}
    </div>
  );
}
