import { QueryCache, QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { type ReactNode, useState } from 'react';
import { SESSION_KEY } from '../features/accounts/hooks/use-session.ts';
import { ApiError } from '../lib/api-error.ts';
import { ShortcutProvider } from '../ui/shortcuts.tsx';
import { SlotProviders } from '../ui/slot.tsx';
import { ToastProvider } from '../ui/toast.tsx';

const worthAnotherTry = (failures: number, error: Error) =>
  failures < 2 && error instanceof ApiError && (error.code === 'unreachable' || error.status >= 500);

/** Where the server no longer knows the person, the session is asked for anew, and the frame sees to the rest. */
function newClient(): QueryClient {
  const client: QueryClient = new QueryClient({
    queryCache: new QueryCache({
      onError: (error) => {
        if (error instanceof ApiError && error.code === 'sign_in_needed')
          void client.invalidateQueries({ queryKey: SESSION_KEY });
      },
    }),
    defaultOptions: { queries: { retry: worthAnotherTry, staleTime: 15_000 } },
  });
  return client;
}

export function Providers({ children }: { children: ReactNode }) {
  const [client] = useState(newClient);
  return (
    <QueryClientProvider client={client}>
      <ToastProvider>
        <ShortcutProvider>
          <SlotProviders>{children}</SlotProviders>
        </ShortcutProvider>
      </ToastProvider>
    </QueryClientProvider>
  );
}
