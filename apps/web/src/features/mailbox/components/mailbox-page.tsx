import { listMail } from '@farlug/contract/routes';
import { useQuery } from '@tanstack/react-query';
import { Link, useSearchParams } from 'react-router-dom';
import { paths } from '../../../app/paths.ts';
import { ask } from '../../../lib/call.ts';
import { formatCount, formatMoment } from '../../../lib/format.ts';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { Button } from '../../../ui/button.tsx';
import { cx } from '../../../ui/cx.ts';
import { EmptyState } from '../../../ui/empty-state.tsx';
import { ErrorState } from '../../../ui/error-state.tsx';
import { Mark } from '../../../ui/mark.tsx';
import { Scroller } from '../../../ui/scroller.tsx';
import { Skeleton } from '../../../ui/skeleton.tsx';
import { ThemeSwitch } from '../../../ui/theme-switch.tsx';
import { Letter } from './letter.tsx';

const REFRESH_MS = 4000;

/** What the product mailed, on a copy that runs on its own machine: nothing left it. */
export function MailboxPage() {
  usePageTitle('Local mailbox');
  const [query] = useSearchParams();
  const chosen = query.get('message');
  const mail = useQuery({
    queryKey: ['mailbox'],
    queryFn: ({ signal }) => ask(listMail, { signal }),
    refetchInterval: REFRESH_MS,
  });
  const messages = mail.data?.messages ?? [];
  return (
    <div className="flex min-h-dvh flex-col desk:h-dvh">
      <header className="flex flex-wrap items-center gap-x-4 gap-y-2 border-t-2 border-b border-ink bg-sheet px-4 py-3">
        <Link to={paths.front()} aria-label="Farlug, front page">
          <Mark />
        </Link>
        <div>
          <h1 tabIndex={-1} data-page-heading className="text-title outline-none">
            Local mailbox
          </h1>
          <p className="text-label text-ink-soft">
            Mail of this copy of Farlug. It was delivered here and nowhere else.
          </p>
        </div>
        <div className="ml-auto">
          <ThemeSwitch />
        </div>
      </header>
      <main id="main" className="grid min-h-0 flex-1 desk:grid-cols-[360px_minmax(0,1fr)]">
        <section
          aria-label="Messages"
          className={cx('flex min-h-0 flex-col border-r border-rule', chosen && 'hidden desk:flex')}
        >
          <p className="flex items-center gap-3 px-4 py-2 text-label text-ink-soft">
            {formatCount(messages.length, 'message')}
            <Button look="bare" className="ml-auto" onClick={() => void mail.refetch()}>
              Look again
            </Button>
          </p>
          <Scroller
            label="List of messages"
            className="min-h-0 flex-1 overflow-auto border-t border-ink bg-sheet"
          >
            {mail.isPending ? (
              <Skeleton label="Fetching the mail" />
            ) : mail.isError ? (
              <ErrorState title="There is no mailbox here">
                Only a copy that was started on its own machine has one. {mail.error.message}
              </ErrorState>
            ) : messages.length === 0 ? (
              <EmptyState title="No mail yet">
                Invitations, password links and reports that are sent arrive here within seconds.
              </EmptyState>
            ) : (
              <ul>
                {messages.map((message) => (
                  <li key={message.id}>
                    <Link
                      to={paths.mailbox(message.id)}
                      aria-current={message.id === chosen ? 'true' : undefined}
                      className="block border-b border-l-3 border-b-hair border-l-transparent px-4 py-2 text-ink no-underline hover:bg-faint aria-[current]:border-l-copper aria-[current]:bg-wash"
                    >
                      <span className="block font-bold">{message.subject}</span>
                      <span className="block truncate text-grid">{message.to.join(', ')}</span>
                      <span className="block text-label text-ink-soft">{formatMoment(message.at)}</span>
                    </Link>
                  </li>
                ))}
              </ul>
            )}
          </Scroller>
        </section>
        <section aria-label="Message" className={cx('min-h-0 bg-sheet', !chosen && 'hidden desk:block')}>
          {chosen ? (
            <Letter key={chosen} id={chosen} />
          ) : (
            <EmptyState title="Choose a message">Its links work, and its attachments open.</EmptyState>
          )}
        </section>
      </main>
    </div>
  );
}
