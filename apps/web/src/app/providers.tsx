import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { type ReactNode, useState } from 'react';
import { ApiError } from '../lib/api-error.ts';
import { ShortcutProvider } from '../ui/shortcuts.tsx';
import { SlotProviders } from '../ui/slot.tsx';
import { ToastProvider } from '../ui/toast.tsx';

const worthAnotherTry = (failures: number, error: Error) =>
  failures < 2 && error instanceof ApiError && (error.code === 'unreachable' || error.status >= 500);

export function Providers({ children }: { children: ReactNode }) {
  const [client] = useState(
    () =>
      new QueryClient({
        defaultOptions: {
          queries: { retry: worthAnotherTry, staleTime: 15_000 },
          mutations: { retry: false },
        },
      }),
  );
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
