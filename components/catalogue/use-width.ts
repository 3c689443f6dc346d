'use client';

import { useCallback, useSyncExternalStore } from 'react';

/** The width of an element as it stands, px; 0 before it is there. */
export function useWidth(element: HTMLElement | null): number {
  const subscribe = useCallback(
    (tell: () => void) => {
      if (!element) return () => undefined;
      const observer = new ResizeObserver(tell);
      observer.observe(element);
      return () => observer.disconnect();
    },
    [element],
  );
  return useSyncExternalStore(
    subscribe,
    () => element?.clientWidth ?? 0,
    () => 0,
  );
}
