import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { paths } from '../../../app/paths.ts';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { LinkButton } from '../../../ui/button.tsx';
import { FrontHeader } from './front-header.tsx';
import { PathFigure } from './path-figure.tsx';

const WHO: readonly (readonly [string, string])[] = [
  ['Contractor', 'Type, paste or upload the schedule. The verdict stands beside each row while you type.'],
  ['Estimator', 'Every size of a run side by side: drop, losses, and the least that its breaker allows.'],
  ['Inspector', 'Basis, assumptions and hand check on paper or by link. No account needed.'],
  ['Firm', 'Limits, defaults, notices and people, set once for every job.'],
];

interface FrontPageProps {
  /** Where a signed-in person's work is; `null` for a visitor. */
  home: string | null;
  /** The fields to sign in with, for a visitor. */
  signIn: ReactNode;
  /** A copy that runs on its own machine, with demo accounts and a mailbox. */
  local: boolean;
  cautions: ReactNode;
}

export function FrontPage({ home, signIn, local, cautions }: FrontPageProps) {
  usePageTitle('Voltage drop through a whole building');
  return (
    <div className="mx-auto flex min-h-dvh max-w-360 flex-col">
      <FrontHeader />
      <main
        id="main"
        className="grid flex-1 content-start items-start gap-x-14 gap-y-6 px-4 pt-5 pb-4 desk:px-12 desk:pt-7 wide:grid-cols-[432px_minmax(0,1fr)]"
      >
        <div>
          <h1
            tabIndex={-1}
            data-page-heading
            className="mb-4 text-display tracking-tight text-balance outline-none"
          >
            Volts at the far lug, for every run in the building.
          </h1>
          <p className="text-body desk:text-title desk:font-normal">
            Enter the panel schedule once. See which runs fall short and by how much, set the sizes side by
            side, and issue a report that an inspector can check with a pencil.
          </p>
          <div className="mt-6 mb-7 flex flex-wrap items-center gap-4">
            {home ? (
              <LinkButton to={home} look="go" big>
                Go to your jobs
              </LinkButton>
            ) : (
              <>
                <LinkButton to={paths.signUp()} look="go" big>
                  Set up your firm
                </LinkButton>
                <span className="text-ink-soft">
                  {local ? 'or use a demo account' : 'with the demo job to try'}
                </span>
              </>
            )}
          </div>
          <dl className="border-t border-ink">
            {WHO.map(([who, what]) => (
              <div key={who} className="grid grid-cols-[6.5rem_1fr] border-b border-rule py-2.5">
                <dt className="font-bold">{who}</dt>
                <dd>{what}</dd>
              </div>
            ))}
          </dl>
        </div>
        <figure className="border border-rule bg-sheet p-1 desk:p-2">
          <PathFigure />
          <PathFigure narrow />
        </figure>
      </main>
      <section
        aria-label={home ? 'Cautions' : 'Sign in'}
        className="grid items-end gap-x-8 gap-y-4 border-t border-ink bg-sheet px-4 py-4 desk:px-12 wide:grid-cols-[auto_auto_1fr]"
      >
        {!home && (
          <>
            {signIn}
            <p className="flex flex-wrap gap-x-6 text-grid wide:flex-col [&>a]:min-h-6">
              <Link to={paths.signUp()}>Set up a new firm</Link>
              <Link to={paths.forgot()}>Forgot the password</Link>
              {local && <Link to={paths.mailbox()}>Local mailbox</Link>}
            </p>
          </>
        )}
        <div className="max-w-140 text-label text-ink-soft wide:col-start-3 wide:justify-self-end">
          {cautions}
        </div>
      </section>
    </div>
  );
}
