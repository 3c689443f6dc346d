'use client';

import { PageError } from '@/components/shell/page-error';

/** Readings that were entered are on the server or kept on this tablet; only the page failed. */
export default function CommissioningError({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return (
    <main className="m-auto p-6">
      <PageError error={error} retry={reset} />
    </main>
  );
}
