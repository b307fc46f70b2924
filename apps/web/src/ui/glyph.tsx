import type { ReactNode } from 'react';
import { cx } from './cx.ts';

export const VERDICT_KINDS = ['over', 'rise', 'near', 'within', 'unserved', 'unjudged'] as const;
export type VerdictKind = (typeof VERDICT_KINDS)[number];

const SHAPES: Record<VerdictKind, ReactNode> = {
  over: <path d="M6 .9 11.7 11H.3Z" />,
  rise: <path d="M6 11.1.3 1h11.4Z" />,
  near: <path d="M6 .2 11.8 6 6 11.8.2 6Z" />,
  within: <circle cx="6" cy="6" r="4.9" />,
  unserved: <path d="m1.5 1.5 9 9m0-9-9 9" fill="none" stroke="currentColor" strokeWidth="2" />,
  unjudged: <circle cx="6" cy="6" r="4.3" fill="none" stroke="currentColor" strokeWidth="1.5" />,
};

export const VERDICT_COLOURS: Record<VerdictKind, string> = {
  over: 'text-over',
  rise: 'text-over',
  near: 'text-near',
  within: 'text-within',
  unserved: 'text-over',
  unjudged: 'text-ink-soft',
};

export const VERDICT_WORDS: Record<VerdictKind, string> = {
  over: 'over',
  rise: 'rise',
  near: 'near',
  within: 'within',
  unserved: 'not served',
  unjudged: 'not judged',
};

export function Glyph({ kind, className }: { kind: VerdictKind; className?: string }) {
  return (
    <svg
      viewBox="0 0 12 12"
      aria-hidden="true"
      className={cx('inline-block size-[11px] flex-none overflow-visible fill-current', className)}
    >
      {SHAPES[kind]}
    </svg>
  );
}
