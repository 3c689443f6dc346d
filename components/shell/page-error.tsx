'use client';

import { Button } from '../ui/button';

interface PageErrorProps {
  error: Error & { digest?: string };
  retry: () => void;
}

/** A page that failed: what to do, and the number under which the server wrote down why. */
export function PageError({ error, retry }: PageErrorProps) {
  return (
    <div role="alert" className="flex max-w-md flex-col items-start gap-3 py-10">
      <h1>This page could not be shown</h1>
      <p className="text-quiet">Something went wrong on the way. What you saved is safe; try again.</p>
      {error.digest && (
        <p className="text-quiet text-sm">
          If it stays, quote number <span className="figures">{error.digest}</span>.
        </p>
      )}
      <Button look="primary" onClick={retry}>
        Try again
      </Button>
    </div>
  );
}
