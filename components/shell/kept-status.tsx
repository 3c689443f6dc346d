'use client';

import { CloudOff, TabletSmartphone } from 'lucide-react';
import type { ReactNode } from 'react';
import type { KeptEntry } from '@/lib/client/kept-entry';
import { Button } from '../ui/button';
import { useOutbox } from './outbox-provider';

const clock = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' });

/** How many entries are kept on this device alone, and when the last was sent. `signInPath`: where signing in again leads back to. */
export function KeptStatus({ signInPath, children }: { signInPath: string; children?: ReactNode }) {
  const { outbox, state } = useOutbox();
  const { entries, isSending, isOffline, isSignedOut, isStored, lastSentAt } = state;
  const refused = entries.filter(({ refusal }) => refusal !== null).length;
  return (
    <footer className="bg-sheet flex min-h-12 shrink-0 flex-wrap items-center gap-x-3 border-t px-4 py-1 text-sm">
      <p role="status" className="flex min-w-0 items-center gap-2">
        {isOffline ? (
          <CloudOff size={16} aria-hidden className="text-brass shrink-0" />
        ) : (
          <TabletSmartphone size={16} aria-hidden className="text-quiet shrink-0" />
        )}
        <span>
          {isOffline && 'No signal. '}
          {isSignedOut && (
            <>
              Your session has ended: <a href={`/sign-in?next=${encodeURIComponent(signInPath)}`}>sign in again</a>.{' '}
            </>
          )}
          {entries.length ? <strong>{countWords(entries)}</strong> : 'All readings are sent'}
          {refused > 0 && <span className="text-high">, ▴ {refused} refused</span>}
          {lastSentAt && <span className="text-quiet">, last sent {clock.format(new Date(lastSentAt))}</span>}
          {!isStored && <span className="text-high">. ▴ This tablet has no room: do not close this page</span>}
        </span>
      </p>
      {entries.length > refused && (
        <Button
          size="touch"
          look="quiet"
          className="-my-1 !text-sm"
          isPending={isSending}
          pendingText="Sending…"
          onClick={() => void outbox.send()}
        >
          Send now
        </Button>
      )}
      {children}
    </footer>
  );
}

function countWords(entries: KeptEntry[]): string {
  const areReadings = entries.every(({ content }) => content.kind === 'reading');
  const [one, many] = areReadings ? ['reading', 'readings'] : ['entry', 'entries'];
  return entries.length === 1 ? `1 ${one} is kept on this tablet only` : `${entries.length} ${many} are kept on this tablet only`;
}
