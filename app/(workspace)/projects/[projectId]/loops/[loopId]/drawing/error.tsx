'use client';

import { Button } from '@/components/ui/button';

/** The drawing could not be shown; what was drawn is kept on the server and, where unsaved, in this browser. */
export default function DrawingError({ reset }: { error: Error; reset: () => void }) {
  return (
    <main className="m-auto max-w-md p-6">
      <h1>The drawing could not be shown</h1>
      <p className="text-quiet mt-1 mb-4">
        Nothing is lost: what was drawn is saved on the server, and what was not yet saved is kept in this browser.
      </p>
      <Button look="primary" onClick={reset}>
        Try again
      </Button>
    </main>
  );
}
