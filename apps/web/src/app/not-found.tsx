import { usePageTitle } from '../lib/use-page-title.ts';
import { LinkButton } from '../ui/button.tsx';
import { Mark } from '../ui/mark.tsx';
import { paths } from './paths.ts';

export function NotFound() {
  usePageTitle('No such page');
  return (
    <main id="main" className="mx-auto max-w-160 px-4 py-12">
      <Mark size={40} />
      <h1 tabIndex={-1} data-page-heading className="mt-4 text-display outline-none">
        Nothing is drawn here.
      </h1>
      <p className="mt-3 mb-6 text-ink-soft">
        The address leads to no page, or to a job that your firm does not have. Check the link, or start from
        the front.
      </p>
      <LinkButton to={paths.front()} look="go" big>
        Go to the front page
      </LinkButton>
    </main>
  );
}
