'use client';

import { PageError } from '@/components/shell/page-error';

export default function ScheduleImportError({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return (
    <main className="mx-auto w-full max-w-none flex-1 px-4">
      <PageError error={error} retry={reset} />
    </main>
  );
}
