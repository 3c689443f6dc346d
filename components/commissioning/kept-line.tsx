'use client';

import { CloudOff, TabletSmartphone } from 'lucide-react';
import { Button } from '../ui/button';
import type { Commissioning } from './commissioning-context';

const clock = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' });

/** Always there: how many readings are kept on this tablet alone, and when the last was sent. */
export function KeptLine({ commissioning }: { commissioning: Commissioning }) {
  const { keptState, kept, body } = commissioning;
  const { entries, isSending, isOffline, isSignedOut, isStored, lastSentAt } = keptState;
  const refused = entries.filter(({ refusal }) => refusal !== null).length;
  const count = entries.length === 1 ? '1 reading is kept on this tablet only' : `${entries.length} readings are kept on this tablet only`;
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
              Your session has ended: <a href={`/sign-in?next=${encodeURIComponent(commissioning.base)}`}>sign in again</a>.{' '}
            </>
          )}
          {entries.length ? <strong>{count}</strong> : 'All readings are sent'}
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
          onClick={() => void kept.send()}
        >
          Send now
        </Button>
      )}
      {body.revision && <span className="text-quiet ml-auto hidden sm:inline">revision {body.revision.number}</span>}
    </footer>
  );
}
