'use client';

import { useQueryClient } from '@tanstack/react-query';
import { createContext, useContext, useEffect, useState, useSyncExternalStore, type ReactNode } from 'react';
import type { Reading } from '@/lib/api/commissioning';
import { commissioningQuery, withReading } from '@/lib/client/commissioning';
import { deviceShelf } from '@/lib/client/device-database';
import { isKept } from '@/lib/client/kept-entry';
import { emptyOutbox, Outbox, type OutboxState } from '@/lib/client/outbox';
import { sendKept } from '@/lib/client/send-kept';
import { siteQuery } from '@/lib/client/site';

const TRY_AGAIN_AFTER_MS = 15_000;
const CHANNEL = 'evenhead.outbox';
const LOCK = 'evenhead.outbox';

const OutboxContext = createContext<Outbox | null>(null);

/** What the signed-in person has entered on this device and the server has not acknowledged; it is sent again and again by itself, from every page. */
export function OutboxProvider({ personId, children }: { personId: string; children: ReactNode }) {
  const queries = useQueryClient();
  const [outbox] = useState(
    () =>
      new Outbox({
        personId,
        shelf: deviceShelf,
        send: sendKept,
        // Served over plain HTTP a browser has no locks; an entry that two pages send is stored once all the same.
        alone: async (work) => {
          if ('locks' in navigator) await navigator.locks.request(LOCK, work);
          else await work();
        },
        onAcknowledged: (entry, answer) => {
          const { queryKey } = commissioningQuery(entry.loopId);
          if (isKept(entry, 'reading')) queries.setQueryData(queryKey, (body) => body && withReading(body, answer as Reading));
          void queries.invalidateQueries({ queryKey, refetchType: 'none' });
          if (!isKept(entry, 'reading')) void queries.invalidateQueries(siteQuery(entry.loopId));
        },
      }),
  );

  useEffect(() => {
    const others = new BroadcastChannel(CHANNEL);
    others.onmessage = () => void outbox.load();
    let known = outbox.state.entries;
    const unsubscribe = outbox.subscribe(() => {
      if (outbox.state.entries === known) return;
      known = outbox.state.entries;
      others.postMessage(known.length);
    });
    const sendAgain = () => {
      if (outbox.state.entries.some(({ refusal }) => refusal === null)) void outbox.send();
    };
    void outbox.load().then(sendAgain);
    window.addEventListener('online', sendAgain);
    const timer = setInterval(sendAgain, TRY_AGAIN_AFTER_MS);
    return () => {
      window.removeEventListener('online', sendAgain);
      clearInterval(timer);
      unsubscribe();
      others.close();
    };
  }, [outbox]);

  return <OutboxContext value={outbox}>{children}</OutboxContext>;
}

/** The outbox of the signed-in person; only below an `OutboxProvider`. */
export function useOutbox(): { outbox: Outbox; state: OutboxState } {
  const outbox = useContext(OutboxContext);
  if (!outbox) throw new Error('useOutbox stands outside an OutboxProvider');
  const state = useSyncExternalStore(
    outbox.subscribe,
    () => outbox.state,
    () => emptyOutbox,
  );
  return { outbox, state };
}
