'use client';

import { useQueryClient } from '@tanstack/react-query';
import { useEffect, useState, useSyncExternalStore } from 'react';
import { commissioningQuery, recordReading, withReading } from '@/lib/client/commissioning';
import { KeptReadings, type KeptState } from '@/lib/client/kept-readings';

const TRY_AGAIN_AFTER_MS = 15_000;
const nothingKept: KeptState = {
  entries: [],
  isSending: false,
  isOffline: false,
  isSignedOut: false,
  hasSent: false,
  lastSentAt: null,
  isStored: true,
};
/** While the page is made on the server there is no browser to keep anything in. */
const noShelf = { getItem: () => null, setItem: () => undefined };

/** What this person has entered at this loop and the server has not acknowledged yet; it is sent again and again by itself. */
export function useKeptReadings(personId: string, loopId: string): { kept: KeptReadings; state: KeptState } {
  const queries = useQueryClient();
  const [kept] = useState(
    () =>
      new KeptReadings({
        shelf: typeof window === 'undefined' ? noShelf : localStorage,
        key: `evenhead.readings.${personId}.${loopId}`,
        send: recordReading,
        onAcknowledged: (reading) => {
          const { queryKey } = commissioningQuery(loopId);
          queries.setQueryData(queryKey, (body) => body && withReading(body, reading));
          void queries.invalidateQueries({ queryKey, refetchType: 'none' });
        },
      }),
  );
  const state = useSyncExternalStore(
    kept.subscribe,
    () => kept.state,
    () => nothingKept,
  );

  useEffect(() => {
    const sendAgain = () => {
      if (kept.state.entries.some(({ refusal }) => refusal === null)) void kept.send();
    };
    sendAgain();
    window.addEventListener('online', sendAgain);
    const timer = setInterval(sendAgain, TRY_AGAIN_AFTER_MS);
    return () => {
      window.removeEventListener('online', sendAgain);
      clearInterval(timer);
    };
  }, [kept]);

  return { kept, state };
}
