import type { ReactNode } from 'react';
import { cx } from './cx.ts';
import { Glyph, VERDICT_COLOURS, VERDICT_WORDS, type VerdictKind } from './glyph.tsx';

interface VerdictProps {
  kind: VerdictKind;
  /** Another word in its place, as `left out`. */
  word?: string;
  bold?: boolean;
  className?: string;
}

/** Glyph, word and colour: never colour alone. */
export function Verdict({ kind, word, bold = kind === 'over', className }: VerdictProps) {
  return (
    <span className={cx('whitespace-nowrap', VERDICT_COLOURS[kind], bold && 'font-bold', className)}>
      <Glyph kind={kind} className="mr-1.5" />
      {word ?? VERDICT_WORDS[kind]}
    </span>
  );
}

/** In tight places: glyph and figure, the word for those who listen. */
export function VerdictFigure({
  kind,
  children,
  word,
  bold = kind === 'over',
  className,
}: VerdictProps & { children: ReactNode }) {
  return (
    <span className={cx('whitespace-nowrap', VERDICT_COLOURS[kind], bold && 'font-bold', className)}>
      <Glyph kind={kind} className="mr-1.5" />
      {children}
      <span className="sr-only"> {word ?? VERDICT_WORDS[kind]}</span>
    </span>
  );
}

/** The verdict said in one sentence, before picture and numbers. */
export function VerdictSentence({
  kind,
  lead,
  children,
}: {
  kind: VerdictKind;
  lead: string;
  children?: ReactNode;
}) {
  return (
    <p className="text-title text-pretty">
      <span className={VERDICT_COLOURS[kind]}>
        <Glyph kind={kind} className="mr-2" />
        <b>{lead}</b>
      </span>{' '}
      {children}
    </p>
  );
}

/** How many of each kind, the worst first; kinds without any are left out, except `over`. */
export function Tally({
  counts,
  words,
}: {
  counts: Partial<Record<VerdictKind, number>>;
  words?: Partial<Record<VerdictKind, string>>;
}) {
  const kinds = (['over', 'rise', 'unserved', 'near', 'within', 'unjudged'] as const).filter(
    (kind) => kind === 'over' || (counts[kind] ?? 0) > 0,
  );
  return (
    <ul className="grid auto-cols-auto grid-flow-col grid-rows-2 gap-x-4 text-grid">
      {kinds.map((kind) => (
        <li
          key={kind}
          className={cx(
            'whitespace-nowrap',
            counts[kind] ? VERDICT_COLOURS[kind] : 'text-ink-soft',
            kind === 'over' && counts.over && 'font-bold',
          )}
        >
          <Glyph kind={kind} className="mr-1.5" />
          {counts[kind] ?? 0} {words?.[kind] ?? VERDICT_WORDS[kind]}
        </li>
      ))}
    </ul>
  );
}
