import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { type RenderResult, render } from '@testing-library/react';
import type { ReactNode } from 'react';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';

/** A page at an address, with a query cache of its own; other addresses say where one has come. */
export function renderPage(page: ReactNode, at = '/', pattern = '*'): RenderResult {
  const client = new QueryClient({ defaultOptions: { queries: { retry: false } } });
  const router = createMemoryRouter(
    [
      { path: pattern, element: page },
      { path: '*', element: <Elsewhere /> },
    ],
    { initialEntries: [at] },
  );
  return render(
    <QueryClientProvider client={client}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
}

function Elsewhere() {
  return <p>came elsewhere</p>;
}
