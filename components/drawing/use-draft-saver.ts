'use client';

import { useEffect, useSyncExternalStore } from 'react';
import { toast } from 'sonner';
import type { SaveState } from '@/lib/client/draft-saver';
import type { OpenDraft } from './open-draft';

/** Has every change of the drawing saved, and takes up what this browser kept from an earlier visit. */
export function useDraftSaver(draft: OpenDraft): SaveState {
  const { saver } = draft;
  const store = draft.editor.drawingStore;
  useEffect(() => {
    const kept = takeUp(draft);
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
  }, [draft, saver, store]);
  return useSyncExternalStore(
    saver.subscribe,
    () => saver.state,
    () => saver.state,
  );
}

/** Once only: what is kept later is this page's own, or another's that is still at work on it. */
function takeUp(draft: OpenDraft) {
  if (draft.isRestored) return null;
  draft.isRestored = true;
  return draft.saver.restore();
}
