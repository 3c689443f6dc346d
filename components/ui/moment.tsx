'use client';

import { useSyncExternalStore } from 'react';

const never = () => () => undefined;
const form = { day: 'numeric', month: 'short', year: 'numeric', hour: '2-digit', minute: '2-digit', hour12: false } as const;

/** A date and time in the reader's own time zone; the server, which does not know it, writes UTC and says so. */
export function Moment({ at, className }: { at: string; className?: string }) {
  const text = useSyncExternalStore(
    never,
    () => new Intl.DateTimeFormat('en-GB', form).format(new Date(at)),
    () => `${new Intl.DateTimeFormat('en-GB', { ...form, timeZone: 'UTC' }).format(new Date(at))} UTC`,
  );
  return (
    <time dateTime={at} className={className}>
      {text}
    </time>
  );
}
