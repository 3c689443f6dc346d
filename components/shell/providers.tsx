'use client';

import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { useState, type ReactNode } from 'react';
import { Toaster } from 'sonner';
import { UnitsContext } from './units-context';

/** What every page stands in: the query cache, the person's units, and the place where short notices appear. */
export function Providers({ units, children }: { units: Record<string, string>; children: ReactNode }) {
  const [client] = useState(() => new QueryClient({ defaultOptions: { queries: { staleTime: 10_000, retry: 1 } } }));
  return (
    <QueryClientProvider client={client}>
      <UnitsContext value={units}>{children}</UnitsContext>
      <Toaster
        position="bottom-center"
        toastOptions={{ style: { background: 'var(--sheet)', color: 'var(--ink)', borderColor: 'var(--rule)' } }}
      />
    </QueryClientProvider>
  );
}
