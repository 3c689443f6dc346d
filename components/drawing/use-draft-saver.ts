'use client';

import { useEffect, useState, useSyncExternalStore } from 'react';
import { toast } from 'sonner';
import { v7 as newId } from 'uuid';
import type { DraftBody } from '@/lib/api/loops';
import { DraftSaver } from '@/lib/client/draft-saver';
import { saveDraft } from '@/lib/client/drafts';
import { draftKeeper } from '@/lib/client/kept-drafts';
import type { DrawingStore } from './store';

/** Has every change of the drawing saved, and takes up what this browser kept from an earlier visit. */
export function useDraftSaver(store: DrawingStore, { loopId, personId, loaded }: { loopId: string; personId: string; loaded: DraftBody }) {
  const [saver] = useState(
    () =>
      new DraftSaver({
        loaded,
        // On the server there is no shelf; the first render there keeps nothing.
        keeper: draftKeeper(typeof window === 'undefined' ? noShelf : window.localStorage, personId, loopId, newId()),
        save: (baseVersion, drawing) => saveDraft(loopId, baseVersion, drawing),
      }),
  );
  useEffect(() => {
    const kept = saver.restore();
    if (kept) {
      store.getState().change(() => kept);
      toast('What was drawn here and not yet saved is back, and is being saved now.');
    }
    saver.start();
    const stopListening = store.subscribe(({ drawing }) => saver.change(drawing));
    const keep = () => void saver.keep();
    const retry = () => void saver.saveNow();
    window.addEventListener('pagehide', keep);
    window.addEventListener('online', retry);
    return () => {
      stopListening();
      saver.stop();
      window.removeEventListener('pagehide', keep);
      window.removeEventListener('online', retry);
    };
  }, [saver, store]);
  const state = useSyncExternalStore(
    saver.subscribe,
    () => saver.state,
    () => saver.state,
  );
  return { saver, state };
}

const noShelf = { getItem: () => null, setItem: () => undefined, removeItem: () => undefined };
