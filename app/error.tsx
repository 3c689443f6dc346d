'use client';

import { PageError } from '@/components/shell/page-error';

export default function RootError({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return (
    <main className="mx-auto max-w-6xl px-4">
      <PageError error={error} retry={reset} />
    </main>
  );
}
