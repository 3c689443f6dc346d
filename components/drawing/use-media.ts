'use client';

import { useSyncExternalStore } from 'react';

/** Whether a media query holds; on the server it does not. */
export function useMedia(query: string): boolean {
  return useSyncExternalStore(
    (listener) => {
      const list = window.matchMedia(query);
      list.addEventListener('change', listener);
      return () => list.removeEventListener('change', listener);
    },
    () => window.matchMedia(query).matches,
    () => false,
  );
}

export const useCoarsePointer = () => useMedia('(pointer: coarse)');
/** Where the tools lie at the foot of the canvas instead of beside it. */
export const useNarrow = () => useMedia('(max-width: 767px)');
