import type { ReactNode } from 'react';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { FrontHeader } from './front-header.tsx';

/** A page that anybody can read before signing in. */
export function AboutPage({ title, children }: { title: string; children: ReactNode }) {
  usePageTitle(title);
  return (
    <div className="mx-auto flex min-h-dvh max-w-360 flex-col">
      <FrontHeader />
      <main id="main" className="w-full flex-1 pb-12">
        <h1 tabIndex={-1} data-page-heading className="px-4 pt-7 pb-2 text-display outline-none desk:px-12">
          {title}
        </h1>
        {children}
      </main>
    </div>
  );
}
