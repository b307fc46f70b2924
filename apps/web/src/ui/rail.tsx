import type { ReactNode } from 'react';
import { Link, NavLink } from 'react-router-dom';
import { cx } from './cx.ts';
import { Glyph, VERDICT_COLOURS, VERDICT_WORDS, type VerdictKind } from './glyph.tsx';
import { Mark } from './mark.tsx';

export interface PlaceLink {
  to: string;
  label: string;
  note?: string;
  /** Current on this address only, not on those below it. */
  end?: boolean;
}

const AT_LEFT =
  'border-l-3 border-transparent pl-[13px] pr-4 no-underline aria-[current]:border-copper aria-[current]:bg-wash aria-[current]:font-bold aria-[current]:text-ink';

/** The places of the application at the left; `children` is the place's own list, as the panels of a job. */
export function Rail({
  home,
  places,
  foot,
  children,
}: {
  home: string;
  places: readonly PlaceLink[];
  foot: ReactNode;
  children?: ReactNode;
}) {
  return (
    <header data-print="never" className="hidden min-h-0 flex-col border-r border-rule desk:flex">
      <Link
        to={home}
        className="flex h-19 flex-none items-center gap-2.5 border-t-2 border-b border-t-ink border-b-rule px-4 text-title font-bold text-ink no-underline"
      >
        <Mark />
        Farlug
      </Link>
      <nav aria-label="Places" className="flex-none py-3">
        {places.map((place) => (
          <NavLink
            key={place.to}
            to={place.to}
            end={place.end ?? false}
            className={cx('flex h-8 items-center justify-between text-ink-soft hover:text-ink', AT_LEFT)}
          >
            {place.label}
            {place.note && <span className="text-label font-normal text-ink-soft">{place.note}</span>}
          </NavLink>
        ))}
      </nav>
      <div className="min-h-0 flex-1 overflow-auto">{children}</div>
      <div className="flex-none border-t border-rule px-4 pt-2 pb-3 text-label text-ink-soft">{foot}</div>
    </header>
  );
}

export interface TreeItem {
  id: string;
  to: string;
  label: string;
  /** For each level from the left: a line that goes on, the turn to this item, its last turn, or nothing. */
  lines: readonly ('through' | 'branch' | 'end' | 'none')[];
  verdict: VerdictKind | null;
  count?: number;
  current: boolean;
}

/** The panels as they feed each other. */
export function RailTree({ title, items }: { title: string; items: readonly TreeItem[] }) {
  return (
    <nav aria-label={title} className="border-t border-rule pt-3 pb-2">
      <h2 className="px-4 pb-1 text-label font-normal text-ink-soft">{title}</h2>
      {items.map((item) => (
        <Link
          key={item.id}
          to={item.to}
          aria-current={item.current ? 'true' : undefined}
          className={cx('flex h-7 items-center text-grid text-ink', AT_LEFT)}
        >
          {item.lines.map((line, level) => (
            <TreeLine key={level} line={line} />
          ))}
          <span className="truncate">{item.label}</span>
          {item.verdict && (
            <span
              className={cx(
                'ml-auto flex items-center gap-1.5 pl-2 font-normal',
                VERDICT_COLOURS[item.verdict],
              )}
            >
              {item.count ? item.count : null}
              <Glyph kind={item.verdict} className="size-2.5" />
              <span className="sr-only">{VERDICT_WORDS[item.verdict]}</span>
            </span>
          )}
        </Link>
      ))}
    </nav>
  );
}

function TreeLine({ line }: { line: TreeItem['lines'][number] }) {
  return (
    <span aria-hidden="true" className="relative w-3.5 flex-none self-stretch">
      {line !== 'none' && (
        <span
          className={cx(
            'absolute left-[3px] top-0 border-l border-line',
            line === 'end' ? 'bottom-1/2' : 'bottom-0',
          )}
        />
      )}
      {(line === 'branch' || line === 'end') && (
        <span className="absolute top-1/2 right-[3px] left-[3px] border-t border-line" />
      )}
    </span>
  );
}
