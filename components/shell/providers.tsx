'use client';

import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { useState, type ReactNode } from 'react';
import { Toaster } from 'sonner';
import { KeptElsewhere } from './kept-elsewhere';
import { OfflineStart } from './offline-start';
import { OutboxProvider } from './outbox-provider';
import { UnitsContext } from './units-context';

interface ProvidersProps {
  /** Who is signed in. */
  personId: string | null;
  units: Record<string, string>;
  children: ReactNode;
}

/** What every page stands in: the query cache, the person's units and unsent entries, and the place where short notices appear. */
export function Providers({ personId, units, children }: ProvidersProps) {
  const [client] = useState(() => new QueryClient({ defaultOptions: { queries: { staleTime: 10_000, retry: 1 } } }));
  return (
    <QueryClientProvider client={client}>
      <UnitsContext value={units}>
        {personId === null ? (
          children
        ) : (
          <OutboxProvider key={personId} personId={personId}>
            {children}
            <KeptElsewhere />
            <OfflineStart />
          </OutboxProvider>
        )}
      </UnitsContext>
      <Toaster
        position="bottom-center"
        toastOptions={{ style: { background: 'var(--sheet)', color: 'var(--ink)', borderColor: 'var(--rule)' } }}
      />
    </QueryClientProvider>
  );
}
