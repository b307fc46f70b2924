import { isRouteErrorResponse, useRouteError } from 'react-router-dom';
import { usePageTitle } from '../lib/use-page-title.ts';
import { FileButton, LinkButton } from '../ui/button.tsx';
import { ErrorState } from '../ui/error-state.tsx';
import { NotFound } from './not-found.tsx';
import { paths } from './paths.ts';

const newerVersion = (error: unknown) =>
  error instanceof TypeError && /dynamically imported module|module script/i.test(error.message);

/** A page that failed; the frame around it goes on, and then holds the page's landmark already. */
export function RouteError({ framed = false }: { framed?: boolean }) {
  const error = useRouteError();
  usePageTitle('This page failed');
  if (isRouteErrorResponse(error) && error.status === 404) return <NotFound />;
  const Around = framed ? 'div' : 'main';
  return (
    <Around {...(framed ? {} : { id: 'main' })}>
      <ErrorState
        level="h1"
        title={newerVersion(error) ? 'A newer version is out' : 'This page failed'}
        actions={
          <>
            <FileButton href={window.location.href}>Reload this page</FileButton>
            <LinkButton to={paths.front()}>Go to the front page</LinkButton>
          </>
        }
      >
        {newerVersion(error)
          ? 'Part of this page could not be fetched. Reloading gets the newest version; nothing saved is lost.'
          : 'Something went wrong in this page. What was saved is safe; reloading usually helps.'}
      </ErrorState>
    </Around>
  );
}
