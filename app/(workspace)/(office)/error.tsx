'use client';

import { PageError } from '@/components/shell/page-error';

export default function OfficeError({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return <PageError error={error} retry={reset} />;
}
