import type { ReactNode } from 'react';

const ADDRESS = /https?:\/\/[^\s<>"]+[^\s<>".,;:!?)]/g;

/** The text of a message with its addresses as links, and nothing else of it as markup. */
export function linkedText(text: string): ReactNode[] {
  const parts: ReactNode[] = [];
  let from = 0;
  for (const match of text.matchAll(ADDRESS)) {
    parts.push(text.slice(from, match.index));
    parts.push(
      <a key={match.index} href={match[0]} className="break-all">
        {match[0]}
      </a>,
    );
    from = match.index + match[0].length;
  }
  parts.push(text.slice(from));
  return parts.filter((part) => part !== '');
}
